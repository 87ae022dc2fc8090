import { outerInterval } from '../base/Quantity.ts';
import type { Specification } from '../spec/Specification.ts';
import { leastDuty } from './buildRegion.ts';
import { boxCorners } from './clipBox.ts';
import { inputAtDuty, outputAtDuty } from './dutyInverse.ts';
import type { RegionCut } from './OperatingRegion.ts';
import type { PowerStage, StageDrops } from './PowerStage.ts';
import { dropsAt } from './stageDrops.ts';

type Ends = readonly [number, number];

/**
 * What the asked-for region loses to the maximum duty and to the minimum on-time, per output voltage.
 *
 * Each as the least box of input and output that holds all that is lost, by the unit and load that lose
 * most: with input and output on a line of constant duty, the corner of that box is kept.
 */
export function regionCuts(specification: Specification, stage: PowerStage): readonly RegionCut[] {
  if (specification.output_V === null) return skippingAtAnyOutput(specification, stage);
  return specification.output_V.flatMap((span) => {
    const { low, high } = outerInterval(span);
    return [
      ...dropoutCut(specification, stage, [low, high]),
      ...skippingCut(specification, stage, [low, high]),
    ];
  });
}

function dropoutCut(specification: Specification, stage: PowerStage, output: Ends): RegionCut[] {
  const limitDuty = specification.maximumDutyRatio;
  const input = outerInterval(specification.input_V);
  const units = conditions(specification).map((unit) => dutyLine(stage, unit, limitDuty));
  const needed = Math.max(...units.map((line) => line.inputFor(output[1])));
  if (needed <= input.low * (1 + 1e-9)) return [];
  const kept = Math.min(...units.map((line) => line.outputFrom(input.low)));
  return [
    {
      reason: 'maximum duty',
      inputVoltage_V: [input.low, Math.min(needed, input.high)],
      outputVoltage_V: [Math.max(kept, output[0]), output[1]],
      limitDuty,
      peakCurrent_A: null,
    },
  ];
}

function skippingCut(specification: Specification, stage: PowerStage, output: Ends): RegionCut[] {
  const limitDuty = leastDuty(specification);
  const input = outerInterval(specification.input_V);
  const units = conditions(specification).map((unit) => dutyLine(stage, unit, limitDuty));
  const needed = Math.min(...units.map((line) => line.inputFor(output[0])));
  if (needed >= input.high * (1 - 1e-9)) return [];
  const kept = Math.max(...units.map((line) => line.outputFrom(input.high)));
  return [
    {
      reason: limitDuty > 0 ? 'minimum on-time' : 'input above the output',
      inputVoltage_V: [Math.max(needed, input.low), input.high],
      outputVoltage_V: [output[0], Math.min(kept, output[1])],
      limitDuty,
      peakCurrent_A: limitDuty > 0 ? skippingPeak(specification, stage, input.high, output[0]) : null,
    },
  ];
}

/** Where every duty is asked for, those below the least are lost at every input. */
function skippingAtAnyOutput(specification: Specification, stage: PowerStage): RegionCut[] {
  const limitDuty = leastDuty(specification);
  if (limitDuty === 0) return [];
  const { low, high } = outerInterval(specification.input_V);
  return [
    {
      reason: 'minimum on-time',
      inputVoltage_V: [low, high],
      outputVoltage_V: null,
      limitDuty,
      peakCurrent_A: skippingPeak(specification, stage, high, 0),
    },
  ];
}

interface Conditions {
  readonly loadCurrent_A: number;
  readonly drops: StageDrops;
}

/** Every end of load and drops. */
function conditions(specification: Specification): Conditions[] {
  const { load_A, rectifierDrop_V } = specification;
  const load = load_A ? outerInterval(load_A) : { low: 0, high: 0 };
  return boxCorners([load, rectifierDrop_V, { low: 0, high: 1 }]).map(([loadCurrent_A, drop_V, share]) => ({
    loadCurrent_A: loadCurrent_A!,
    drops: dropsAt(specification, drop_V!, share!),
  }));
}

/** Inputs and outputs that meet at one duty. */
function dutyLine(stage: PowerStage, { loadCurrent_A, drops }: Conditions, duty: number) {
  const point = { inputVoltage_V: 1, outputVoltage_V: 0, loadCurrent_A };
  return {
    inputFor: (outputVoltage_V: number) => inputAtDuty(stage, { ...point, outputVoltage_V }, drops, duty),
    outputFrom: (inputVoltage_V: number) => outputAtDuty(stage, { ...point, inputVoltage_V }, drops, duty),
  };
}

/**
 * Largest peak where pulses are skipped: load plus half of the rise in the least on-time, or from zero the
 * whole rise, whichever is more; at the steepest rise.
 */
function skippingPeak(
  specification: Specification,
  stage: PowerStage,
  inputVoltage_V: number,
  outputVoltage_V: number,
): number | null {
  const { inductance, load_A, minimumOnTime_s } = specification;
  if (inductance?.kind !== 'value') return null;
  const least_H = Math.min(inductance.value_H.from.low, inductance.atPeakLimit_H?.low ?? Infinity);
  const peaks = conditions(specification).map(({ loadCurrent_A, drops }) => {
    const { up_V } = stage.inductorVoltages({ inputVoltage_V, outputVoltage_V, loadCurrent_A }, drops);
    const rise_A = (up_V / least_H) * minimumOnTime_s.high;
    return load_A === null
      ? rise_A
      : Math.max(rise_A, loadCurrent_A * stage.currentRatio(leastDuty(specification)) + rise_A / 2);
  });
  return Math.max(...peaks);
}
