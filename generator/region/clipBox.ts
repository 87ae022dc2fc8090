import { bisect } from '../base/bisect.ts';
import type { Interval } from '../base/Quantity.ts';

/** Coordinates of a point, one for each side of its box. */
export type Coordinates = readonly number[];

/** A half-space: the points where `excess` is not positive; monotone along each side of the box, linear without losses. */
export type HalfSpace = (point: Coordinates) => number;

/**
 * Vertices of a box cut by half-spaces whose bounding planes do not meet inside it.
 *
 * A vertex is a corner of the box that no half-space excludes, or the point where an edge crosses a
 * plane. Planes of two duties never meet where the swing is positive, so no third kind exists.
 */
export function clipBox(box: readonly Interval[], halfSpaces: readonly HalfSpace[]): Coordinates[] {
  const corners = boxCorners(box);
  const crossings = halfSpaces.flatMap((plane) =>
    edges(box, corners).flatMap((edge) => crossing(edge, plane)),
  );
  const slack = 1e-12 * Math.max(...box.map(({ low, high }) => Math.max(Math.abs(low), Math.abs(high))));
  // A crossing lies on its own plane up to rounding.
  const allowed = (point: Coordinates) => halfSpaces.every((plane) => plane(point) <= slack);
  return distinct([...corners, ...crossings].filter(allowed));
}

/** Every combination of ends; a side without length has one. */
export function boxCorners(box: readonly Interval[]): Coordinates[] {
  return box.reduce<Coordinates[]>(
    (found, { low, high }) =>
      found.flatMap((point) =>
        low === high
          ? [[...point, low]]
          : [
              [...point, low],
              [...point, high],
            ],
      ),
    [[]],
  );
}

type Edge = readonly [Coordinates, Coordinates];

/** From each corner along every side at whose low end it is. */
function edges(box: readonly Interval[], corners: readonly Coordinates[]): Edge[] {
  return box.flatMap(({ low, high }, side) =>
    low === high
      ? []
      : corners
          .filter((corner) => corner[side] === low)
          .map((corner) => [corner, corner.with(side, high)] as const),
  );
}

function crossing([a, b]: Edge, plane: HalfSpace): Coordinates[] {
  const [fa, fb] = [plane(a), plane(b)];
  if (fa > 0 === fb > 0 || fa === fb) return [];
  const point = (t: number): Coordinates => a.map((value, side) => value + t * (b[side]! - value));
  // Straight without losses; where it is not, the secant only comes near.
  const secant = fa / (fa - fb);
  if (Math.abs(plane(point(secant))) <= 1e-12 * Math.abs(fa - fb)) return [point(secant)];
  const sign = fa > 0 ? -1 : 1;
  return [point(bisect((t) => sign * plane(point(t)), 0, 1))];
}

function distinct(points: readonly Coordinates[]): Coordinates[] {
  const seen = new Set<string>();
  return points.filter((point) => {
    const key = point.join(' ');
    return seen.has(key) ? false : seen.add(key);
  });
}
