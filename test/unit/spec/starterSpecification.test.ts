import { expect, test } from 'vitest';
import { specKeys } from '../../../generator/spec/keys/specKeys.ts';
import { starterSpecification } from '../../../generator/spec/starterSpecification.ts';
import { accepted } from './reading.ts';

const text = starterSpecification();

test('the starter is a specification, without a warning', async () => {
  const { specification, warnings } = await accepted({ text });
  expect(warnings).toEqual([]);
  expect(specification).toMatchObject({ converter: 'buck', ramp: { law: 'vin' } });
});

test('it shows every key, with its doc above it', () => {
  for (const { path, doc, example } of specKeys) {
    expect(text).toContain(`${path.split('.').at(-1)}: ${example}`);
    expect(text).toContain(doc);
  }
});

/** The starter's lines, each with the path of the key that it shows. */
function pathsOfLines(): readonly { readonly line: string; readonly path: string | null }[] {
  const names: string[] = [];
  return text.split('\n').map((line) => {
    const [, indent, name] = /^( *)#?([A-Za-z]+):/.exec(line) ?? [];
    if (indent === undefined || name === undefined) return { line, path: null };
    names.splice(indent.length / 2, names.length, name);
    return { line, path: names.join('.') };
  });
}

/** The starter with these keys in use, and without those that they exclude. */
function using(paths: readonly string[], excluded: string | undefined): string {
  const isWanted = (shown: string) => paths.some((path) => path === shown || path.startsWith(`${shown}.`));
  return pathsOfLines()
    .filter(({ path }) => path === null || path !== excluded)
    .map(({ line, path }) => (path !== null && isWanted(path) ? line.replace(/^( *)#/, '$1') : line))
    .join('\n');
}

const companions: Readonly<Record<string, string>> = {
  'outputCapacitor.seriesResistance': 'outputCapacitor.capacitance',
  'controller.oscillator.valley': 'controller.oscillator.peak',
  'controller.oscillator.peak': 'controller.oscillator.valley',
};
const keys = specKeys.map(({ path }) => path).filter((path) => !path.startsWith('inductance.'));

test.each(keys)('%s can be used by deleting its # and that of its group', async (path) => {
  const excluded = path === 'goal.dampingIndex' ? 'goal.dampingQ' : undefined;
  const { place } = await accepted({ text: using([path, companions[path] ?? path], excluded) });
  expect(place(path)).not.toBeNull();
});
