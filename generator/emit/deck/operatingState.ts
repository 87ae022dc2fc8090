import { senseAttenuation } from '../../circuit/rampFigures.ts';
import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import { cycleRatio, dampingIndex } from '../../law/innerLoop.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import type { StageConditions } from './stages/StageLines.ts';

/** A nominal unit at an operating point: what a deck starts from and what it should show. */
export interface OperatingState {
  /** ma·L of everything that compensates [V]. */
  readonly ramp_V: number;
  readonly dampingIndex: number;
  readonly cycleRatio: number;
  readonly ripple_A: number;
  readonly peak_A: number;
  readonly magnetizing: StageConditions['magnetizing'];
  /** Slope that the magnetizing current adds, referred to the inductor [A/s]. */
  readonly freeSlope_A_per_s: number;
  /** The controller's own ramp at the comparator [V/s]. */
  readonly internalSlope_V_per_s: number;
}

/** How much faster than it rises the magnetizing current is reset, besides what the duty asks for. */
const resetMargin = 4;

export function operatingState(design: SizedDesign, sized: SizedLaw, point: RegionPoint): OperatingState {
  const { specification } = design.request;
  const inductance_H = design.corners.referenceInductance_H;
  const magnetizing = magnetizingOf(design, point);
  const freeSlope_A_per_s = magnetizing === null ? 0 : magnetizing.rise_V / magnetizing.inductance_H;
  const internalSlope_V_per_s = specification.controller?.internalRamp_V_per_s?.nominal ?? 0;
  const internal_A_per_s =
    internalSlope_V_per_s / (senseAttenuation(design) * specification.senseGain_V_per_A.nominal);
  const ramp_V =
    sized.law.ramp_V(sized.realisedGain, point) + (freeSlope_A_per_s + internal_A_per_s) * inductance_H;
  const index = dampingIndex(point.up_V, point.swing_V, ramp_V);
  const ripple_A = (point.up_V / inductance_H) * point.duty * design.demand.period_s;
  const load_A = specification.load_A?.to.nominal;
  const mean_A = load_A === undefined ? ripple_A : load_A * design.region.stage.currentRatio(point.duty);
  return {
    ramp_V,
    dampingIndex: index,
    cycleRatio: cycleRatio(index),
    ripple_A,
    peak_A: mean_A + ripple_A / 2,
    magnetizing,
    freeSlope_A_per_s,
    internalSlope_V_per_s,
  };
}

function magnetizingOf({ request, region }: SizedDesign, point: RegionPoint): OperatingState['magnetizing'] {
  const { magnetizingInductance_H, maximumDutyRatio } = request.specification;
  const rise_V = region.stage.freeRamp_V(point);
  if (magnetizingInductance_H === null || rise_V === 0) return null;
  return {
    inductance_H: magnetizingInductance_H.from.nominal,
    rise_V,
    reset_V: (resetMargin * rise_V * maximumDutyRatio) / (1 - maximumDutyRatio),
  };
}
