import type { Interval } from '../base/Quantity.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import { pointsAtDuty } from '../region/pointsAtDuty.ts';
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
 * greatest at a vertex; the unit with the least λ needs the most. Infinite where the law has no ramp to
 * give at a point that needs one (`vout` at no output voltage).
 */
export function leastGain(law: Law, region: OperatingRegion, corners: LoopCorners, goal: number): LeastGain {
  const needs = region.vertices.map((at) => {
    const ramp_V = (goal * at.swing_V - at.up_V - ownRamp_V(region, corners, at).low) / corners.lambda.low;
    return { at, ramp_V, gain: ramp_V > needless * at.swing_V ? law.gainFor(ramp_V, at) : 0 };
  });
  const worst = needs.reduce((a, b) => (b.gain > a.gain || (a.gain === 0 && b.ramp_V > a.ramp_V) ? b : a));
  return { gain: worst.gain, at: worst.at };
}

/** Share of the swing below which a need is rounding. */
const needless = 1e-12;

/** Compensation that is there without the ramp: the controller's own, and the magnetizing current's [V]. */
export function ownRamp_V({ stage }: OperatingRegion, corners: LoopCorners, at: RegionPoint): Interval {
  const free_V = stage.freeRamp_V(at);
  return {
    low: corners.internalRamp_V.low + free_V * corners.magnetizingShare.low,
    high: corners.internalRamp_V.high + free_V * corners.magnetizingShare.high,
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
  const points = [...region.vertices, ...clampPoints(law, gain, region)];
  const low = points.map((at) =>
    indexAt(law, gain, at, corners.lambda.low * spread.low, ownRamp_V(region, corners, at).low),
  );
  const high = points.map((at) =>
    indexAt(law, gain, at, corners.lambda.high * spread.high, ownRamp_V(region, corners, at).high),
  );
  return {
    min: low.reduce((a, b) => (b.dampingIndex < a.dampingIndex ? b : a)),
    max: high.reduce((a, b) => (b.dampingIndex > a.dampingIndex ? b : a)),
  };
}

function indexAt(law: Law, gain: number, at: RegionPoint, scale: number, own_V: number): IndexExtreme {
  return { at, dampingIndex: dampingIndex(at.up_V, at.swing_V, scale * law.ramp_V(gain, at) + own_V) };
}

/** Where the law clamps inside the region: x has a kink there, and may be least or greatest. */
function clampPoints(law: Law, gain: number, region: OperatingRegion): RegionPoint[] {
  const offDuty = law.clampOffDuty(gain);
  return offDuty === null ? [] : pointsAtDuty(region, 1 - offDuty);
}
