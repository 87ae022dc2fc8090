import { outerInterval } from '../base/Quantity.ts';
import type { Specification } from '../spec/Specification.ts';
import { leastDuty } from './buildRegion.ts';
import { inputAtDuty } from './dutyInverse.ts';
import type { RegionCut } from './OperatingRegion.ts';
import type { PowerStage } from './PowerStage.ts';
import { nominalDrops } from './stageDrops.ts';

/**
 * What the asked-for region loses to the maximum duty and to the minimum on-time, per output voltage.
 *
 * Both are stated at the end of the output range where they bite first, for a nominal unit at full load.
 */
export function regionCuts(specification: Specification, stage: PowerStage): readonly RegionCut[] {
  if (specification.output_V === null) return [];
  return specification.output_V.flatMap((span) => {
    const output = outerInterval(span);
    return [
      ...dropoutCut(specification, stage, [output.low, output.high]),
      ...skippingCut(specification, stage, [output.low, output.high]),
    ];
  });
}

type Ends = readonly [number, number];

function dropoutCut(specification: Specification, stage: PowerStage, output: Ends): RegionCut[] {
  const limitDuty = specification.maximumDutyRatio;
  const input = outerInterval(specification.input_V);
  const needed = neededInput(specification, stage, output[1], limitDuty);
  if (needed <= input.low * (1 + 1e-9)) return [];
  return [
    {
      reason: 'maximum duty',
      inputVoltage_V: [input.low, Math.min(needed, input.high)],
      outputVoltage_V: output,
      limitDuty,
      peakCurrent_A: null,
    },
  ];
}

function skippingCut(specification: Specification, stage: PowerStage, output: Ends): RegionCut[] {
  const limitDuty = leastDuty(specification);
  const input = outerInterval(specification.input_V);
  const needed = neededInput(specification, stage, output[0], limitDuty);
  if (needed >= input.high * (1 - 1e-9)) return [];
  return [
    {
      reason: limitDuty > 0 ? 'minimum on-time' : 'input above the output',
      inputVoltage_V: [Math.max(needed, input.low), input.high],
      outputVoltage_V: output,
      limitDuty,
      peakCurrent_A: limitDuty === 0 ? null : skippingPeak(specification, stage, input.high, output[0]),
    },
  ];
}

function neededInput(
  specification: Specification,
  stage: PowerStage,
  outputVoltage_V: number,
  duty: number,
): number {
  const loadCurrent_A = specification.load_A?.to.nominal ?? 0;
  const point = { inputVoltage_V: 1, outputVoltage_V, loadCurrent_A };
  return inputAtDuty(stage, point, nominalDrops(specification), duty);
}

/** Load plus half of the ripple that the least on-time leaves; half of the ripple only, twice, without a load. */
function skippingPeak(
  specification: Specification,
  stage: PowerStage,
  inputVoltage_V: number,
  outputVoltage_V: number,
): number | null {
  const inductance = specification.inductance;
  if (inductance?.kind !== 'value') return null;
  const load = specification.load_A?.to.nominal ?? null;
  const { up_V } = stage.inductorVoltages(
    { inputVoltage_V, outputVoltage_V, loadCurrent_A: load ?? 0 },
    nominalDrops(specification),
  );
  const carried = load === null ? null : load * stage.currentRatio(leastDuty(specification));
  const rise = (up_V / inductance.value_H.from.low) * specification.minimumOnTime_s.high;
  return carried === null ? rise : carried + rise / 2;
}
