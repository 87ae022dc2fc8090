import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
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
 *   gain = (x_goal·U − up − internal)/(λ·basis)
 *
 * linear-fractional in the point, hence greatest at a vertex; the unit with the least λ needs the most.
 */
export function leastGain(law: Law, region: OperatingRegion, corners: LoopCorners, goal: number): LeastGain {
  const needs = region.vertices.map((at) => ({
    at,
    gain: (goal * at.swing_V - at.up_V - corners.internalRamp_V.low) / (corners.lambda.low * law.basis_V(at)),
  }));
  const worst = needs.reduce((a, b) => (b.gain > a.gain ? b : a));
  return { gain: Math.max(0, worst.gain), at: worst.at };
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
  const indexAt = (at: RegionPoint, scale: number, internal_V: number): IndexExtreme => ({
    at,
    dampingIndex: dampingIndex(at.up_V, at.swing_V, scale * gain * law.basis_V(at) + internal_V),
  });
  const low = region.vertices.map((at) =>
    indexAt(at, corners.lambda.low * spread.low, corners.internalRamp_V.low),
  );
  const high = region.vertices.map((at) =>
    indexAt(at, corners.lambda.high * spread.high, corners.internalRamp_V.high),
  );
  return {
    min: low.reduce((a, b) => (b.dampingIndex < a.dampingIndex ? b : a)),
    max: high.reduce((a, b) => (b.dampingIndex > a.dampingIndex ? b : a)),
  };
}
