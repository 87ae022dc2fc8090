import fc from 'fast-check';
import type { Keys } from './request.ts';

/** Decades alike, to four digits: what a person would write. */
function logarithmic(low: number, high: number): fc.Arbitrary<number> {
  return fc
    .double({ min: Math.log(low), max: Math.log(high), noNaN: true })
    .map((exponent) => Number(Math.exp(exponent).toPrecision(4)));
}

/** Most often absent or at an end, where edges are. */
function between(low: number, high: number): fc.Arbitrary<number> {
  return fc
    .oneof(
      { weight: 1, arbitrary: fc.constantFrom(low, high) },
      { weight: 4, arbitrary: fc.double({ min: low, max: high, noNaN: true }) },
    )
    .map((value) => Number(value.toPrecision(4)));
}

const tolerance = fc.oneof(
  fc.constant(''),
  fc.constantFrom(1, 5, 10, 20, 30).map((percent) => ` ± ${percent} %`),
);

function ranged(low: fc.Arbitrary<number>, span: number, unit: string, scale = 1): fc.Arbitrary<string> {
  const ratios = span > 1.01 ? fc.oneof(fc.constant(1), between(1.01, span)) : fc.constant(1);
  return fc.tuple(low, ratios).map(([from, ratio]) => {
    const text = (value: number) => `${Number((value / scale).toPrecision(4))} ${unit}`;
    return ratio === 1 ? text(from) : `${text(from)} to ${text(from * ratio)}`;
  });
}

function toleranced(value: fc.Arbitrary<string>): fc.Arbitrary<string> {
  return fc.tuple(value, tolerance).map(([text, suffix]) => text + suffix);
}

const input = fc
  .tuple(logarithmic(2, 400), fc.oneof(fc.constant(1), logarithmic(1.05, 30)))
  .map(([low, ratio]) => ({ low, high: Number(Math.min(400, low * ratio).toPrecision(4)) }))
  .map(({ low, high }) => ({ low: Math.min(low, high), high }));

/** As shares of the highest input: nothing known, a value, a range, a list. */
const outputShares = fc.oneof(
  fc.constant(null),
  between(0.02, 0.98).map((share) => [[share, share]]),
  fc.tuple(between(0.01, 0.6), between(1.05, 8)).map(([low, ratio]) => [[low, Math.min(1.02, low * ratio)]]),
  fc.array(
    between(0.02, 0.9).map((share) => [share, share]),
    { minLength: 2, maxLength: 3 },
  ),
);

const optional = <T>(value: fc.Arbitrary<T>, weight = 1) =>
  fc.oneof({ weight, arbitrary: fc.constant(undefined) }, { weight: 1, arbitrary: value });

const rest = fc.record({
  'inductance.value': toleranced(ranged(logarithmic(5e-7, 1e-3), 10, 'uH', 1e-6)),
  frequency: toleranced(ranged(logarithmic(2e4, 3e6), 1.5, 'kHz', 1e3)),
  maximumDuty: optional(between(0.3, 0.97).map((duty) => `${Number((100 * duty).toPrecision(4))} %`)),
  'rectifier.drop': optional(toleranced(ranged(between(0.2, 0.9), 1, 'V'))),
  'losses.switch': optional(toleranced(ranged(logarithmic(1e-3, 0.2), 1, 'mOhm', 1e-3)), 2),
  'losses.winding': optional(toleranced(ranged(logarithmic(1e-3, 0.2), 1, 'mOhm', 1e-3)), 2),
  'losses.rectifier': optional(toleranced(ranged(logarithmic(1e-3, 0.2), 1, 'mOhm', 1e-3)), 2),
  load: optional(ranged(logarithmic(0.01, 3), 10, 'A')),
  minimumOnTime: optional(ranged(logarithmic(1e-8, 4e-7), 1, 'ns', 1e-9), 3),
  senseGain: optional(toleranced(ranged(logarithmic(1e-3, 0.1), 1, 'mV/A', 1e-3))),
  'goal.dampingIndex': optional(between(0.7, 1.2)),
  'ramp.law': optional(fc.constantFrom('vin', 'fixed')),
  'ramp.supply': optional(toleranced(ranged(between(3, 12), 1, 'V')), 2),
  'ramp.capacitance': optional(toleranced(ranged(logarithmic(5e-11, 5e-9), 1, 'pF', 1e-12)), 5),
  'ramp.series.resistor': optional(fc.constantFrom('E12', 'E24', 'E48', 'E96', 'E192'), 2),
  'ramp.series.capacitor': optional(fc.constantFrom('E6', 'E12', 'E24'), 2),
});

/** Specifications as a user writes them, all of them sound in form; many are impossible as circuits. */
export const randomKeys: fc.Arbitrary<Keys> = fc
  .tuple(input, outputShares, rest, optional(between(0.5, 2), 6))
  .map(([{ low, high }, shares, others, gain]) => {
    const volts = (share: number) => `${Number((share * high).toPrecision(4))} V`;
    const spans = shares?.map(([from, to]) =>
      from === to ? volts(from!) : `${volts(from!)} to ${volts(to!)}`,
    );
    const scale = others['ramp.law'] === 'fixed' ? high / 2 : 1;
    return withoutUndefined({
      input: low === high ? `${low} V` : `${low} V to ${high} V`,
      output: spans && (spans.length === 1 ? spans[0] : spans),
      ...others,
      'ramp.gain':
        gain === undefined
          ? undefined
          : others['ramp.law'] === 'fixed'
            ? `${Number((gain * scale).toPrecision(4))} V`
            : gain,
    });
  });

function withoutUndefined(keys: Record<string, unknown>): Keys {
  return Object.fromEntries(Object.entries(keys).filter(([, value]) => value !== undefined)) as Keys;
}
