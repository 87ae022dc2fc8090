import { describe, expect, it } from 'vitest';
import type { SizedDesign, SizedLaw } from '../../../generator/circuit/SizedDesign.ts';
import { indexBand, regionSlice, regionSlices } from '../../../generator/report/regionSlice.ts';
import { oneOutput, sized, unknownOutput } from './sampleDesign.ts';

const adjustable =
  'input: 9 V to 60 V\noutput: 0.8 V to 30 V\ninductance: 47 uH ± 20 %\nfrequency: 150 kHz ± 10 %\n' +
  'senseGain: 50 mV/A ± 5 %\nload: 0.3 A to 3 A\nrectifier: { drop: 0.4 V ± 0.1 V }\n';

function bandAt(design: SizedDesign, input: number) {
  return indexBand(design, design.chosen, regionSlice(design.region, input));
}

function bandOf(design: SizedDesign, law: SizedLaw) {
  return regionSlices(design.region).flatMap((slice) => indexBand(design, law, slice) ?? []);
}

describe('the band of the damping index over the input', () => {
  it.each([unknownOutput, oneOutput, adjustable])('has the extremes of the sizing: %s', async (text) => {
    const design = await sized(text);
    for (const law of [design.chosen, design.alternative]) {
      const band = bandOf(design, law);
      expect(Math.min(...band.map(({ low }) => low))).toBeCloseTo(law.extremes.min.dampingIndex, 9);
      expect(Math.max(...band.map(({ high }) => high))).toBeCloseTo(law.extremes.max.dampingIndex, 9);
    }
  });

  it('is D′ + k for the ideal buck whose ramp follows the input, the same at every input', async () => {
    const design = await sized(unknownOutput);
    const { realisedGain } = design.chosen;
    for (const input of [8, 15.3, 36]) {
      const band = bandAt(design, input)!;
      expect(band.low).toBeCloseTo(1 - 0.9 + realisedGain * design.sizing.spread.low, 9);
      expect(band.high).toBeCloseTo(1 + realisedGain * design.sizing.spread.high, 9);
    }
  });

  it('is 1 − Vout/Vin + S·L/Vin for the ideal buck with a fixed ramp', async () => {
    const design = await sized(`${oneOutput}ramp: { law: fixed }\n`);
    const input = 20;
    const ramp_V = design.chosen.realisedGain * design.sizing.spread.low;
    expect(bandAt(design, input)!.low).toBeCloseTo(1 - 5 / input + ramp_V / input, 9);
  });

  it('ends where the output cannot be reached at maximum duty', async () => {
    const design = await sized(oneOutput.replace('8 V', '4 V'));
    expect(bandAt(design, 5)).toBeNull();
    expect(bandAt(design, 5.6)).not.toBeNull();
    expect(bandOf(design, design.chosen)[0]!.inputVoltage_V).toBeCloseTo(5 / 0.9, 9);
  });

  it('keeps to the input that was asked for, and to duties within the maximum', async () => {
    const design = await sized(adjustable);
    const slice = regionSlice(design.region, 25);
    expect(slice.length).toBeGreaterThan(0);
    for (const point of slice) {
      expect(point.inputVoltage_V).toBe(25);
      expect(point.duty).toBeLessThanOrEqual(0.9 + 1e-9);
    }
  });
});
