export type DimensionName =
  | 'voltage'
  | 'current'
  | 'resistance'
  | 'capacitance'
  | 'inductance'
  | 'frequency'
  | 'time'
  | 'slope'
  | 'gain'
  | 'ratio'
  | 'number';

/** A physical dimension as the specification knows it. */
export interface Dimension {
  readonly noun: string;
  /** SI unit, as results write it. */
  readonly unit: string;
  /** What a unit of this dimension reduces to in {@link parseUnit}. */
  readonly symbol: string;
  /** Value and unit as a user would write them. */
  readonly example: string;
  /** Unit that carries the prefix when a value is written as text, and the powers of ten it stands above SI. */
  readonly written: { readonly unit: string; readonly places: number };
  /** Outside these, in SI, a value is a slip: no converter that this tool is for has it. */
  readonly least: number;
  readonly most: number;
}

export const dimensions: Readonly<Record<DimensionName, Dimension>> = {
  voltage: dimension('a voltage', 'V', 'V', '12 V', 1e-5, 1e4),
  current: dimension('a current', 'A', 'A', '3 A', 1e-9, 1e4),
  resistance: dimension('a resistance', 'Ω', 'Ohm', '40 mOhm', 1e-6, 1e7),
  capacitance: dimension('a capacitance', 'F', 'F', '100 uF', 1e-15, 10),
  inductance: dimension('an inductance', 'H', 'H', '10 uH', 1e-10, 10),
  frequency: dimension('a frequency', 'Hz', 'Hz', '500 kHz', 1e3, 1e8),
  time: dimension('a time', 's', 's', '60 ns', 1e-12, 1),
  slope: {
    ...dimension('a voltage slope', 'V/s', 'V/s', '45 mV/us', 1, 1e12),
    written: { unit: 'V/µs', places: 6 },
  },
  gain: dimension('a sense gain', 'V/A', 'Ohm', '100 mV/A', 1e-6, 1e4),
  ratio: { ...dimension('a ratio', '', '%', '90 %', 1e-6, 1e3), written: { unit: '%', places: -2 } },
  number: dimension('a number', '', '', '4', 1e-6, 1e6),
};

function dimension(
  noun: string,
  unit: string,
  symbol: string,
  example: string,
  least: number,
  most: number,
): Dimension {
  return { noun, unit, symbol, example, written: { unit, places: 0 }, least, most };
}
