/** A number and what follows it, as typed. */
export interface Literal {
  readonly negative: boolean;
  /** Unsigned digits, point and exponent. */
  readonly digits: string;
  /** The unit's text, perhaps empty. */
  readonly unit: string;
}

const pattern = /^([+-]?) ?((?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?) ?(\D.*)?$/;

export function parseLiteral(text: string): Literal | null {
  const match = pattern.exec(text);
  if (match === null) return null;
  return { negative: match[1] === '-', digits: match[2]!, unit: match[3]?.trim() ?? '' };
}

/**
 * The digits times a power of ten, rounded once: the number nearest to the decimal that was typed.
 * @returns Infinity where a double ends
 */
export function decimalValue(digits: string, places: number): number {
  const [mantissa, exponent = '0'] = digits.toLowerCase().split('e');
  return Number(`${mantissa}e${Number(exponent) + places}`);
}
