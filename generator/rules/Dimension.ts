import { unit } from './mathLibrary.ts';

/** Powers of volt, ampere and second: every electrical quantity is a product of these three. */
export interface Dimension {
  readonly volt: number;
  readonly ampere: number;
  readonly second: number;
}

export const dimensionless: Dimension = { volt: 0, ampere: 0, second: 0 };

/** Units a rule may write, with the prefixes f p n u m k M G; nothing else of the unit library is let in. */
const writableUnit = /^[fpnumkMG]?(?:V|A|Ohm|ohm|F|H|s|Hz|W|J|S)$/;

export interface UnitScale {
  readonly dimension: Dimension;
  /** Power of ten to SI: −3 for `mV`. */
  readonly decade: number;
}

/** What a unit symbol stands for, or null where it is not one that a rule may write. */
export function unitScale(symbol: string): UnitScale | null {
  if (!writableUnit.test(symbol)) return null;
  const parsed = unit(1, symbol.replace('Ohm', 'ohm'));
  const { value, dimensions } = parsed as unknown as { value: number; dimensions: readonly number[] };
  const [mass = 0, , time = 0, current = 0] = dimensions;
  // V = kg·m²·s⁻³·A⁻¹, so the power of mass is that of volt, and volt brings −3 in time and −1 in current.
  return {
    dimension: { volt: mass, ampere: current + mass, second: time + 3 * mass },
    decade: Math.round(Math.log10(value)),
  };
}

export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a.volt === b.volt && a.ampere === b.ampere && a.second === b.second;
}

/** a·bᵖ */
export function timesPower(a: Dimension, b: Dimension, power: number): Dimension {
  return {
    volt: a.volt + b.volt * power,
    ampere: a.ampere + b.ampere * power,
    second: a.second + b.second * power,
  };
}

const named: readonly (readonly [symbol: string, noun: string, dimension: Dimension])[] = [
  ['1', 'a plain number', dimensionless],
  ['V', 'voltage', { volt: 1, ampere: 0, second: 0 }],
  ['A', 'current', { volt: 0, ampere: 1, second: 0 }],
  ['s', 'time', { volt: 0, ampere: 0, second: 1 }],
  ['Hz', 'frequency', { volt: 0, ampere: 0, second: -1 }],
  ['Ohm', 'resistance', { volt: 1, ampere: -1, second: 0 }],
  ['S', 'conductance', { volt: -1, ampere: 1, second: 0 }],
  ['F', 'capacitance', { volt: -1, ampere: 1, second: 1 }],
  ['H', 'inductance', { volt: 1, ampere: -1, second: 1 }],
  ['W', 'power', { volt: 1, ampere: 1, second: 0 }],
  ['J', 'energy', { volt: 1, ampere: 1, second: 1 }],
  ['V/s', 'voltage slope', { volt: 1, ampere: 0, second: -1 }],
  ['A/s', 'current slope', { volt: 0, ampere: 1, second: -1 }],
];

/** The SI symbol: `V`, `Ohm`, `V/s`, `1` for a plain number, a product such as `V^2 s` where none is known. */
export function unitSymbol(dimension: Dimension): string {
  const known = named.find(([, , candidate]) => sameDimension(candidate, dimension));
  if (known !== undefined) return known[0];
  const powers: readonly [string, number][] = [
    ['V', dimension.volt],
    ['A', dimension.ampere],
    ['s', dimension.second],
  ];
  return powers
    .filter(([, power]) => power !== 0)
    .map(([symbol, power]) => (power === 1 ? symbol : `${symbol}^${power}`))
    .join(' ');
}

/** For messages: `voltage (V)`. */
export function dimensionInWords(dimension: Dimension): string {
  const known = named.find(([, , candidate]) => sameDimension(candidate, dimension));
  if (known === undefined) return unitSymbol(dimension);
  return known[0] === '1' ? known[1] : `${known[1]} (${known[0]})`;
}
