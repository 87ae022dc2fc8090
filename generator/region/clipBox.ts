import { bisect } from '../base/bisect.ts';
import type { Interval } from '../base/Quantity.ts';
import type { OperatingPoint } from './PowerStage.ts';

/** The points where a function is not positive; it is monotone along each axis, linear without losses. */
export type HalfSpace = (point: OperatingPoint) => number;

export interface Box {
  readonly inputVoltage_V: Interval;
  readonly outputVoltage_V: Interval;
  readonly loadCurrent_A: Interval;
}

const axes = ['inputVoltage_V', 'outputVoltage_V', 'loadCurrent_A'] as const;

/**
 * Vertices of a box of operating points cut by half-spaces whose bounding planes do not meet inside it.
 *
 * A vertex is a corner of the box that no half-space excludes, or the point where an edge crosses a
 * plane. Planes of two duties never meet where the swing is positive, so no third kind exists.
 */
export function clipBox(box: Box, halfSpaces: readonly HalfSpace[]): OperatingPoint[] {
  const corners = boxCorners(box);
  const crossings = halfSpaces.flatMap((plane) => edges(corners).flatMap((edge) => crossing(edge, plane)));
  return distinct([...corners, ...crossings].filter((point) => allows(halfSpaces, point)));
}

function boxCorners(box: Box): OperatingPoint[] {
  const ends = ({ low, high }: Interval) => [low, high];
  return ends(box.inputVoltage_V).flatMap((inputVoltage_V) =>
    ends(box.outputVoltage_V).flatMap((outputVoltage_V) =>
      ends(box.loadCurrent_A).map((loadCurrent_A) => ({ inputVoltage_V, outputVoltage_V, loadCurrent_A })),
    ),
  );
}

type Edge = readonly [OperatingPoint, OperatingPoint];

/** Pairs of corners that differ in one axis; corners are ordered as the bits of their index. */
function edges(corners: readonly OperatingPoint[]): Edge[] {
  return corners.flatMap((corner, index) =>
    [1, 2, 4].flatMap((bit) => (index & bit ? [] : [[corner, corners[index | bit]!] as const])),
  );
}

function crossing([a, b]: Edge, plane: HalfSpace): OperatingPoint[] {
  const [fa, fb] = [plane(a), plane(b)];
  if (fa > 0 === fb > 0 || fa === fb) return [];
  const point = (t: number): OperatingPoint => {
    const at = (axis: (typeof axes)[number]) => a[axis] + t * (b[axis] - a[axis]);
    return { inputVoltage_V: at(axes[0]), outputVoltage_V: at(axes[1]), loadCurrent_A: at(axes[2]) };
  };
  // Straight without losses; where it is not, the secant only comes near.
  const secant = fa / (fa - fb);
  if (Math.abs(plane(point(secant))) <= 1e-12 * Math.abs(fa - fb)) return [point(secant)];
  const sign = fa > 0 ? -1 : 1;
  return [point(bisect((t) => sign * plane(point(t)), 0, 1))];
}

/** A crossing lies on its own plane up to rounding. */
function allows(halfSpaces: readonly HalfSpace[], point: OperatingPoint): boolean {
  const slack = 1e-9 * (Math.abs(point.inputVoltage_V) + Math.abs(point.outputVoltage_V));
  return halfSpaces.every((plane) => plane(point) <= slack);
}

function distinct(points: readonly OperatingPoint[]): OperatingPoint[] {
  const seen = new Set<string>();
  return points.filter((point) => {
    const key = axes.map((axis) => point[axis]).join(' ');
    return seen.has(key) ? false : seen.add(key);
  });
}
