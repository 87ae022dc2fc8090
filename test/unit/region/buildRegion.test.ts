import { describe, expect, test } from 'vitest';
import { buildRegion } from '../../../generator/region/buildRegion.ts';
import { powerStageOf } from '../../../generator/region/powerStages.ts';
import { type Keys, requestOf } from '../../support/request.ts';

async function attempt(keys: Keys) {
  const request = await requestOf({ inductance: '10 uH', frequency: '500 kHz', ...keys });
  return buildRegion(request, powerStageOf(request.specification));
}

async function regionOf(keys: Keys) {
  const region = await attempt(keys);
  if (!region.ok) throw new Error(JSON.stringify(region.problems));
  return region.value;
}

async function problemsOf(keys: Keys) {
  const region = await attempt(keys);
  return region.ok ? [] : region.problems;
}

describe('an output that is not known', () => {
  test('means every duty from nothing to the maximum at every input', async () => {
    const { duty, outputVoltage_V, vertices, cuts } = await regionOf({ input: '8 V to 36 V' });
    expect(duty).toEqual({ low: 0, high: 0.9 });
    expect(outputVoltage_V).toBeNull();
    expect(vertices.map(({ inputVoltage_V, duty: at }) => [inputVoltage_V, Number(at.toFixed(9))])).toEqual(
      expect.arrayContaining([
        [8, 0],
        [8, 0.9],
        [36, 0],
        [36, 0.9],
      ]),
    );
    expect(cuts).toEqual([]);
  });

  test('keeps its duties when drops and losses are there', async () => {
    const { vertices } = await regionOf({
      input: '8 V to 36 V',
      load: '1 A to 3 A',
      'rectifier.drop': '0.4 V ± 10 %',
      'losses.switch': '100 mOhm ± 20 %',
    });
    const duties = new Set(vertices.map(({ duty }) => Number(duty.toFixed(9))));
    expect([...duties].sort()).toEqual([0, 0.9]);
    expect(vertices).toHaveLength(2 ** 5);
  });

  test('lists the duties below the minimum on-time as skipped, with the peak there', async () => {
    const { duty, cuts } = await regionOf({ input: '8 V to 36 V', minimumOnTime: '100 ns' });
    expect(duty.low).toBeCloseTo(0.05, 12);
    expect(cuts).toHaveLength(1);
    expect(cuts[0]).toMatchObject({
      reason: 'minimum on-time',
      inputVoltage_V: [8, 36],
      outputVoltage_V: null,
    });
    // 36 V across 10 µH for 100 ns.
    expect(cuts[0]!.peakCurrent_A).toBeCloseTo(0.36, 12);
  });

  test('is refused where the switch alone drops more than the input at full load', async () => {
    const problems = await problemsOf({ input: '2 V to 3 V', load: '30 A', 'losses.switch': '100 mOhm' });
    expect(problems).toMatchObject([{ code: 'impossible', key: 'losses', received: '3.00 V' }]);
  });

  test('is refused where the minimum on-time is longer than the longest on-time', async () => {
    const problems = await problemsOf({ input: '8 V to 36 V', minimumOnTime: '2 us' });
    expect(problems).toMatchObject([{ code: 'impossible', key: 'minimumOnTime' }]);
    expect(problems[0]!.expected).toContain('at most 1.80 µs');
  });
});

describe('a known output', () => {
  test('above the lowest input is limited to the inputs that reach it, and says so', async () => {
    const { inputVoltage_V, cuts, duty } = await regionOf({ input: '4 V to 12 V', output: '5 V' });
    expect(inputVoltage_V).toEqual({ low: 4, high: 12 });
    expect(duty.high).toBeCloseTo(0.9, 9);
    expect(cuts).toHaveLength(1);
    expect(cuts[0]!.inputVoltage_V[0]).toBe(4);
    expect(cuts[0]!.inputVoltage_V[1]).toBeCloseTo(5 / 0.9, 9);
  });

  test('of which a part is out of reach at low input: only that part is called cut', async () => {
    const { cuts } = await regionOf({ input: '6 V to 36 V', output: '0.8 V to 30 V', maximumDuty: '85 %' });
    expect(cuts).toHaveLength(1);
    expect(cuts[0]!.outputVoltage_V![0]).toBeCloseTo(6 * 0.85, 9);
    expect(cuts[0]!.outputVoltage_V![1]).toBe(30);
    expect(cuts[0]!.inputVoltage_V[1]).toBeCloseTo(30 / 0.85, 9);
  });

  test('is cut by the unit with the largest drop, not by the nominal one', async () => {
    // Nominal: (5 + 0.2)/(5.7 + 0.2) = 0.881, not cut; at 0.6 V: 5.6/6.3 = 0.889, at full loss beyond 0.9.
    const keys = { input: '5.7 V to 12 V', output: '5 V', load: '1 A', 'losses.switch': '0.1 Ohm ± 90 %' };
    const { cuts } = await regionOf(keys);
    expect((5 / (5.7 - 0.1)).toFixed(3)).toBe('0.893');
    expect(5 / (5.7 - 0.19)).toBeGreaterThan(0.9);
    expect(cuts).toHaveLength(1);
    expect(cuts[0]!.inputVoltage_V[1]).toBeCloseTo(5 / 0.9 + 0.19, 9);
  });

  test('0.3 % below its only input is refused for its duty', async () => {
    expect(await problemsOf({ input: '5.015 V', output: '5 V' })).toMatchObject([
      { code: 'impossible', key: 'output' },
    ]);
  });

  test('whose every duty is below the minimum on-time is refused for that, with the longest that would do', async () => {
    const problems = await problemsOf({ input: '30 V to 36 V', output: '1 V', minimumOnTime: '100 ns' });
    expect(problems).toMatchObject([{ code: 'impossible', key: 'minimumOnTime' }]);
    expect(problems[0]!.expected).toContain('at most 66.7 ns');
    expect((await attempt({ input: '30 V to 36 V', output: '1 V', minimumOnTime: '66.6 ns' })).ok).toBe(true);
    expect((await attempt({ input: '30 V to 36 V', output: '1 V', minimumOnTime: '66.8 ns' })).ok).toBe(
      false,
    );
  });

  test('of a list: each has its own points, and one out of reach is named', async () => {
    const { vertices, outputVoltage_V } = await regionOf({ input: '8 V to 36 V', output: ['3.3 V', '5 V'] });
    expect(new Set(vertices.map(({ outputIndex }) => outputIndex))).toEqual(new Set([0, 1]));
    expect(new Set(vertices.map((vertex) => vertex.outputVoltage_V))).toEqual(new Set([3.3, 5]));
    expect(outputVoltage_V).toEqual({ low: 3.3, high: 5 });
    const problems = await problemsOf({ input: '8 V to 36 V', output: ['3.3 V', '40 V', '50 V'] });
    expect(problems.map(({ received }) => received)).toEqual(['40.0 V', '50.0 V']);
  });

  test('that only a unit between the ends of the drop reaches keeps the point where it just does', async () => {
    // At 33 V and a duty of 0.92 the output 30 V has a drop of 4.5 V·(1 − …): found from D = (30 + Vd)/(33 + Vd).
    const drop = (0.92 * 33 - 30) / (1 - 0.92);
    const { vertices } = await regionOf({
      input: '33 V',
      output: '30 V',
      maximumDuty: '92 %',
      'rectifier.drop': '4.5 V ± 10 %',
    });
    expect(drop).toBeCloseTo(4.5, 9);
    expect(Math.max(...vertices.map(({ drops }) => drops.rectifierDrop_V))).toBeCloseTo(4.5, 9);
    expect(Math.max(...vertices.map(({ duty }) => duty))).toBeCloseTo(0.92, 9);
  });
});

test('one input and one output make one point', async () => {
  const { vertices, cuts } = await regionOf({ input: '12 V', output: '5 V' });
  expect(vertices).toHaveLength(1);
  expect(vertices[0]).toMatchObject({ up_V: 7, down_V: 5, swing_V: 12 });
  expect(cuts).toEqual([]);
});

test('where pulses are skipped the peak is the whole rise at light load, half of it on top of a heavy one', async () => {
  const keys = { input: '30 V to 36 V', output: '1.9 V', minimumOnTime: '120 ns' };
  const peak = async (more: Keys) => (await regionOf({ ...keys, ...more })).cuts[0]!.peakCurrent_A!;
  const rise = ((36 - 1.9) / 10e-6) * 120e-9;
  expect(await peak({ load: '10 mA' })).toBeCloseTo(rise, 12);
  expect(await peak({ load: '10 mA to 3 A' })).toBeCloseTo(3 + rise / 2, 12);
});
