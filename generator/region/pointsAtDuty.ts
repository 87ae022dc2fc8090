import { bisect } from '../base/bisect.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from './OperatingRegion.ts';

/**
 * Points of a region at which the duty has a value: where it crosses the lines between vertices.
 *
 * Lines inside the region count too: every vertex of the slice is among them.
 */
export function pointsAtDuty(region: OperatingRegion, duty: number): RegionPoint[] {
  const { vertices } = region;
  return vertices.flatMap((a, index) =>
    vertices
      .slice(index + 1)
      .filter(
        (b) => a.outputIndex === b.outputIndex && a.drops === b.drops && a.duty > duty !== b.duty > duty,
      )
      .map((b) => between(region, a, b, duty)),
  );
}

function between({ stage }: OperatingRegion, a: RegionPoint, b: RegionPoint, duty: number): RegionPoint {
  const at = (t: number) => {
    const mix = (from: number, to: number) => from + t * (to - from);
    const point = {
      inputVoltage_V: mix(a.inputVoltage_V, b.inputVoltage_V),
      outputVoltage_V: mix(a.outputVoltage_V, b.outputVoltage_V),
      loadCurrent_A: mix(a.loadCurrent_A, b.loadCurrent_A),
    };
    return regionPoint(stage, point, a.drops, a.outputIndex);
  };
  const sign = b.duty > duty ? 1 : -1;
  return at(bisect((t) => sign * (at(t).duty - duty), 0, 1));
}
