/**
 * Laws of the sizing over random specifications: inputs from 2 V to 400 V, outputs known, ranged, listed or
 * unknown, tolerances, losses, loads, 20 kHz to 3 MHz, 0.1 µH to 10 mH. Judged by the converter's and the
 * circuit's equations as written in test/support, not by the generator's code.
 */
import { describe, expect, test } from 'vitest';
import type { Problem } from '../../generator/base/Problem.ts';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import { designResult, ruleQuantities } from '../../generator/design.ts';
import { deckSet } from '../../generator/emit/deckSet.ts';
import type { RegionPoint } from '../../generator/region/OperatingRegion.ts';
import {
  buckVoltages,
  type Conditions,
  pointAt,
  regionBoxes,
  searchedExtremes,
} from '../support/buckBruteForce.ts';
import { overDesigns, overRefusals } from '../support/randomDesigns.ts';
import { type Keys, requestOf } from '../support/request.ts';

const runs = 240;

/** A unit: how its inductance, sense gain and ramp compare with nominal. */
interface Unit {
  readonly inductance: number;
  readonly senseGain: number;
  readonly ramp: number;
}

function unitsOf(design: SizedDesign, pick: (low: number, high: number) => number): Unit {
  const { inductance, senseGain_V_per_A: gain } = design.request.specification;
  if (inductance?.kind !== 'value') throw new Error('no inductance');
  const least = Math.min(
    inductance.value_H.from.low,
    inductance.atPeakLimit_H?.low ?? Number.POSITIVE_INFINITY,
  );
  return {
    inductance: pick(least, inductance.value_H.to.high),
    senseGain: pick(gain.low, gain.high),
    ramp: pick(design.sizing.spread.low, design.sizing.spread.high),
  };
}

/** Slope at the sense element from the part values [V/s], the ramp's own spread aside. */
function senseSlope(design: SizedDesign, input: number): number {
  const { sizing, demand } = design;
  const strays = 5e-12 + 3e-12 + 1e-12;
  const mirror = 200 / 201 / (1 + 2 / 200);
  const lower = 1 / (1 / sizing.divider.lower_ohm + 1e-9);
  const ratio = lower / (lower + sizing.divider.upperCount * sizing.divider.upper_ohm);
  const track = demand.tracks === 'input' ? input : 2.5;
  const current = (track * ratio * mirror) / sizing.set_ohm;
  return ((current / (sizing.capacitance_F + strays)) * sizing.sense_ohm) / sizing.summing_ohm;
}

function indexAt(design: SizedDesign, at: Conditions, unit: Unit): number {
  const { up, down } = buckVoltages(design.request.specification, at);
  const ramp = unit.ramp * senseSlope(design, at.input);
  return (up + (ramp / unit.senseGain) * unit.inductance) / (up + down);
}

const leastUnit = (design: SizedDesign): Unit => ({
  ...unitsOf(design, (low) => low),
  senseGain: design.request.specification.senseGain_V_per_A.high,
});
const mostUnit = (design: SizedDesign): Unit => ({
  ...unitsOf(design, (_, high) => high),
  senseGain: design.request.specification.senseGain_V_per_A.low,
});

test('no unit at any point of the region is damped less than the goal, nor outside what the design states', async () => {
  let random = 1;
  // Park and Miller's generator: the same units at every run.
  const share = () => {
    random = (random * 48271) % 2147483647;
    return random / 2147483647;
  };
  await overDesigns(runs, (design) => {
    const { specification } = design.request;
    const { min, max } = design.chosen.extremes;
    for (const box of regionBoxes(specification))
      for (let n = 0; n < 300; n += 1) {
        const end = () => (share() < 0.5 ? Math.round(share()) : share());
        const at = pointAt(specification, box, [end(), end(), end(), end(), end()]);
        if (at === null) continue;
        const unit = unitsOf(design, (low, high) => low + end() * (high - low));
        const index = indexAt(design, at, unit);
        expect(index).toBeGreaterThanOrEqual(min.dampingIndex * (1 - 1e-9));
        expect(index).toBeLessThanOrEqual(max.dampingIndex * (1 + 1e-9));
        if (specification.ramp.gain === null)
          expect(index).toBeGreaterThanOrEqual(specification.goal.dampingIndex * (1 - 1e-9));
      }
  });
});

test('no search finds a damping index outside the stated extremes', async () => {
  await overDesigns(runs, (design) => {
    const { specification } = design.request;
    const { min, max } = design.chosen.extremes;
    const least = searchedExtremes(specification, (at) => indexAt(design, at, leastUnit(design)), 'least');
    const most = searchedExtremes(specification, (at) => indexAt(design, at, mostUnit(design)), 'greatest');
    expect(min.dampingIndex).toBeLessThanOrEqual(least + 1e-9);
    expect(max.dampingIndex).toBeGreaterThanOrEqual(most - 1e-9 * most);
  });
});

test('the stated extremes are those of a point of the region: to 1e-6, some unit there has them', async () => {
  await overDesigns(runs, (design) => {
    const { min, max } = design.chosen.extremes;
    for (const [{ at, dampingIndex }, unit] of [
      [min, leastUnit(design)],
      [max, mostUnit(design)],
    ] as const) {
      const point = conditionsOf(design, at);
      expectInside(design, point);
      expect(Math.abs(indexAt(design, point, unit) / dampingIndex - 1)).toBeLessThan(1e-6);
    }
  });
});

/** A region point in the tests' own terms: where its resistances stand between low and high. */
function conditionsOf(design: SizedDesign, at: RegionPoint): Conditions {
  const { losses } = design.request.specification;
  const varying = (['switch_ohm', 'winding_ohm', 'rectifier_ohm'] as const).find(
    (name) => losses !== null && losses[name].high > losses[name].low,
  );
  const heat =
    varying === undefined
      ? 0
      : (at.drops[varying] - losses![varying].low) / (losses![varying].high - losses![varying].low);
  return {
    input: at.inputVoltage_V,
    output: at.outputVoltage_V,
    load: at.loadCurrent_A,
    drop: at.drops.rectifierDrop_V,
    heat,
  };
}

/** Within the limits of some output of the specification, up to rounding. */
function expectInside(design: SizedDesign, at: Conditions): void {
  const { specification } = design.request;
  const { duty } = buckVoltages(specification, at);
  const within = ([low, high]: readonly [number, number], value: number) =>
    value >= low - 1e-9 * Math.abs(high) - 1e-12 && value <= high + 1e-9 * Math.abs(high) + 1e-12;
  const found = regionBoxes(specification).some(
    (box) =>
      within(box.input, at.input) &&
      within(box.load, at.load) &&
      within(box.drop, at.drop) &&
      within([0, 1], at.heat) &&
      within(box.duty, duty) &&
      (box.output === null || within(box.output, at.output)),
  );
  expect(found, JSON.stringify({ ...at, duty })).toBe(true);
}

test('the least gain is the least: a thousandth less misses the goal where it is needed', async () => {
  await overDesigns(runs, (design) => {
    const { required, law } = design.chosen;
    const { specification } = design.request;
    if (required.gain === 0) return;
    const { at } = required;
    const point = {
      input: at.inputVoltage_V,
      output: at.outputVoltage_V,
      load: at.loadCurrent_A,
      drop: at.drops.rectifierDrop_V,
      heat: 0,
    };
    const unit = leastUnit(design);
    if (specification.inductance?.kind !== 'value') throw new Error('no inductance');
    const nominal = specification.inductance.value_H.from.nominal / specification.senseGain_V_per_A.nominal;
    const up = point.input - point.output - point.load * (at.drops.switch_ohm + at.drops.winding_ohm);
    const down = point.output + point.drop + point.load * (at.drops.rectifier_ohm + at.drops.winding_ohm);
    const indexWith = (gain: number) => {
      const slope = (gain * (law.kind === 'fixed' ? 1 : point.input)) / nominal;
      return (up + (slope / unit.senseGain) * unit.inductance) / (up + down);
    };
    const goal = specification.goal.dampingIndex;
    expect(Math.abs(indexWith(required.gain) - goal)).toBeLessThan(
      1e-12 * Math.max(1, 1 / (up + down)) * 1e3,
    );
    expect(indexWith(0.999 * required.gain)).toBeLessThan(goal);
  });
});

test('the realised gain is never below the design gain, and as close above it as the resistor series allows', async () => {
  // Step from a value to the next of each series at its widest.
  const widest = { E12: 1.25, E24: 1.1, E48: 1.055, E96: 1.0285, E192: 1.0135 } as Record<string, number>;
  await overDesigns(runs, (design) => {
    const { gain, realisedGain, required } = design.chosen;
    const series = design.request.specification.ramp.series.resistor;
    expect(realisedGain).toBeGreaterThanOrEqual(gain * (1 - 1e-9));
    expect(realisedGain).toBeLessThanOrEqual(gain * widest[series]!);
    if (design.request.specification.ramp.gain === null)
      expect(gain * design.sizing.spread.low).toBeGreaterThanOrEqual(required.gain * (1 - 1e-9));
  });
});

test('every practical bound of the build holds', async () => {
  await overDesigns(runs, (design) => {
    const { sizing, request, demand } = design;
    const { ramp, maximumDutyRatio, frequency_Hz } = request.specification;
    const supply = ramp.supply_V.low;
    const current = (track: number) => sizing.totalCapacitance_F * (track * sizing.capacitorSlope_per_s);
    const room = supply - 0.2 * supply - 0.4;
    const rise = maximumDutyRatio / frequency_Hz.from.low;
    const amplitude = sizing.capacitorSlope_per_s * demand.track_V.high * rise;
    expect(current(demand.track_V.high)).toBeLessThanOrEqual(1e-3 * (1 + 1e-9));
    expect(current(demand.track_V.low)).toBeGreaterThanOrEqual(2e-6 * (1 - 1e-9));
    expect(amplitude * sizing.spread.high).toBeLessThanOrEqual(room * (1 + 1e-9));
    expect(amplitude).toBeGreaterThanOrEqual(0.1 * room * (1 - 1e-9));
    expect(sizing.summing_ohm).toBeGreaterThanOrEqual(sizing.sense_ohm);
    expect(sizing.summing_ohm).toBeLessThanOrEqual(1e6);
    if (ramp.capacitance_F === null) {
      expect(sizing.capacitance_F).toBeGreaterThanOrEqual(100e-12);
      expect(sizing.capacitance_F).toBeLessThanOrEqual(10e-9);
    } else expect(sizing.capacitance_F).toBe(ramp.capacitance_F.nominal);
    // Set resistor, transistor, emitter-base and the mirror's resistors share the lowest supply.
    const set = sizing.divider.ratio * demand.track_V.high;
    const emitter = (set / sizing.set_ohm) * sizing.degeneration_ohm;
    expect(set + 0.4 + 0.8 + emitter).toBeLessThanOrEqual(supply * (1 + 1e-9));
    const switch_ohm = 1 / (0.1 * (supply - 1.5));
    const reset = Math.log(100) * switch_ohm * sizing.totalCapacitance_F + 10e-9;
    expect(reset).toBeLessThanOrEqual(((1 - maximumDutyRatio) / frequency_Hz.to.high) * (1 + 1e-9));
  });
});

test('nothing that is written of a design is anything but a finite number', async () => {
  await overDesigns(runs, (design) => {
    const { circuit, demand, sizing, region, corners, chosen, alternative } = design;
    const result = designResult(design, [], null);
    const wrong = notFinite({
      circuit,
      demand,
      sizing,
      region,
      corners,
      chosen,
      alternative,
      result,
      quantities: ruleQuantities(design),
    });
    expect(wrong).toEqual([]);
    const decks = deckSet(design);
    for (const text of [
      decks.ramp,
      decks.rampTest.text,
      ...[...decks.converters.values()].map((d) => d.text),
    ])
      expect(text).not.toMatch(/NaN|Infinity|undefined|null/);
  });
});

/** Paths of numbers that are not finite. */
function notFinite(value: unknown, path = ''): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [path];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => notFinite(inner, `${path}.${key}`));
}

describe('a refusal', () => {
  test('has the code no-circuit or impossible, a key, and an inequality that is violated as it is printed', async () => {
    await overRefusals(runs, (_, problems) => {
      expect(problems.length).toBeGreaterThan(0);
      for (const problem of problems) {
        expect(['no-circuit', 'impossible']).toContain(problem.code);
        expect(problem.key).not.toBeNull();
        if (!/: at most /.test(problem.expected)) continue;
        const [limit, received] = [problem.expected.split(': at most ')[1]!, problem.received].map(
          readFigure,
        );
        expect(received).toBeGreaterThanOrEqual(limit!);
      }
    });
  });

  test('gives way to a design or to another refusal when what it names is moved as far as it says', async () => {
    await overRefusals(runs, async (keys, problems) => {
      const relaxed = await requestOf(problems.reduce(relax, keys)).catch(() => null);
      if (relaxed === null) return;
      const after = sizeDesign(relaxed);
      const names = (some: readonly Problem[]) =>
        some.map((p) => `${p.key} ${p.expected.split(':')[0]}`).sort();
      if (!after.ok) expect(names(after.problems)).not.toEqual(names(problems));
    });
  });
});

/** `1.234 kΩ` as 1234. */
function readFigure(text: string): number {
  const [, digits, prefix] = /^(-?[\d.]+(?:e[+-]?\d+)?) ?([fpnµmkMGT]?)(?:[VAsΩFH]|$)/.exec(text)!;
  const powers: Record<string, number> = { f: -15, p: -12, n: -9, µ: -6, m: -3, k: 3, M: 6, G: 9, T: 12 };
  return Number(digits) * 10 ** (powers[prefix!] ?? 0);
}

/** The keys with what a refusal names moved by the ratio or the amount that it states, and a little more. */
function relax(keys: Keys, { key, expected, received, code }: Problem): Keys {
  const scaled = (name: string, factor: number) => ({
    ...keys,
    [name]: scaleText(String(keys[name]), factor),
  });
  if (code === 'impossible') return { ...keys, output: '1 mV', minimumOnTime: '0 s' };
  if (expected.startsWith('goal'))
    return { ...keys, 'goal.dampingIndex': readFigure(expected.split('above ')[1]!) * 1.3 };
  const limit = readFigure(expected.split(': at most ')[1]!);
  const got = readFigure(received);
  const ratio = (got / limit) * 1.03;
  switch (key) {
    case 'maximumDuty':
      return scaled('frequency', 1 / ratio / 1.1);
    case 'frequency':
      return scaled('frequency', 1 / ratio);
    case 'senseGain':
      return scaled('inductance.value', ratio);
    case 'ramp.gain':
      return scaled('inductance.value', 1 / ratio);
    case 'ramp.supply':
      return { ...keys, 'ramp.supply': `${supplyOf(keys) + (1.3 * (got - limit)) / 0.8 + 0.01} V` };
    case 'ramp.capacitance':
      return scaled('ramp.capacitance', /leakage/.test(expected) ? ratio : 1 / ratio);
    case 'ramp.series.resistor':
      return { ...keys, 'ramp.series.resistor': 'E192' };
    case 'input':
      return /voltage across the set/.test(expected) ? scaled('input', ratio) : narrowed(keys, ratio);
  }
  throw new Error(`nothing known to move for ${key}: ${expected}`);
}

function supplyOf(keys: Keys): number {
  return Number.parseFloat(String(keys['ramp.supply'] ?? '5 V'));
}

function scaleText(text: string, factor: number): string {
  const [body, suffix] = text.split(' ±');
  const moved = body!.replace(/[\d.]+/g, (digits) =>
    String(Number((Number(digits) * factor).toPrecision(6))),
  );
  return suffix === undefined ? moved : `${moved} ±${suffix}`;
}

function narrowed(keys: Keys, ratio: number): Keys {
  const [low, high] = [...String(keys.input).matchAll(/[\d.]+/g)].map(Number);
  return { ...keys, input: `${Math.min(low! * ratio, high!)} V to ${high! * 1.0001} V` };
}
