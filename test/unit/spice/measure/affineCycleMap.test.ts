import { describe, expect, it } from 'vitest';
import { affineCycleMap } from '../../../../generator/spice/measure/affineCycleMap.ts';

/** Samples of i[n+1] = α·i[n] + c, with an amount added between n and n+1 for each n in `kicks`. */
function cycles(alpha: number, c: number, kicks: Readonly<Record<number, number>>, count = 40): number[] {
  const samples = [c / (1 - alpha)];
  for (let n = 0; n < count; n++) samples.push(alpha * samples[n]! + c + (kicks[n] ?? 0));
  return samples;
}

/** A fixed sequence in ±1, of no pattern that matters here. */
function noise(count: number): number[] {
  let state = 12345;
  return Array.from({ length: count }, () => {
    state = (state * 1103515245 + 12345) % 2 ** 31;
    return state / 2 ** 30 - 1;
  });
}

const KICKS = { 5: 0.1, 15: -0.08, 25: 0.06 };
const SKIPPED = Object.keys(KICKS).map(Number);

describe('the map from one clock edge to the next', () => {
  it.each([-1.2, -1 / 3, -0.02, 0, 0.2, 0.792])('has the slope %s that made the samples', (alpha) => {
    const { slope, intercept, residual } = affineCycleMap(cycles(alpha, 0.7, KICKS), SKIPPED);
    expect(slope).toBeCloseTo(alpha, 9);
    expect(intercept).toBeCloseTo(0.7, 9);
    expect(residual).toBeLessThan(1e-12);
  });

  it('is off where a perturbed pair is left in', () => {
    const { slope, residual } = affineCycleMap(cycles(-0.333, 0.7, KICKS), [5, 15]);
    expect(Math.abs(slope + 0.333)).toBeGreaterThan(0.002);
    expect(residual).toBeGreaterThan(0.005);
  });

  it('withstands noise a hundred times below the perturbation, and tells its size', () => {
    const disturbance = noise(200);
    const clean = cycles(-0.333, 0.7, { ...KICKS, 45: 0.1, 65: -0.1, 90: 0.1 }, 120);
    const noisy = clean.map((sample, n) => sample + 1e-3 * disturbance[n]!);
    const { slope, residual, spread } = affineCycleMap(noisy, [...SKIPPED, 45, 65, 90]);
    expect(Math.abs(slope + 0.333)).toBeLessThan(0.02);
    expect(residual).toBeGreaterThan(2e-4);
    expect(residual).toBeLessThan(1.2e-3);
    expect(spread).toBeGreaterThan(10 * residual);
  });

  it('of alternating samples is −1: the edge of stability', () => {
    expect(affineCycleMap([1, 3, 1, 3, 1, 3]).slope).toBeCloseTo(-1, 12);
  });

  it('is none without a perturbation, with one pair, or with numbers that are none', () => {
    expect(() => affineCycleMap([2, 2, 2, 2])).toThrow(RangeError);
    expect(() => affineCycleMap([2, 1])).toThrow(RangeError);
    expect(() => affineCycleMap([2, 1, 0.5], [0])).toThrow(RangeError);
    expect(() => affineCycleMap([2, Number.NaN, 0.5, 1])).toThrow(RangeError);
  });
});
