import type { LawKind } from '../spec/Specification.ts';
import type { Law } from './Law.ts';

/** ma = S: the gain is S·L in volts. */
const fixed: Law = { kind: 'fixed', gainUnit: 'V', gainSymbol: 'S·L', basis_V: () => 1 };

/** ma = k·Vin/L. */
const vin: Law = { kind: 'vin', gainUnit: '', gainSymbol: 'k', basis_V: (point) => point.inputVoltage_V };

const laws: Partial<Record<LawKind, Law>> = { fixed, vin };

export function lawOf(kind: LawKind): Law | null {
  return laws[kind] ?? null;
}

/** The two laws that every design is shown with. */
export const comparedLaws = { fixed, adaptive: vin } as const;
