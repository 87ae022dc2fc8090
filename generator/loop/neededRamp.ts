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
  const { low, high } = region.inputVoltage_V;
  const outputs = region.vertices.map((vertex) => vertex.outputVoltage_V);
  const rows = spread(Math.max(0, Math.min(...outputs)), Math.max(...outputs), steps);
  return spread(low, high, steps).flatMap((input) =>
    rows.flatMap((output) => neededRampAt(region, goal, input, output) ?? []),
  );
}

/** The needed ramp at one input and output, of the unit with the least losses; null outside the region. */
export function neededRampAt(
  region: OperatingRegion,
  goal: number,
  inputVoltage_V: number,
  outputVoltage_V: number,
): NeededRamp | null {
  const first = region.vertices[0]!;
  const point = { ...first, inputVoltage_V, outputVoltage_V };
  const at: RegionPoint = regionPoint(region.stage, point, first.drops, first.outputIndex);
  const { duty } = at;
  if (duty < region.duty.low - 1e-12 || duty > region.duty.high + 1e-12 || duty >= 1) return null;
  return { inputVoltage_V, outputVoltage_V, duty, rampOverUpSlope: Math.max(0, goal / (1 - duty) - 1) };
}

/** Values from low to high, ends included; one where they are the same. */
export function spread(low: number, high: number, count: number): number[] {
  if (high - low <= 1e-9 * high) return [low];
  return Array.from({ length: count }, (_, index) => low + ((high - low) * index) / (count - 1));
}
