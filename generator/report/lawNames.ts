import type { SizedDesign, SizedLaw } from '../circuit/SizedDesign.ts';
import type { LawKind } from '../spec/Specification.ts';
import { figure } from './figures.ts';

const names: Readonly<Record<LawKind, string>> = {
  fixed: 'fixed ramp',
  vin: 'ramp proportional to Vin',
  vout: 'ramp proportional to Vout',
  'constant-q': 'ramp for one Q',
};

export function lawName(kind: LawKind): string {
  return names[kind];
}

/** The ink that a law keeps through the whole report. */
export function inkOf(kind: LawKind): 'adaptive' | 'fixed' {
  return kind === 'fixed' ? 'fixed' : 'adaptive';
}

/** `k = 0.752` */
export function gainText({ law }: Pick<SizedLaw, 'law'>, gain: number): string {
  return `${law.gainSymbol}\u00a0=\u00a0${figure(gain, law.gainUnit)}`;
}

/** Both laws, the adaptive one first, whichever is built. */
export function bothLaws({ chosen, alternative }: SizedDesign): readonly [SizedLaw, SizedLaw] {
  return chosen.law.kind === 'fixed' ? [alternative, chosen] : [chosen, alternative];
}
