/**
 * Value codes for resistors and capacitors: the multiplier's letter stands where the decimal point would.
 *
 * @source IEC 60062, letter and digit code for resistance and capacitance values, tolerance letters (from memory)
 */
export interface CodedValue {
  readonly value: number;
  /** Symmetric tolerance of the code's last letter, or null. */
  readonly toleranceRatio: number | null;
}

const multipliers = {
  resistance: { R: 0, K: 3, k: 3, M: 6, G: 9 },
  capacitance: { p: -12, n: -9, u: -6, m: -3 },
} as const;

const toleranceLetters: Readonly<Record<string, number>> = {
  B: 0.001,
  C: 0.0025,
  D: 0.005,
  F: 0.01,
  G: 0.02,
  J: 0.05,
  K: 0.1,
  M: 0.2,
};

const patterns = {
  resistance: /^(\d*)([RKkMG])(\d*)([BCDFGJKM]?)$/,
  capacitance: /^(\d*)([pnum])(\d*)([BCDFGJKM]?)$/,
} as const;

/** The value of a code such as `4k7`, `R050` or `n33J`, or null where the text is none. */
export function codedValue(text: string, kind: 'resistance' | 'capacitance'): CodedValue | null {
  const match = patterns[kind].exec(text);
  if (match === null) return null;
  const [, whole = '', letter = '', decimals = '', tolerance = ''] = match;
  if (whole === '' && decimals === '') return null;
  const places = (multipliers[kind] as Readonly<Record<string, number>>)[letter]!;
  return {
    value: Number(`${whole || '0'}.${decimals || '0'}e${places}`),
    toleranceRatio: toleranceLetters[tolerance] ?? null,
  };
}
