import type { Interval } from '../base/Quantity.ts';
import { cycleRatio, dampingQ, settlingCycles } from '../law/innerLoop.ts';
import type { Law } from '../law/Law.ts';
import { laws } from '../law/laws.ts';
import { type IndexExtremes, indexExtremes, type LeastGain, leastGain } from '../law/leastGain.ts';
import { type LoopCorners, nominalCorners } from '../law/loopCorners.ts';
import { extremesOver } from '../region/extremesOver.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import type { Specification } from '../spec/Specification.ts';
import { lineResponse_A_per_V } from './lineResponse.ts';
import { type LoopUnit, outputLimit_A, peakLimit_A } from './peakLimits.ts';

/** One law at its least gain, over the region. */
export interface ComparedLaw {
  readonly law: Law;
  readonly required: LeastGain;
  /** What limits and line response are asked of; null without an inductance. */
  readonly unit: LoopUnit | null;
  readonly extremes: IndexExtremes;
  /** Largest damping index with every unit nominal: what the region alone costs, tolerances left out. */
  readonly nominalMax: number;
  readonly cycleRatio: Interval;
  readonly dampingQMax: number | null;
  readonly settlingCyclesMax: number | null;
  /** Share of the comparator's signal that is ramp, 1 − D′/x. */
  readonly rampShare: Interval;
  readonly peakLimit_A: Interval | null;
  readonly outputLimit_A: Interval | null;
  /** Null without an inductance. */
  readonly lineResponse_A_per_V: Interval | null;
}

const exact = { low: 1, high: 1 };

/**
 * Every law at the least gain that meets the goal, with what it does to damping, limits and line response.
 * @param nominalRegion the region of a unit with nominal drops: limits and line response are those of one
 */
export function compareLaws(
  specification: Specification,
  region: OperatingRegion,
  nominalRegion: OperatingRegion,
  corners: LoopCorners,
  period_s: number,
): ComparedLaw[] {
  return Object.values(laws).flatMap((law) => {
    const required = leastGain(law, region, corners, specification.goal.dampingIndex);
    if (!Number.isFinite(required.gain)) return [];
    return [comparedLaw(specification, region, nominalRegion, corners, period_s, law, required)];
  });
}

function comparedLaw(
  specification: Specification,
  region: OperatingRegion,
  nominalRegion: OperatingRegion,
  corners: LoopCorners,
  period_s: number,
  law: Law,
  required: LeastGain,
): ComparedLaw {
  const extremes = indexExtremes(law, required.gain, region, corners, exact);
  const { min, max } = extremes;
  const settling = [min, max].map(({ dampingIndex }) => settlingCycles(dampingIndex));
  const nominal = nominalCorners(specification, corners);
  const nominalGain = leastGain(law, region, nominal, specification.goal.dampingIndex).gain;
  const { referenceInductance_H: inductance_H, senseGain_V_per_A } = corners;
  const unit: LoopUnit | null =
    inductance_H === null
      ? null
      : {
          law,
          gain: required.gain,
          region: nominalRegion,
          inductance_H,
          period_s,
          senseGain_V_per_A: senseGain_V_per_A.nominal,
          controller: specification.controller,
        };
  return {
    law,
    required,
    unit,
    extremes,
    nominalMax: indexExtremes(law, nominalGain, region, nominal, exact).max.dampingIndex,
    cycleRatio: { low: cycleRatio(min.dampingIndex), high: cycleRatio(max.dampingIndex) },
    dampingQMax: dampingQ(min.dampingIndex),
    settlingCyclesMax: settling.includes(null) ? null : Math.max(...(settling as number[])),
    rampShare: rampShare(law, required.gain, region, corners),
    peakLimit_A: figure(unit, nominalRegion, peakLimit_A),
    outputLimit_A: figure(unit, nominalRegion, outputLimit_A),
    lineResponse_A_per_V: figure(unit, nominalRegion, lineResponse_A_per_V),
  };
}

/**
 * Over the region, for a unit at the corners of λ: the share grows with the ramp over the up slope, which is
 * linear-fractional in the point where the corners are the same everywhere, and so extreme at the vertices.
 */
function rampShare(law: Law, gain: number, region: OperatingRegion, corners: LoopCorners): Interval {
  const share = (side: 'low' | 'high') => (at: RegionPoint) => {
    const ramp_V = corners.at(at).lambda[side] * law.ramp_V(gain, at);
    return ramp_V === 0 ? 0 : ramp_V / (at.up_V + ramp_V);
  };
  const { vertices } = region;
  if (corners.isUniform)
    return {
      low: Math.min(...vertices.map(share('low'))),
      high: Math.max(...vertices.map(share('high'))),
    };
  return {
    low: extremesOver(region, share('low')).min.value,
    high: extremesOver(region, share('high')).max.value,
  };
}

function figure(
  unit: LoopUnit | null,
  region: OperatingRegion,
  value: (unit: LoopUnit, point: RegionPoint) => number | null,
): Interval | null {
  if (unit === null || value(unit, region.vertices[0]!) === null) return null;
  const { min, max } = extremesOver(region, (point) => value(unit, point)!);
  return { low: min.value, high: max.value };
}
