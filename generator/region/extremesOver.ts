import { type OperatingRegion, type RegionPoint, regionPoint } from './OperatingRegion.ts';

export interface Extreme {
  readonly value: number;
  readonly at: RegionPoint;
}

export interface Extremes {
  readonly min: Extreme;
  readonly max: Extreme;
}

/** Shares of a line at which it is looked at to bracket its extremes: closer at its ends, where one may hide. */
const nearEnd = [0, 2 ** -14, 2 ** -10, 2 ** -6];
const shares = [
  ...nearEnd,
  ...Array.from({ length: 7 }, (_, index) => (index + 1) / 8),
  ...nearEnd.map((share) => 1 - share).reverse(),
];
const goldenRatio = (Math.sqrt(5) - 1) / 2;

/**
 * Least and greatest value over a region of a figure that is monotone in input and output, each for itself,
 * except along its border.
 *
 * Looked for at the vertices and, by golden section inside a bracket, along the lines between two of them that
 * lie on a face: where a figure has no vertices to be extreme at (products such as ma·D), its border is where it is.
 */
export function extremesOver(region: OperatingRegion, figure: (point: RegionPoint) => number): Extremes {
  const start = region.vertices.map((at) => ({ at, value: figure(at) }));
  let min = start.reduce((a, b) => (b.value < a.value ? b : a));
  let max = start.reduce((a, b) => (b.value > a.value ? b : a));
  for (const line of linesOf(region)) {
    const values = line.points.map(figure);
    const found = (t: number) => {
      const at = pointBetween(region, line.from, line.to, t);
      const value = figure(at);
      if (value < min.value) min = { at, value };
      if (value > max.value) max = { at, value };
      return value;
    };
    for (let share = 1; share < values.length - 1; share += 1) {
      const sign = peakSign(values, share, min.value, max.value);
      if (sign !== 0) goldenSection((t) => sign * found(t), shares[share - 1]!, shares[share + 1]!);
    }
  }
  return { min, max };
}

/** A line between two vertices of one output, and the points of it that are looked at. */
interface Line {
  readonly from: RegionPoint;
  readonly to: RegionPoint;
  readonly points: readonly RegionPoint[];
}

/** The same for every figure asked of a region. */
const linesFound = new WeakMap<OperatingRegion, readonly Line[]>();

function linesOf(region: OperatingRegion): readonly Line[] {
  const known = linesFound.get(region);
  if (known !== undefined) return known;
  const lines = region.vertices.flatMap((from, index) =>
    region.vertices
      .slice(index + 1)
      .filter((to) => isOnFace(from, to))
      .map((to) => ({ from, to, points: shares.map((t) => pointBetween(region, from, to, t)) })),
  );
  linesFound.set(region, lines);
  return lines;
}

/** Whether two vertices belong to one output and differ in no more than two things: then a face holds both. */
export function isOnFace(a: RegionPoint, b: RegionPoint): boolean {
  if (a.outputIndex !== b.outputIndex) return false;
  const isOther = [
    a.inputVoltage_V !== b.inputVoltage_V,
    a.outputVoltage_V !== b.outputVoltage_V && Math.abs(a.duty - b.duty) > 1e-9,
    a.loadCurrent_A !== b.loadCurrent_A,
    a.drops.rectifierDrop_V !== b.drops.rectifierDrop_V,
    a.drops.switch_ohm !== b.drops.switch_ohm ||
      a.drops.winding_ohm !== b.drops.winding_ohm ||
      a.drops.rectifier_ohm !== b.drops.rectifier_ohm,
  ];
  return isOther.filter(Boolean).length <= 2;
}

/**
 * Whether a figure has a maximum (1), a minimum (−1) or neither about a share, as far as the shares resolve it,
 * that could be beyond what is known: it does not rise above a sample by more than that stands above its
 * lower neighbour.
 */
function peakSign(values: readonly number[], share: number, least: number, most: number): number {
  const before = values[share - 1]!;
  const value = values[share]!;
  const after = values[share + 1]!;
  if (value > before && value > after && 2 * value - Math.min(before, after) > most) return 1;
  if (value < before && value < after && 2 * value - Math.max(before, after) < least) return -1;
  return 0;
}

/** The point at a share of the way between two of one output; their drops are mixed as well. */
export function pointBetween(
  { stage }: OperatingRegion,
  a: RegionPoint,
  b: RegionPoint,
  t: number,
): RegionPoint {
  const mix = (from: number, to: number) => from + t * (to - from);
  const point = {
    inputVoltage_V: mix(a.inputVoltage_V, b.inputVoltage_V),
    outputVoltage_V: mix(a.outputVoltage_V, b.outputVoltage_V),
    loadCurrent_A: mix(a.loadCurrent_A, b.loadCurrent_A),
  };
  const drops = {
    rectifierDrop_V: mix(a.drops.rectifierDrop_V, b.drops.rectifierDrop_V),
    switch_ohm: mix(a.drops.switch_ohm, b.drops.switch_ohm),
    winding_ohm: mix(a.drops.winding_ohm, b.drops.winding_ohm),
    rectifier_ohm: mix(a.drops.rectifier_ohm, b.drops.rectifier_ohm),
  };
  return regionPoint(stage, point, drops, a.outputIndex);
}

/** The value is quadratic about its maximum: a hundred-millionth of the bracket is far closer than is asked. */
const sections = 40;

/** Closes in on the one maximum of a function between two ends. */
function goldenSection(value: (t: number) => number, from: number, to: number): void {
  let [low, high] = [from, to];
  let [left, right] = [high - goldenRatio * (high - low), low + goldenRatio * (high - low)];
  let [atLeft, atRight] = [value(left), value(right)];
  for (let step = 0; step < sections; step += 1) {
    if (atLeft >= atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - goldenRatio * (high - low);
      atLeft = value(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + goldenRatio * (high - low);
      atRight = value(right);
    }
  }
}
