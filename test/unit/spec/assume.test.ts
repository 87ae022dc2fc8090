import { expect, test } from 'vitest';
import { exactly } from '../../../generator/base/Quantity.ts';
import { specKeys } from '../../../generator/spec/keys/specKeys.ts';
import { accepted, least } from './reading.ts';

const assumed = async (text: string) =>
  new Map((await accepted({ text })).assumptions.map((assumption) => [assumption.key, assumption]));

test('what is left out is filled in, and listed with a reason', async () => {
  const assumptions = await assumed(
    'input: 8 V to 36 V\nfrequency: 500 kHz ± 10 %\ninductance: 10 uH ± 20 %',
  );
  expect([...assumptions.values()].map(({ key, value, unit }) => [key, value, unit])).toEqual([
    ['converter', 'buck', ''],
    ['output', null, 'V'],
    ['inductance.atPeakLimit', null, 'H'],
    ['maximumDuty', 0.9, ''],
    ['load', null, 'A'],
    ['rectifier.drop', 0, 'V'],
    ['losses', null, 'Ω'],
    ['minimumOnTime', 0, 's'],
    ['senseGain', 0.1, 'V/A'],
    ['controller.internalRamp', 0, 'V/s'],
    ['goal.dampingQ', 1, ''],
    ['goal.ceiling', 1.5, ''],
    ['goal.signalFloor', 0.02, 'V'],
    ['ramp.law', 'vin', ''],
    ['ramp.build', 'auto', ''],
    ['ramp.injection', 'sense', ''],
    ['ramp.series.resistor', 'E96', ''],
    ['ramp.series.capacitor', 'E12', ''],
    ['ramp.supply', 5, 'V'],
    ['ramp.follows', 'nothing', ''],
    ['ramp.reset', 'clock', ''],
  ]);
  expect(assumptions.get('output')?.reason).toContain('every duty up to the maximum');
  expect(assumptions.get('ramp.supply')?.reason).toContain('5 V ± 5 %');
});

test('a value without a tolerance is exact, and listed; a range of limits is not', async () => {
  const exact = await assumed(
    'input: 8 V to 36 V\nfrequency: 500 kHz\ninductance: 4.7 uH to 22 uH\nload: 1 A to 3 A',
  );
  expect(exact.get('frequency')).toMatchObject({
    value: 500e3,
    unit: 'Hz',
    reason: expect.stringContaining('exact'),
  });
  expect(exact.get('inductance')).toMatchObject({ value: '4.7 µH to 22 µH' });
  expect(exact.has('input')).toBe(false);
  expect(exact.has('load')).toBe(false);
  expect((await assumed('input: 12 V\nfrequency: 500 kHz ± 0 %')).has('frequency')).toBe(false);
  expect((await assumed('input: 12 V\nfrequency: 500 kHz ± 0 %')).get('input')).toMatchObject({ value: 12 });
});

test('a goal of Q ≤ 1 is a damping index of ½ + 1/π', async () => {
  const { specification } = await accepted({ text: least });
  expect(specification.goal.dampingIndex).toBeCloseTo(0.8183, 4);
});

test('with a damping index given, no Q is assumed', async () => {
  expect((await assumed(`${least}goal: { dampingIndex: 0.9 }`)).has('goal.dampingQ')).toBe(false);
});

test('of losses given in part the rest is none; of none given the duty is ideal', async () => {
  const { specification, assumptions } = await accepted({
    text: `${least}losses: { switch: 40 mOhm ± 10 % }`,
  });
  expect(specification.losses).toMatchObject({ winding_ohm: exactly(0), rectifier_ohm: exactly(0) });
  expect(assumptions.map(({ key }) => key)).toEqual(
    expect.arrayContaining(['losses.winding', 'losses.rectifier']),
  );
  expect((await accepted({ text: least })).specification.losses).toBeNull();
});

test('a capacitor without series resistance is ideal', async () => {
  const { specification } = await accepted({
    text: `${least}outputCapacitor: { capacitance: 10 uF ± 20 % }`,
  });
  expect(specification.outputCapacitor?.seriesResistance_ohm.to).toEqual(exactly(0));
});

test.each([
  ['buck', '', 0.9],
  ['forward', '', 0.5],
  ['forward', 'stage: single', 0.5],
  ['forward', 'stage: two-switch', 0.5],
  ['forward', 'stage: full-bridge', 0.9],
])('%s %s: maximum duty %d', async (converter, stage, duty) => {
  const { specification } = await accepted({ text: `${least}converter: ${converter}\n${stage}` });
  expect(specification.maximumDutyRatio).toBe(duty);
});

test('equal turns are assumed of a transformer only', async () => {
  expect((await assumed(`${least}converter: flyback`)).get('turnsRatio')).toMatchObject({ value: 1 });
  expect((await assumed(least)).has('turnsRatio')).toBe(false);
});

test('nobody who names no limit is told what it sees', async () => {
  expect((await assumed(`${least}controller: { blankingTime: 40 ns }`)).has('controller.limitSeesRamp')).toBe(
    false,
  );
  const limited = await assumed(`${least}controller: { senseLimit: 250 mV }`);
  expect(limited.get('controller.limitSeesRamp')).toMatchObject({ value: 'yes' });
});

test('every reason says why in a sentence of its own', () => {
  const texts = specKeys.flatMap(({ assumed }) => (typeof assumed === 'object' ? [assumed.reason] : []));
  for (const reason of texts) expect(reason.length).toBeGreaterThan(20);
});
