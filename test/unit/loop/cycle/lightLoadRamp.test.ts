import { describe, expect, it } from 'vitest';
import { capacitorStage } from '../../../../generator/loop/cycle/capacitorStage.ts';
import { lightLoadRampForAll, lightLoadRampShare } from '../../../../generator/loop/cycle/lightLoadRamp.ts';
import { cycleJacobian } from '../../../../generator/loop/cycle/measuredCycleRatio.ts';
import { periodicOrbit } from '../../../../generator/loop/cycle/periodicOrbit.ts';
import { runCycles } from '../../../../generator/loop/cycle/runCycles.ts';
import { buckRun, capacitorElements, plainTiming } from './runs.ts';
import { eigenvalues } from './saltation.ts';

/** A buck deep in discontinuous conduction on a large capacitor: 30 Ω at 10 V/M. */
function lightRun(conversionRatio: number, share: number) {
  const output_V = 10;
  const elements = capacitorElements('buck', {
    inputVoltage_V: output_V / conversionRatio,
    capacitance_F: 100e-6,
    seriesResistance_ohm: 0,
    loadConductance_S: 1 / 300,
  });
  const run = buckRun({
    rampSlope_A_per_s: (share * output_V) / 10e-6,
    initial: [0, output_V],
    control_A: 0.2,
    timing: { ...plainTiming, rectifies: true },
  });
  return { ...run, stage: capacitorStage(elements) };
}

/** The slow eigenvalue of the orbit at 10 V; the fast one is 0, for the current begins at zero. */
function slowEigenvalue(conversionRatio: number, share: number): number {
  const run = lightRun(conversionRatio, share);
  const orbit = periodicOrbit(run, { quantity: 'mean', state: 1, value: 10 })!;
  expect(orbit.cycle.conduction_s[0]).toBeLessThan(0.9 * 2e-6);
  return Math.max(...eigenvalues(cycleJacobian(run, orbit)).map(({ re }) => re));
}

describe('a buck in discontinuous conduction', () => {
  it('without a ramp is unstable at low frequency above a conversion ratio of 2/3, and only there', () => {
    expect(slowEigenvalue(0.655, 0)).toBeLessThan(1);
    expect(slowEigenvalue(0.678, 0)).toBeGreaterThan(1);
  });

  it('is cured by the ramp share of the formula, no less', () => {
    for (const conversionRatio of [0.72, lightLoadRampForAll.conversionRatio, 0.9]) {
      const share = lightLoadRampShare(conversionRatio);
      expect(slowEigenvalue(conversionRatio, share * 1.03)).toBeLessThan(1);
      expect(slowEigenvalue(conversionRatio, share * 0.97)).toBeGreaterThan(1);
    }
  });

  it('drifts away from its output without the ramp and comes back with it', () => {
    const shiftedBy = (share: number) => {
      const run = lightRun(0.8, share);
      const orbit = periodicOrbit(run, { quantity: 'mean', state: 1, value: 10 })!;
      const { edges } = runCycles({
        ...run,
        control_A: orbit.control_A,
        initial: [0, orbit.state[1]! - 0.05],
        cycles: 60_000,
      });
      return Math.abs(edges[1]![60_000]! - orbit.state[1]!);
    };
    expect(shiftedBy(0)).toBeGreaterThan(0.2);
    expect(shiftedBy(lightLoadRampForAll.share * 1.5)).toBeLessThan(0.01);
  });
});

describe('the ramp that cures it', () => {
  it('is nothing up to 2/3, and greatest at 2√2 − 2 with 0.086 of the down slope', () => {
    expect(lightLoadRampShare(0.6)).toBe(0);
    expect(lightLoadRampShare(2 / 3)).toBeCloseTo(0, 12);
    const { share, conversionRatio } = lightLoadRampForAll;
    expect(share).toBeCloseTo(0.086, 3);
    expect(lightLoadRampShare(conversionRatio)).toBeCloseTo(share, 12);
    for (let M = 0.01; M < 1; M += 0.01) expect(lightLoadRampShare(M)).toBeLessThanOrEqual(share);
    expect(() => lightLoadRampShare(1)).toThrow(RangeError);
  });
});
