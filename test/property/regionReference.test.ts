/**
 * Figures of the project's own design text for an ideal buck (x_goal = ½ + 1/π, no tolerances, each law at
 * its least gain), through the real region and law code.
 *
 * Tolerance: half of the last digit printed. Each value is derived again by a scan of the region that
 * shares no code with the generator.
 */
import { describe, expect, test } from 'vitest';
import { designResult } from '../../generator/design.ts';
import { cycleRatio } from '../../generator/law/innerLoop.ts';
import { laws } from '../../generator/law/laws.ts';
import { indexExtremes, leastGain } from '../../generator/law/leastGain.ts';
import { loopCorners } from '../../generator/law/loopCorners.ts';
import { buildRegion } from '../../generator/region/buildRegion.ts';
import { powerStageOf } from '../../generator/region/powerStages.ts';
import { designOf, type Keys, requestOf } from '../support/request.ts';

const goal = 0.5 + 1 / Math.PI;
const exact = { low: 1, high: 1 };
const common = { inductance: '10 uH', frequency: '500 kHz', 'goal.dampingIndex': goal };

const cases = {
  'known output': {
    keys: { input: '6 V to 36 V', output: '5 V', maximumDuty: '90 %' },
    scan: [6, 36, 5, 5, 0.9],
  },
  'output from 0.8 V to 30 V': {
    keys: { input: '6 V to 36 V', output: '0.8 V to 30 V', maximumDuty: '85 %' },
    scan: [6, 36, 0.8, 30, 0.85],
  },
  '12 V out of 8 V to 18 V': {
    keys: { input: '8 V to 18 V', output: '12 V', maximumDuty: '100 %' },
    scan: [8, 18, 12, 12, 1],
  },
} as const;

async function figures(name: keyof typeof cases, kind: 'fixed' | 'adaptive') {
  const request = await requestOf({ ...common, ...cases[name].keys } as Keys);
  const { specification } = request;
  const region = buildRegion(request, powerStageOf(specification));
  if (!region.ok) throw new Error('no region');
  const corners = loopCorners(specification, region.value);
  const law = laws[kind === 'adaptive' ? 'vin' : 'fixed'];
  const { gain } = leastGain(law, region.value, corners, goal);
  const extremes = indexExtremes(law, gain, region.value, corners, exact);
  return { gain, low: extremes.min.dampingIndex, high: extremes.max.dampingIndex };
}

/** The same by brute force: a grid of duties between the limits, with the outputs that they mean. */
function scanned(name: keyof typeof cases, kind: 'fixed' | 'adaptive') {
  const [lowest, highest, outLow, outHigh, dutyMax] = cases[name].scan;
  const points: [number, number][] = [];
  for (let i = 0; i <= 3000; i += 1) {
    const input = lowest + ((highest - lowest) * i) / 3000;
    const top = Math.min(outHigh, dutyMax * input);
    if (top < outLow) continue;
    for (let j = 0; j <= 20; j += 1) points.push([input, outLow + ((top - outLow) * j) / 20]);
  }
  const share = (input: number) => (kind === 'fixed' ? 1 / input : 1);
  const gain = Math.max(...points.map(([input, output]) => (goal - 1 + output / input) / share(input)));
  const index = points.map(([input, output]) => 1 - output / input + gain * share(input));
  return { gain, low: Math.min(...index), high: Math.max(...index) };
}

describe.each(Object.keys(cases) as (keyof typeof cases)[])('%s', (name) => {
  test.each(['fixed', 'adaptive'] as const)('the %s law agrees with a scan of the region', async (kind) => {
    const [found, scan] = [await figures(name, kind), scanned(name, kind)];
    // The scan's grid misses the clipped corner by at most one step of input: 0.01 V in 35 V.
    expect(Math.abs(found.gain / scan.gain - 1)).toBeLessThan(4e-4);
    expect(found.gain).toBeGreaterThanOrEqual(scan.gain * (1 - 1e-12));
    expect(found.low).toBeCloseTo(goal, 12);
    expect(Math.abs(found.high / scan.high - 1)).toBeLessThan(4e-4);
  });
});

test.each([
  ['known output', 'fixed', 0.97, 0.0005],
  ['known output', 'adaptive', 1.513, 0.0005],
  ['output from 0.8 V to 30 V', 'fixed', 4.798, 0.0005],
  ['output from 0.8 V to 30 V', 'adaptive', 1.646, 0.0005],
  ['12 V out of 8 V to 18 V', 'fixed', 0.879, 0.0005],
  ['12 V out of 8 V to 18 V', 'adaptive', 1.152, 0.0005],
] as const)('%s: the %s law over-compensates up to x = %f', async (name, kind, printed, halfDigit) => {
  expect(Math.abs((await figures(name, kind)).high - printed)).toBeLessThanOrEqual(halfDigit);
});

test.each([
  ['known output', 'adaptive', 0.652, 0.0005],
  ['output from 0.8 V to 30 V', 'fixed', 23.59, 0.005],
  ['output from 0.8 V to 30 V', 'adaptive', 0.668, 0.0005],
] as const)('%s: the least gain of the %s law is %f', async (name, kind, printed, halfDigit) => {
  expect(Math.abs((await figures(name, kind)).gain - printed)).toBeLessThanOrEqual(halfDigit);
});

test.each([
  ['known output', 'fixed', -0.222, -0.031],
  ['known output', 'adaptive', -0.222, 0.339],
  ['output from 0.8 V to 30 V', 'fixed', -0.222, 0.792],
  ['output from 0.8 V to 30 V', 'adaptive', -0.222, 0.392],
  ['12 V out of 8 V to 18 V', 'adaptive', -0.222, 0.132],
] as const)('%s: α of the %s law runs from %f to %f', async (name, kind, low, high) => {
  const found = await figures(name, kind);
  expect(Math.abs(cycleRatio(found.low) - low)).toBeLessThanOrEqual(0.0005);
  expect(Math.abs(cycleRatio(found.high) - high)).toBeLessThanOrEqual(0.0005);
});

test('30 % less inductance takes x = 0.818 to 0.618 at k = 0.668 and a duty of 0.85', async () => {
  const { gain } = await figures('output from 0.8 V to 30 V', 'adaptive');
  expect(Math.abs(1 - 0.85 + 0.7 * gain - 0.618)).toBeLessThanOrEqual(0.0005);
  const request = await requestOf({
    ...cases['output from 0.8 V to 30 V'].keys,
    'inductance.value': '10 uH',
    'inductance.atPeakLimit': '7 uH',
    frequency: '500 kHz',
  });
  const region = buildRegion(request, powerStageOf(request.specification));
  if (!region.ok) throw new Error('no region');
  const corners = loopCorners(request.specification, region.value);
  const { min } = indexExtremes(laws.vin, gain, region.value, corners, exact);
  expect(Math.abs(min.dampingIndex - 0.618)).toBeLessThanOrEqual(0.0005);
});

describe('the whole design of 6–36 V, 0.8–30 V, maximum duty 0.85, nothing with a tolerance', () => {
  const keys = {
    input: '6 V to 36 V',
    output: '0.8 V to 30 V',
    maximumDuty: '85 %',
    inductance: '10 uH',
    frequency: '500 kHz',
  };

  test('needs k = 0.668', async () => {
    const { law } = designResult(await designOf(keys), [], null);
    expect(Math.abs(law.requiredGain - 0.668)).toBeLessThanOrEqual(0.0005);
    expect(law.requiredGain).toBeCloseTo(goal - 0.15, 12);
  });

  test('realises at least its design gain and at most 5 % more', async () => {
    const { law } = designResult(await designOf(keys), [], null);
    expect(law.gain).toBeGreaterThan(law.requiredGain);
    expect(law.realisedGain).toBeGreaterThanOrEqual(law.gain);
    expect(law.realisedGain).toBeLessThanOrEqual(1.05 * law.gain);
  });
});
