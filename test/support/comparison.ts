import { compare } from '../../generator/compare.ts';
import type { Comparison } from '../../generator/loop/Comparison.ts';
import type { ComparedLaw } from '../../generator/loop/compareLaws.ts';
import type { LawKind } from '../../generator/spec/Specification.ts';
import { type Keys, requestOf } from './request.ts';

/** The comparison of a specification; throws where none is made. */
export async function comparisonOf(keys: Keys): Promise<Comparison> {
  const outcome = compare(await requestOf(keys));
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems, null, 2));
  return outcome.value;
}

export function lawOf({ laws }: Comparison, kind: LawKind): ComparedLaw {
  const found = laws.find(({ law }) => law.kind === kind);
  if (found === undefined) throw new Error(`${kind} is not among the laws compared`);
  return found;
}

/** Figures that leave nothing to tolerance or to what is assumed otherwise. */
export const exactBuck: Keys = {
  inductance: '10 uH',
  frequency: '500 kHz',
  senseGain: '50 mOhm',
};
