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
const nearEnd = [0, 2 ** -14, 2 ** -11, 2 ** -8, 2 ** -6];
const shares = [
  ...nearEnd,
  ...Array.from({ length: 15 }, (_, index) => (index + 1) / 16),
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
    for (const { share, sign } of peaks(values, min.value, max.value))
      goldenSection((t) => sign * found(t), shares[share - 1]!, shares[share + 1]!);
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
      .filter((to) => from.outputIndex === to.outputIndex && differences(from, to) <= 2)
      .map((to) => ({ from, to, points: shares.map((t) => pointBetween(region, from, to, t)) })),
  );
  linesFound.set(region, lines);
  return lines;
}

/** How many things that vary tell two vertices apart: up to two, and the line between them is on a face. */
function differences(a: RegionPoint, b: RegionPoint): number {
  const isOther = [
    a.inputVoltage_V !== b.inputVoltage_V,
    a.outputVoltage_V !== b.outputVoltage_V && Math.abs(a.duty - b.duty) > 1e-9,
    a.loadCurrent_A !== b.loadCurrent_A,
    a.drops.rectifierDrop_V !== b.drops.rectifierDrop_V,
    a.drops.switch_ohm !== b.drops.switch_ohm ||
      a.drops.winding_ohm !== b.drops.winding_ohm ||
      a.drops.rectifier_ohm !== b.drops.rectifier_ohm,
  ];
  return isOther.filter(Boolean).length;
}

/**
 * Shares about which a figure is stationary inside, as far as the shares resolve it, and could be beyond what
 * is known: it does not rise above a sample by more than that stands above its lower neighbour.
 */
function* peaks(values: readonly number[], least: number, most: number) {
  for (let share = 1; share < values.length - 1; share += 1) {
    const [before, value, after] = [values[share - 1]!, values[share]!, values[share + 1]!];
    if (value > before && value > after && 2 * value - Math.min(before, after) > most)
      yield { share, sign: 1 };
    if (value < before && value < after && 2 * value - Math.max(before, after) < least)
      yield { share, sign: -1 };
  }
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
