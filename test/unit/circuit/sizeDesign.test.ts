import { describe, expect, test } from 'vitest';
import { rampFigures, rampTiming } from '../../../generator/circuit/rampFigures.ts';
import { sizeDesign } from '../../../generator/circuit/sizeDesign.ts';
import { tripSignals } from '../../../generator/circuit/tripSignals.ts';
import { designAssumptions } from '../../../generator/emit/designAssumptions.ts';
import { designOf, type Keys, requestOf } from '../../support/request.ts';

const common = { input: '8 V to 36 V', inductance: '10 uH', frequency: '500 kHz' };

async function problemsOf(keys: Keys) {
  const outcome = sizeDesign(await requestOf({ ...common, ...keys }));
  return outcome.ok ? [] : outcome.problems;
}

describe('what has no circuit is refused with the inequality', () => {
  test.each<[string, Keys, string, RegExp]>([
    ['a duty of one leaves no time to reset', { maximumDuty: '100 %' }, 'maximumDuty', /time to reset/],
    ['a supply that turns no gate on', { 'ramp.supply': '1.5 V' }, 'ramp.supply', /gate voltage/],
    [
      'a supply that mirror and transistor use up',
      { 'ramp.supply': '1.95 V' },
      'ramp.supply',
      /set resistor/,
    ],
    ['an input that is no voltage to divide', { input: '0.3 V to 0.4 V' }, 'input', /set resistor/],
    [
      'a sense gain that asks for more ramp than there is',
      { senseGain: '1 Ohm' },
      'senseGain',
      /capacitor amplitude/,
    ],
    ['a ramp lost in noise', { inductance: '10 mH', senseGain: '1 mOhm' }, 'ramp.gain', /summing resistors/],
    [
      'a goal that the region meets by itself',
      { output: '1 V', maximumDuty: '15 %' },
      'ramp.gain',
      /without any ramp/,
    ],
    [
      'a capacitor too large for the current',
      { 'ramp.capacitance': '1 uF' },
      'ramp.capacitance',
      /charging current/,
    ],
    [
      'a capacitor too small for it',
      { 'ramp.capacitance': '100 pF', frequency: '20 kHz', inductance: '250 uH' },
      'ramp.capacitance',
      /leakage/,
    ],
  ])('%s', async (_, keys, key, words) => {
    const problems = await problemsOf(keys);
    expect(problems.map((problem) => problem.code)).toContain('no-circuit');
    const found = problems.filter((problem) => problem.key === key).map((problem) => problem.expected);
    expect(found.join('\n')).toMatch(words);
  });

  test('no inductance, no circuit', async () => {
    const outcome = sizeDesign(await requestOf({ input: '8 V to 36 V', frequency: '500 kHz' }));
    expect(outcome.ok ? [] : outcome.problems).toMatchObject([{ code: 'missing-key', key: 'inductance' }]);
  });
});

describe('what the designer has settled', () => {
  test('a gain is met from above and judged, even where it misses the goal', async () => {
    const { chosen } = await designOf({ ...common, 'ramp.gain': 0.5 });
    expect(chosen.gain).toBeCloseTo(0.5, 12);
    expect(chosen.realisedGain).toBeGreaterThanOrEqual(0.5);
    expect(chosen.required.gain).toBeGreaterThan(0.5);
    expect(chosen.extremes.min.dampingIndex).toBeLessThan(0.5 + 1 / Math.PI);
  });

  test('a gain builds a ramp that the region would not need', async () => {
    const { chosen } = await designOf({ ...common, output: '1 V', maximumDuty: '15 %', 'ramp.gain': 0.4 });
    expect(chosen.required.gain).toBe(0);
    expect(chosen.realisedGain).toBeGreaterThanOrEqual(0.4);
  });

  test('a capacitance is taken with its own tolerance, and claims no series that it is not of', async () => {
    const tight = await designOf({ ...common, 'ramp.capacitance': '500 pF ± 1 %' });
    const loose = await designOf({ ...common, 'ramp.capacitance': '500 pF ± 10 %' });
    const capacitor = loose.circuit.components.find(({ reference }) => reference === 'C1')!;
    expect(capacitor).toMatchObject({ value: 500e-12, series: null });
    expect(capacitor.toleranceRatio).toBeCloseTo(0.1, 12);
    expect(loose.chosen.gain).toBeGreaterThan(1.05 * tight.chosen.gain);
  });

  test('a capacitance without a tolerance is still ordered within that of its class', async () => {
    const { circuit } = await designOf({ ...common, 'ramp.capacitance': '470 pF' });
    const capacitor = circuit.components.find(({ reference }) => reference === 'C1')!;
    expect(capacitor).toMatchObject({ value: 470e-12, series: 'E12', toleranceRatio: 0.02 });
  });
});

test('the least signal at the trip is that of the faintest unit: largest inductance, least gain, highest frequency', async () => {
  const design = await designOf({
    ...common,
    inductance: '10 uH to 22 uH ± 20 %',
    frequency: '500 kHz ± 10 %',
    senseGain: '50 mOhm ± 5 %',
    output: '5 V',
    load: '0.5 A to 3 A',
  });
  const attenuation = design.sizing.summing_ohm / (design.sizing.summing_ohm + 1000);
  const peaks = [8, 36].map((input) => {
    const ripple = (((input - 5) / 26.4e-6) * (5 / input)) / 550e3;
    return 0.5 >= ripple / 2 ? 0.5 + ripple / 2 : Math.sqrt(2 * 0.5 * ripple);
  });
  expect(tripSignals(design).leastSignal_V! / (0.0475 * attenuation * Math.min(...peaks))).toBeCloseTo(1, 9);
});

test('a discontinuous peak carries the load: the triangle of the same slopes has it as its mean', async () => {
  const design = await designOf({ ...common, output: '5 V', load: '50 mA to 3 A', senseGain: '100 mOhm' });
  const [first] = tripSignals(design).ends;
  const attenuation = design.sizing.summing_ohm / (design.sizing.summing_ohm + 1000);
  const peak = first.signal_V! / attenuation / 0.1;
  const up = 3 / 10e-6;
  const down = 5 / 10e-6;
  // Area of the triangle over the period.
  expect((0.5 * peak * (peak / up + peak / down)) / 2e-6).toBeCloseTo(0.05, 9);
});

test('the amplitude is the swing with the residual, less what the clock edge takes', async () => {
  const design = await designOf(common);
  const figures = rampFigures(design, 36);
  const { rise_s } = rampTiming(design);
  expect(rise_s).toBeCloseTo(1.8e-6, 15);
  expect(figures.residual_V).toBeGreaterThan(figures.chargingCurrent_A / (0.1 * (5 - 1.5)) - 1e-12);
  expect(figures.residual_V).toBeLessThan(figures.amplitude_V / 100);
  // The clock falls and rises within 1/230 of 2 µs; the switch lets go at 1.5 V of 5 V.
  const edge_s = 2e-6 / 230;
  const swing = figures.capacitorSlope_V_per_s * (rise_s - edge_s * (1 - 1.5 / 5) - edge_s);
  const taken = swing + figures.residual_V - figures.amplitude_V;
  // The gate-drain capacitance takes no more than its share of the whole edge, and no less than of its end.
  expect(taken).toBeLessThan((1e-12 / design.sizing.totalCapacitance_F) * 5);
  expect(taken).toBeGreaterThan((1e-12 / design.sizing.totalCapacitance_F) * 1.5);
});

describe('assumptions', () => {
  const assumptionOf = async (key: string, keys: Keys) =>
    designAssumptions(await designOf({ ...common, ...keys })).find((assumption) => assumption.key === key);

  test('30 % less inductance at the peak is weighed over the whole region, not only where x was least', async () => {
    const keys = { output: '5 V', 'ramp.law': 'fixed', 'goal.dampingIndex': 0.9 };
    const design = await designOf({ ...common, ...keys });
    const worst = [8, 36].map((input) => {
      const ramp = design.chosen.realisedGain * design.sizing.spread.low;
      return (input - 5 + 0.7 * ramp) / input;
    });
    const { value } = (await assumptionOf('inductance.atPeakLimit', keys))!;
    expect(value as number).toBeCloseTo(Math.min(...worst), 9);
  });

  test('losses that no load gives effect are an assumption too', async () => {
    const found = await assumptionOf('losses', { 'losses.switch': '40 mOhm' });
    expect(found?.reason).toContain('without a load');
    expect(await assumptionOf('losses', { 'losses.switch': '40 mOhm', load: '3 A' })).toBeUndefined();
  });
});
