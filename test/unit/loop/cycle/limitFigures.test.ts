import { describe, expect, it } from 'vitest';
import { limitFigures } from '../../../../generator/loop/cycle/limitFigures.ts';
import { buckRun, plainTiming, straightStage } from './runs.ts';

const inputs_V = [6, 9, 12, 24, 36];
const limit = { level_A: 4, seesRamp: true };
const spread = (values: readonly number[]) => Math.max(...values) - Math.min(...values);

/** 5 V from each input, the ramp's slope·L in volts as a law of it. */
const figures = (ramp_V: (input_V: number) => number, delay_s = 0, seesRamp = true) =>
  inputs_V.map(
    (input_V) =>
      limitFigures(
        buckRun({
          stage: straightStage(input_V - 5, 5),
          rampSlope_A_per_s: ramp_V(input_V) / 10e-6,
          limit: { ...limit, seesRamp },
          timing: { ...plainTiming, comparatorDelay_s: delay_s },
        }),
      )!,
  );

describe('the current limit of a synchronous buck', () => {
  it('does not move its peak with the input when the ramp follows the input', () => {
    const peaks = figures((input_V) => 0.65 * input_V).map(({ peak_A }) => peak_A);
    expect(spread(peaks)).toBeLessThan(1e-11);
    expect(peaks[0]).toBeCloseTo(4 - (0.65 * 5 * 2e-6) / 10e-6, 11);
  });

  it('does not move its output current with the input when the ramp is half of the down slope', () => {
    const means = figures(() => 2.5).map(({ meanCurrent_A }) => meanCurrent_A);
    expect(spread(means)).toBeLessThan(1e-11);
    expect(means[0]).toBeCloseTo(4 - (2.5 * 2e-6) / 10e-6, 11);
  });

  it('loses ma·D·T of its peak to a fixed ramp and gains m1·delay', () => {
    for (const [place, { peak_A }] of figures(() => 4, 50e-9).entries()) {
      const input_V = inputs_V[place]!;
      // The ramp stops counting at the trip, a delay before turn-off.
      const lost = (4 / 10e-6) * ((5 / input_V) * 2e-6 - 50e-9);
      expect(peak_A).toBeCloseTo(4 - lost + ((input_V - 5) / 10e-6) * 50e-9, 11);
    }
  });

  it('loses nothing where its clamp follows the ramp', () => {
    for (const { peak_A } of figures(() => 4, 0, false)) expect(peak_A).toBeCloseTo(4, 11);
  });

  it('has no figures without a limit, or where maximum duty comes first', () => {
    expect(limitFigures(buckRun())).toBeNull();
    const timing = { ...plainTiming, maximumDuty: 0.3 };
    expect(limitFigures(buckRun({ limit, timing }))).toBeNull();
  });

  it('gives the others the share of the off-time', () => {
    const { offCurrent_A, meanCurrent_A } = limitFigures(
      buckRun({ stage: straightStage(12, 8), limit, rampSlope_A_per_s: 6e5 }),
    )!;
    expect(offCurrent_A).toBeCloseTo(0.6 * meanCurrent_A, 11);
  });
});
