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
const nearEnd = [0, 1 / 512, 1 / 64];
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
 * Looked for at the vertices and, by golden section inside a bracket, along every line between two of them:
 * where a figure has no vertices to be extreme at (products such as ma·D), its border is where it is.
 */
export function extremesOver(region: OperatingRegion, figure: (point: RegionPoint) => number): Extremes {
  const found: Extreme[] = region.vertices.map((at) => ({ at, value: figure(at) }));
  for (const [a, b] of lines(region.vertices)) {
    const at = (t: number) => pointBetween(region, a, b, t);
    found.push(...stationary((t) => figure(at(t))).map((t) => ({ at: at(t), value: figure(at(t)) })));
  }
  return {
    min: found.reduce((a, b) => (b.value < a.value ? b : a)),
    max: found.reduce((a, b) => (b.value > a.value ? b : a)),
  };
}

/** Pairs of vertices of the same output. */
function lines(vertices: readonly RegionPoint[]): (readonly [RegionPoint, RegionPoint])[] {
  return vertices.flatMap((a, index) =>
    vertices
      .slice(index + 1)
      .filter((b) => a.outputIndex === b.outputIndex)
      .map((b) => [a, b] as const),
  );
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

/** Where a function of 0 to 1 is stationary inside, as far as the shares resolve it. */
function stationary(value: (t: number) => number): number[] {
  const samples = shares.map(value);
  return samples.slice(1, -1).flatMap((sample, index) => {
    const [before, after] = [samples[index]!, samples[index + 2]!];
    const sign = sample > before && sample > after ? 1 : sample < before && sample < after ? -1 : 0;
    if (sign === 0) return [];
    return [goldenSection((t) => sign * value(t), shares[index]!, shares[index + 2]!)];
  });
}

/** Where a function with one maximum between two ends has it. */
function goldenSection(value: (t: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  let [left, right] = [high - goldenRatio * (high - low), low + goldenRatio * (high - low)];
  let [atLeft, atRight] = [value(left), value(right)];
  for (let step = 0; step < 60; step += 1) {
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
  return (low + high) / 2;
}
