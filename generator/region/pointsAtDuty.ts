import { bisect } from '../base/bisect.ts';
import { pointBetween } from './extremesOver.ts';
import type { OperatingRegion, RegionPoint } from './OperatingRegion.ts';

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
      .filter((b) => a.outputIndex === b.outputIndex && a.duty > duty !== b.duty > duty)
      .map((b) => crossing(region, a, b, duty)),
  );
}

function crossing(region: OperatingRegion, a: RegionPoint, b: RegionPoint, duty: number): RegionPoint {
  const sign = b.duty > duty ? 1 : -1;
  const t = bisect((share) => sign * (pointBetween(region, a, b, share).duty - duty), 0, 1);
  return pointBetween(region, a, b, t);
}
