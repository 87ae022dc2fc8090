import { engineering } from '../base/engineering.ts';
import type { KnownCorners } from '../law/loopCorners.ts';
import { extremesOver } from '../region/extremesOver.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import type { Specification } from '../spec/Specification.ts';
import { lightLoadRampForAll } from './cycle/lightLoadRamp.ts';

/** Where conduction stops being continuous, and what that means for the figures. */
export interface LightLoad {
  /** Load at the border to discontinuous conduction over the region, least inductance and frequency [A]. */
  readonly borderLoad_A: { readonly low: number; readonly high: number };
  /** Whether the load range reaches below it; null where the load is not known. */
  readonly reached: boolean | null;
  /** What it means, in sentences. */
  readonly notes: readonly string[];
}

/** Output over input above which a discontinuous buck without a ramp is unstable at low frequency. */
export const discontinuousStabilityRatio = 2 / 3;

/**
 * Border load ΔI/2 carried to the output, Iload = ½·m1·D·T/(Imean/Iload), of the unit with the least
 * inductance at the lowest frequency: it has the most ripple.
 */
export function lightLoad(
  specification: Specification,
  region: OperatingRegion,
  corners: KnownCorners,
): LightLoad {
  const rippleTime = 1 / (corners.inductance_H.low * specification.frequency_Hz.from.low);
  const border = (point: RegionPoint) =>
    (point.up_V * point.duty * rippleTime) / 2 / region.stage.currentRatio(point.duty);
  const { min, max } = extremesOver(region, border);
  const least = specification.load_A?.from.low ?? null;
  const reached = least === null ? null : least < max.value;
  return {
    borderLoad_A: { low: min.value, high: max.value },
    reached,
    notes: [...borderNotes(specification, least, max.value), ...buckNotes(region, reached)],
  };
}

function borderNotes({ rectifierDrop_V }: Specification, least_A: number | null, border_A: number): string[] {
  const rectifier =
    rectifierDrop_V.high === 0 ? ', where the synchronous rectifier does not let the current turn round' : '';
  if (least_A === null)
    return [
      `The load is not known: below ${engineering(border_A, 'A')} conduction of the worst unit may be discontinuous${rectifier}; the damping figures hold above.`,
    ];
  if (least_A >= border_A) return ['Conduction is continuous over the whole load range, for every unit.'];
  return [
    `Below ${engineering(border_A, 'A')} conduction of the worst unit becomes discontinuous${rectifier}: each cycle starts from zero current, so that no perturbation reaches the next, and the damping figures do not apply.`,
  ];
}

function buckNotes(region: OperatingRegion, reached: boolean | null): string[] {
  if (region.stage.kind !== 'buck' || reached === false) return [];
  const ratio = extremesOver(region, (point) => point.outputVoltage_V / point.inputVoltage_V).max.value;
  if (ratio <= discontinuousStabilityRatio) return [];
  return [
    `There a buck without a ramp is unstable at low frequency above Vout/Vin = 2/3; ${lightLoadRampForAll.share.toPrecision(2)} of the down slope cures it, less than the goal asks for in any case.`,
  ];
}
