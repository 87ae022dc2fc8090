import { bisect } from '../base/bisect.ts';
import { isOnFace, pointBetween } from './extremesOver.ts';
import type { OperatingRegion, RegionPoint } from './OperatingRegion.ts';

/** Points of a region at which the duty has a value: where it crosses the lines between vertices. */
export function pointsAtDuty(region: OperatingRegion, duty: number): RegionPoint[] {
  return pointsAtZero(region, (point) => point.duty - duty);
}

/**
 * Points of a region at which a figure changes sign on the lines between vertices, on its side that is not
 * positive.
 *
 * Every vertex of the slice is among them; further points of its faces do no harm.
 */
export function pointsAtZero(region: OperatingRegion, figure: (point: RegionPoint) => number): RegionPoint[] {
  const valued = region.vertices.map((at) => ({ at, isAbove: figure(at) > 0 }));
  return valued.flatMap((a, index) =>
    valued
      .slice(index + 1)
      .filter((b) => a.isAbove !== b.isAbove && isOnFace(a.at, b.at))
      .map((b) => (b.isAbove ? crossing(region, a.at, b.at, figure) : crossing(region, b.at, a.at, figure))),
  );
}

function crossing(
  region: OperatingRegion,
  below: RegionPoint,
  above: RegionPoint,
  figure: (point: RegionPoint) => number,
): RegionPoint {
  return pointBetween(
    region,
    below,
    above,
    bisect((share) => figure(pointBetween(region, below, above, share)), 0, 1),
  );
}
