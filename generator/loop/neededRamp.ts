import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import { regionPoint } from '../region/OperatingRegion.ts';

/** The ramp that a point needs, as a multiple of the sensed up slope: no inductance enters. */
export interface NeededRamp {
  readonly inputVoltage_V: number;
  readonly outputVoltage_V: number;
  readonly duty: number;
  /** ma/m1 = mc − 1. */
  readonly rampOverUpSlope: number;
}

/** Rows and columns of the table. */
const steps = 5;

/**
 * The needed ramp over input and output, for a nominal sense gain: ma/m1 = max(0, x_goal/D′ − 1).
 *
 * What a designer can size a ramp by before the inductor is known. Points outside the region are left out.
 */
export function neededRamp(region: OperatingRegion, goal: number): readonly NeededRamp[] {
  const inputs = spread(region.inputVoltage_V.low, region.inputVoltage_V.high);
  return inputs.flatMap((inputVoltage_V) =>
    outputsAt(region, inputVoltage_V).map((at) => ({
      inputVoltage_V,
      outputVoltage_V: at.outputVoltage_V,
      duty: at.duty,
      rampOverUpSlope: Math.max(0, goal / (1 - at.duty) - 1),
    })),
  );
}

function outputsAt(region: OperatingRegion, inputVoltage_V: number): RegionPoint[] {
  const outputs = region.vertices.map((vertex) => vertex.outputVoltage_V);
  const first = region.vertices[0]!;
  return spread(Math.max(0, Math.min(...outputs)), Math.max(...outputs))
    .map((outputVoltage_V) =>
      regionPoint(
        region.stage,
        { ...first, inputVoltage_V, outputVoltage_V },
        first.drops,
        first.outputIndex,
      ),
    )
    .filter(({ duty }) => duty >= region.duty.low - 1e-12 && duty <= region.duty.high + 1e-12 && duty < 1);
}

function spread(low: number, high: number): number[] {
  if (high - low <= 1e-9 * high) return [low];
  return Array.from({ length: steps }, (_, index) => low + ((high - low) * index) / (steps - 1));
}
