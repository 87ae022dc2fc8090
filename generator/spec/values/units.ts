/** Powers of ten of the engineering prefixes; micro is `u` after {@link normaliseText}. */
const prefixes: Readonly<Record<string, number>> = {
  f: -15,
  p: -12,
  n: -9,
  u: -6,
  m: -3,
  '': 0,
  k: 3,
  M: 6,
  G: 9,
  T: 12,
};

/** Unit spellings and what they stand for. Watts are here so that a power is told from a misspelling. */
const baseUnits: Readonly<Record<string, string>> = {
  V: 'V',
  A: 'A',
  Ohm: 'Ohm',
  ohm: 'Ohm',
  Ohms: 'Ohm',
  ohms: 'Ohm',
  F: 'F',
  H: 'H',
  Hz: 'Hz',
  s: 's',
  W: 'W',
};

export interface Unit {
  /** Reduced: `V/A` is `Ohm`. */
  readonly symbol: string;
  /** The unit is ten to this many powers of the SI unit. */
  readonly places: number;
}

/** The unit that a text such as `kHz`, `mV/us` or `%` names to the letter, or null. */
export function parseUnit(text: string): Unit | null {
  if (text === '%') return { symbol: '%', places: -2 };
  const parts = text.split('/').map((part) => simpleUnit(part.trim()));
  const [top, bottom] = parts;
  if (parts.length > 2 || top === null || top === undefined || bottom === null) return null;
  if (bottom === undefined) return top;
  const symbol = `${top.symbol}/${bottom.symbol}`;
  return { symbol: symbol === 'V/A' ? 'Ohm' : symbol, places: top.places - bottom.places };
}

function simpleUnit(text: string): Unit | null {
  for (const [spelling, symbol] of Object.entries(baseUnits)) {
    if (!text.endsWith(spelling)) continue;
    const places = prefixes[text.slice(0, text.length - spelling.length)];
    if (places !== undefined) return { symbol, places };
  }
  return null;
}

/** Units that differ from the text in upper and lower case only: `500 KHZ` meant `kHz`, `10 MH` perhaps `mH`. */
export function otherCases(text: string): string[] {
  const parts = text.split('/').map((part) => spellings(part.trim()));
  if (parts.length > 2) return [];
  const [top = [], bottom] = parts;
  if (bottom === undefined) return top.filter((spelling) => spelling !== text);
  return top.flatMap((a) => bottom.map((b) => `${a}/${b}`)).filter((spelling) => spelling !== text);
}

/** Those with the prefix as it was typed come first. */
function spellings(text: string): string[] {
  const lower = text.toLowerCase();
  return Object.keys(baseUnits)
    .flatMap((unit) => Object.keys(prefixes).map((prefix) => prefix + unit))
    .filter((spelling) => spelling.toLowerCase() === lower)
    .sort((a, b) => likeness(b, text) - likeness(a, text));
}

function likeness(a: string, b: string): number {
  return [...a].filter((letter, index) => letter === b[index]).length;
}
