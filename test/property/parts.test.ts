/** The search for parts against a plain enumeration of whole series, written from the published rules. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { spreadCauses, worstSpread } from '../../generator/circuit/boardOpamp/rampSpread.ts';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { preferredAtLeast, preferredAtMost, preferredValues } from '../../generator/parts/eSeries.ts';
import type { SeriesName } from '../../generator/spec/Specification.ts';
import { designOf, type Keys } from '../support/request.ts';

const e24 = '10 11 12 13 15 16 18 20 22 24 27 30 33 36 39 43 47 51 56 62 68 75 82 91'.split(' ').map(Number);
const counts = { E6: 6, E12: 12, E24: 24, E48: 48, E96: 96, E192: 192 } as const;

const wholes = new Map<SeriesName, number[]>();

function whole(series: SeriesName): number[] {
  const found = wholes.get(series) ?? build(series);
  wholes.set(series, found);
  return found;
}

/** Every value of a series from 1 pF to 100 MΩ, by the standard's rule and its exceptions. */
function build(series: SeriesName): number[] {
  const count = counts[series];
  const decade =
    count <= 24
      ? e24.filter((_, n) => n % (24 / count) === 0).map((value) => value / 10)
      : Array.from({ length: count }, (_, n) => {
          const value = Math.round(100 * 10 ** (n / count)) / 100;
          return value === 9.19 ? 9.2 : value;
        });
  return Array.from({ length: 20 }, (_, n) => n - 12).flatMap((exponent) =>
    decade.map((value) => Number(`${value}e${exponent}`)),
  );
}

const series = fc.constantFrom<SeriesName>('E6', 'E12', 'E24', 'E48', 'E96', 'E192');
const limit = fc.double({ min: -9.4, max: 7.8, noNaN: true }).map((exponent) => 10 ** exponent);

test('rounding down and up finds the neighbours in the whole series', () => {
  fc.assert(
    fc.property(series, limit, (name, value) => {
      const all = whole(name);
      expect(preferredAtMost(name, value)).toBe(all.filter((each) => each <= value * (1 + 1e-12)).at(-1));
      expect(preferredAtLeast(name, value)).toBe(all.find((each) => each >= value * (1 - 1e-12)));
    }),
    { numRuns: 500 },
  );
});

test('a preferred value is its own neighbour on both sides', () => {
  for (const name of Object.keys(counts) as SeriesName[])
    for (const value of whole(name).slice(20, -20)) {
      expect(preferredAtMost(name, value)).toBe(value);
      expect(preferredAtLeast(name, value)).toBe(value);
    }
});

test('a range holds every value of the whole series between its ends', () => {
  fc.assert(
    fc.property(series, limit, fc.double({ min: 1, max: 300, noNaN: true }), (name, high, ratio) => {
      const low = high / ratio;
      expect(preferredValues(name, low, high)).toEqual(
        whole(name).filter((each) => each >= low * (1 - 1e-12) && each <= high * (1 + 1e-12)),
      );
    }),
    { numRuns: 200 },
  );
});

const cases: readonly [string, Keys][] = [
  [
    'only input, inductance and frequency',
    { input: '8 V to 36 V', inductance: '10 uH', frequency: '500 kHz' },
  ],
  [
    'an adjustable output from a wide input',
    {
      input: '6 V to 36 V',
      output: '0.8 V to 30 V',
      inductance: '10 uH ± 20 %',
      frequency: '500 kHz ± 10 %',
    },
  ],
  [
    'a fixed ramp',
    { input: '6 V to 36 V', output: '5 V', inductance: '10 uH', frequency: '500 kHz', 'ramp.law': 'fixed' },
  ],
  ['a fast converter at low voltage', { input: '3 V to 5.5 V', inductance: '1 uH', frequency: '2 MHz' }],
  [
    'coarse series',
    {
      input: '9 V to 18 V',
      output: '3.3 V to 9 V',
      inductance: '22 uH',
      frequency: '250 kHz',
      'ramp.series.resistor': 'E24',
      'ramp.series.capacitor': 'E6',
    },
  ],
  [
    'a capacitor that is settled already',
    { input: '9 V to 18 V', inductance: '22 uH', frequency: '250 kHz', 'ramp.capacitance': '1 nF ± 5 %' },
  ],
  [
    'a gain that is settled already',
    { input: '9 V to 18 V', inductance: '22 uH', frequency: '250 kHz', 'ramp.gain': 0.9 },
  ],
];

describe.each(cases)('%s', (_, keys) => {
  test('the chosen parts have the least cost of all sets of the whole series that keep the bounds', async () => {
    const design = await designOf(keys);
    const best = enumerate(design);
    const { capacitance_F, set_ohm, summing_ohm, degeneration_ohm, cost } = design.sizing;
    expect(best.cost).toBeCloseTo(cost, 9);
    expect({ capacitance_F, set_ohm, summing_ohm, degeneration_ohm }).toEqual(best.parts);
  });

  test('the ramp resistor is the largest that still gives the slope wanted: the next one would not', async () => {
    const { sizing, request } = await designOf(keys);
    const all = whole(request.specification.ramp.series.resistor);
    const slope = (ramp_ohm: number) => (sizing.capacitorSlope_per_s * sizing.sense_ohm) / ramp_ohm;
    const next = all[all.indexOf(sizing.summing_ohm) + 1]!;
    expect(slope(sizing.summing_ohm)).toBeGreaterThanOrEqual(sizing.wantedSlope_per_s * (1 - 1e-9));
    expect(slope(next)).toBeLessThan(sizing.wantedSlope_per_s);
  });

  test('the divider stays at or below the ratio wanted, and no pair of its size comes closer', async () => {
    const { sizing, demand, request } = await designOf(keys);
    const { divider } = sizing;
    const top = demand.track_V.high;
    const supply = request.specification.ramp.supply_V.low;
    const wanted = Math.min(2, supply - 0.2 * supply - 0.4 - 0.8, 0.8 * top) / top;
    const ratio = (lower: number, upper: number) => lower / (lower + divider.upperCount * upper);
    expect(divider.ratio).toBeLessThanOrEqual(wanted);
    expect(divider.lower_ohm * 1e-4).toBeGreaterThan((wanted * top) / 3.3);
    const all = whole(request.specification.ramp.series.resistor);
    const near = (ohm: number) => ohm >= (wanted * top * 1e4) / 3.2 && ohm <= wanted * top * 1e4 * 3.2;
    const closest = Math.max(
      ...all
        .filter(near)
        .flatMap((lower) =>
          all.map((upper) => ratio(lower, upper)).filter((value) => value <= wanted * (1 + 1e-12)),
        ),
    );
    expect(ratio(divider.lower_ohm, divider.upper_ohm) / closest).toBeCloseTo(1, 8);
  });
});

/** Every timing capacitor and every set resistor there is, each with what follows from it. */
function enumerate({ demand, sizing, request }: SizedDesign) {
  const { series: chosen, capacitance_F, supply_V } = request.specification.ramp;
  const resistors = whole(chosen.resistor).filter((value) => value >= 1 && value <= 1e7);
  const atMost = (value: number) => resistors.filter((each) => each <= value * (1 + 1e-12)).at(-1);
  const capacitors =
    capacitance_F === null
      ? whole(chosen.capacitor).filter((value) => value >= 100e-12 && value <= 10e-9)
      : [capacitance_F.nominal];
  const low = supply_V.low;
  const room = low - 0.2 * low - 0.4;
  const mirror = 200 / 201 / (1 + 2 / 200);
  const top = demand.track_V.high;
  const span = demand.track_V.low / top;
  let best = { cost: Number.POSITIVE_INFINITY, parts: {} };
  for (const capacitor of capacitors)
    for (const set_ohm of resistors) {
      const total = capacitor + 9e-12;
      const current = (top * sizing.divider.ratio * mirror) / set_ohm;
      const amplitude = (current / total) * demand.riseTime_s;
      if (current > 1e-3 || current * span < 2e-6 || amplitude < 0.1 * room || amplitude > room) continue;
      const reset = 10e-9 + (Math.log(100) * total) / (0.1 * (low - 1.5));
      if (reset > demand.resetTime_s) continue;
      const emitter = (top * sizing.divider.ratio) / set_ohm;
      const degeneration_ohm = atMost((0.2 * low) / emitter)!;
      const spread = worstSpread(
        spreadCauses(demand, {
          capacitance_F: capacitor,
          totalCapacitance_F: total,
          dividerRatio: sizing.divider.ratio,
          dividerSource_ohm: sizing.divider.source_ohm,
          setVoltageLow_V: sizing.divider.ratio * demand.track_V.low,
          degenerationLow_V: degeneration_ohm * emitter * span,
          chargingCurrentLow_A: current * span,
        }),
      );
      if (amplitude * spread.high > room || spread.low < 0.5) continue;
      const slope = current / total / top;
      const wanted = demand.givenSlope_per_s ?? demand.requiredSlope_per_s / spread.low;
      const summing_ohm = atMost((1000 * slope) / wanted);
      if (summing_ohm === undefined || summing_ohm < 1000 || summing_ohm > 1e6) continue;
      const octaves = (ratio: number) => Math.abs(Math.log2(ratio));
      const cost =
        60 * ((slope * 1000) / summing_ohm / wanted - 1) +
        octaves(capacitor / 470e-12) +
        octaves((amplitude * spread.high) / room / 0.8) +
        0.5 * octaves(current / 250e-6);
      if (cost < best.cost)
        best = { cost, parts: { capacitance_F: capacitor, set_ohm, summing_ohm, degeneration_ohm } };
    }
  return best;
}
