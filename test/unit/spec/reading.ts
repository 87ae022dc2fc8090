import type { Problem } from '../../../generator/base/Problem.ts';
import { type ReadSpecification, readSpecification } from '../../../generator/spec/readSpecification.ts';

export interface Given {
  readonly text?: string;
  readonly flags?: Readonly<Record<string, string>>;
  readonly sets?: readonly string[];
}

function request({ text, flags = {}, sets = [] }: Given) {
  return {
    document: text === undefined ? null : { name: 'rail.yaml', text },
    flags: Object.entries(flags).map(([flag, value]) => ({ flag, value })),
    sets,
  };
}

/** What is read, warnings beside it. */
export async function accepted(given: Given): Promise<ReadSpecification & { warnings: readonly Problem[] }> {
  const outcome = await readSpecification(request(given));
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems, null, 2));
  return { ...outcome.value, warnings: outcome.warnings };
}

export async function refused(given: Given): Promise<readonly Problem[]> {
  const outcome = await readSpecification(request(given));
  return outcome.ok ? [] : outcome.problems;
}

/** The least that a specification needs. */
export const least = 'input: 8 V to 36 V\nfrequency: 500 kHz\n';
