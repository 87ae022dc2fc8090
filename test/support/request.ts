import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import { type ReadSpecification, readSpecification } from '../../generator/spec/readSpecification.ts';

/** A specification by its dotted keys, as a user would write each value. */
export type Keys = Readonly<Record<string, string | number | readonly string[]>>;

/** Read through the real reader, from a document; throws where the reader refuses. */
export async function requestOf(keys: Keys): Promise<ReadSpecification> {
  const outcome = await readSpecification({
    document: { name: 'spec.yaml', text: documentOf(keys) },
    flags: [],
    sets: [],
  });
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems, null, 2));
  return outcome.value;
}

/** The design of a specification; throws where none is made. */
export async function designOf(keys: Keys): Promise<SizedDesign> {
  const outcome = sizeDesign(await requestOf(keys));
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems, null, 2));
  return outcome.value;
}

function documentOf(keys: Keys): string {
  const root: Record<string, unknown> = {};
  for (const [path, value] of Object.entries(keys)) {
    const names = path.split('.');
    const last = names.pop()!;
    let group = root;
    for (const name of names) {
      group[name] ??= {};
      group = group[name] as Record<string, unknown>;
    }
    group[last] = value;
  }
  return JSON.stringify(root);
}
