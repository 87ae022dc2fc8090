import type { Interval } from '../base/Quantity.ts';
import { type Extreme, extremesOver } from '../region/extremesOver.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import { pointsAtDuty, pointsAtZero } from '../region/pointsAtDuty.ts';
import { dampingIndex } from './innerLoop.ts';
import type { Law } from './Law.ts';
import type { LoopCorners } from './loopCorners.ts';

export interface LeastGain {
  /** The least gain that the worst unit must deliver, 0 where none is needed. */
  readonly gain: number;
  /** Where it is needed. */
  readonly at: RegionPoint;
}

/**
 * The least gain for which x ≥ goal over the whole region and every corner.
 *
 *   ma·L needed = (x_goal·U − up − internal − free)/λ
 *
 * greatest at a vertex where the corners are the same everywhere; the unit with the least λ needs the most.
 * A law that clamps needs a gain above D′ wherever it must give anything at all, so that the border of the
 * points in need counts too.
 * Infinite where the law has no ramp to give at a point that needs one (`vout` at no output voltage).
 */
export function leastGain(law: Law, region: OperatingRegion, corners: LoopCorners, goal: number): LeastGain {
  const need_V = (at: RegionPoint) =>
    (goal * at.swing_V - at.up_V - ownRamp_V(region, corners, at).low) / corners.at(at).lambda.low;
  const gain = (at: RegionPoint) => {
    const ramp_V = need_V(at);
    return ramp_V > needless * at.swing_V ? law.gainFor(ramp_V, at) : 0;
  };
  const border = law.clampOffDuty(1) === null ? [] : pointsAtZero(region, need_V);
  const worst = [
    most(region, corners, gain),
    ...border.map((at) => ({ at, value: law.gainFor(0, at) })),
  ].reduce((a, b) => (b.value > a.value ? b : a));
  return worst.value > 0
    ? { gain: worst.value, at: worst.at }
    : { gain: 0, at: most(region, corners, need_V).at };
}

/** Greatest value over a region; at the vertices where the corners do not depend on the point. */
function most(region: OperatingRegion, corners: LoopCorners, figure: (at: RegionPoint) => number): Extreme {
  if (!corners.isUniform) return extremesOver(region, figure).max;
  const found = region.vertices.map((at) => ({ at, value: figure(at) }));
  return found.reduce((a, b) => (b.value > a.value ? b : a));
}

/** Share of the swing below which a need is rounding. */
const needless = 1e-12;

/** Compensation that is there without the ramp: the controller's own, and the magnetizing current's [V]. */
export function ownRamp_V({ stage }: OperatingRegion, corners: LoopCorners, at: RegionPoint): Interval {
  const { internalRamp_V, magnetizingShare } = corners.at(at);
  const free_V = stage.freeRamp_V(at);
  return {
    low: internalRamp_V.low + free_V * magnetizingShare.low,
    high: internalRamp_V.high + free_V * magnetizingShare.high,
  };
}

/** Spread of the ramp against its nominal gain: ratios of low and high to nominal. */
export interface GainSpread {
  readonly low: number;
  readonly high: number;
}

export interface IndexExtreme {
  readonly dampingIndex: number;
  readonly at: RegionPoint;
}

export interface IndexExtremes {
  readonly min: IndexExtreme;
  readonly max: IndexExtreme;
}

/** Smallest and largest damping index of a nominal gain over region, corners and the ramp's own spread. */
export function indexExtremes(
  law: Law,
  gain: number,
  region: OperatingRegion,
  corners: LoopCorners,
  spread: GainSpread,
): IndexExtremes {
  const low = (at: RegionPoint) =>
    indexAt(law, gain, at, corners.at(at).lambda.low * spread.low, ownRamp_V(region, corners, at).low);
  const high = (at: RegionPoint) =>
    indexAt(law, gain, at, corners.at(at).lambda.high * spread.high, ownRamp_V(region, corners, at).high);
  const kinks = clampPoints(law, gain, region);
  const candidates = (figure: (at: RegionPoint) => number) => [
    ...kinks.map((at) => ({ at, value: figure(at) })),
    most(region, corners, figure),
  ];
  const max = candidates(high).reduce((a, b) => (b.value > a.value ? b : a));
  const min = candidates((at) => -low(at)).reduce((a, b) => (b.value > a.value ? b : a));
  return {
    min: { at: min.at, dampingIndex: -min.value },
    max: { at: max.at, dampingIndex: max.value },
  };
}

function indexAt(law: Law, gain: number, at: RegionPoint, scale: number, own_V: number): number {
  return dampingIndex(at.up_V, at.swing_V, scale * law.ramp_V(gain, at) + own_V);
}

/** Where the law clamps inside the region: x has a kink there, and may be least or greatest. */
function clampPoints(law: Law, gain: number, region: OperatingRegion): RegionPoint[] {
  const offDuty = law.clampOffDuty(gain);
  return offDuty === null ? [] : pointsAtDuty(region, 1 - offDuty);
}
