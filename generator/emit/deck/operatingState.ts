import { clockEdge_s, rampFigures, rampStart_s, senseAttenuation } from '../../circuit/rampFigures.ts';
import type { SizedDesign } from '../../circuit/SizedDesign.ts';
import { dampingIndex } from '../../law/innerLoop.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import { bufferedRamp } from './bufferedRamp.ts';
import { type DeckOrbit, deckOrbit, perturbationRatio } from './deckOrbit.ts';
import { type StageConditions, type StageLines, stageLines } from './stages/StageLines.ts';

/** A nominal unit at an operating point: what a deck starts from and what it should show. */
export interface OperatingState {
  readonly stage: StageLines;
  readonly orbit: DeckOrbit;
  /** Everything that compensates, at the trip and referred to the inductor [A/s]. */
  readonly rampSlope_A_per_s: number;
  /** Of the slopes at the mean current. */
  readonly dampingIndex: number;
  /** With every resistance of the deck. */
  readonly cycleRatio: number;
  /** What the comparator compares with, the controller's own ramp apart [V]. */
  readonly control_V: number;
  /** The controller's own ramp at the comparator [V/s]. */
  readonly internalSlope_V_per_s: number;
}

/** How much faster than it rises the magnetizing current is reset, besides what the duty asks for. */
const resetMargin = 4;

/** @param track_V voltage at the block's port */
export function operatingState(design: SizedDesign, track_V: number, point: RegionPoint): OperatingState {
  const { specification } = design.request;
  const inductance_H = design.corners.referenceInductance_H;
  const { period_s } = design.demand;
  const senseGain = specification.senseGain_V_per_A.nominal;
  const attenuation = senseAttenuation(design);
  const magnetizing = magnetizingOf(design, point);
  const stage = stageLines(specification.converter, { ...point, inductance_H, period_s, magnetizing });
  const orbit = deckOrbit(stage.equations, peakCurrent_A(design, point));
  const onTime_s = orbit.duty * period_s;

  const figures = rampFigures(design, track_V);
  const perRamp = figures.senseSlope_V_per_s / figures.capacitorSlope_V_per_s;
  // The gate opens half-way down the clock's edge, the ramp starts later.
  const behind_s = rampStart_s(design) - clockEdge_s(period_s) / 2;
  const ramp = bufferedRamp(figures, Math.max(0, onTime_s - behind_s));
  const free_A_per_s = magnetizing === null ? 0 : magnetizing.rise_V / magnetizing.inductance_H;
  const internalSlope_V_per_s = specification.controller?.internalRamp_V_per_s?.nominal ?? 0;
  const internal_A_per_s = internalSlope_V_per_s / (attenuation * senseGain);
  const rampSlope_A_per_s = (ramp.slope_V_per_s * perRamp) / senseGain + free_A_per_s + internal_A_per_s;
  const sensed_A = orbit.peak_A + (free_A_per_s + internal_A_per_s) * onTime_s;
  return {
    stage,
    orbit,
    rampSlope_A_per_s,
    dampingIndex: dampingIndex(point.up_V, point.swing_V, rampSlope_A_per_s * inductance_H),
    cycleRatio: perturbationRatio(stage.equations, orbit, rampSlope_A_per_s),
    control_V: attenuation * (senseGain * sensed_A + perRamp * ramp.value_V),
    internalSlope_V_per_s,
  };
}

/** At the highest load; where that is not known, at one whose mean is the ripple. */
function peakCurrent_A(design: SizedDesign, point: RegionPoint): number {
  const ripple_A = (point.up_V / design.corners.referenceInductance_H) * point.duty * design.demand.period_s;
  const load_A = design.request.specification.load_A?.to.nominal;
  const mean_A = load_A === undefined ? ripple_A : load_A * design.region.stage.currentRatio(point.duty);
  return mean_A + ripple_A / 2;
}

function magnetizingOf({ request, region }: SizedDesign, point: RegionPoint): StageConditions['magnetizing'] {
  const { magnetizingInductance_H, maximumDutyRatio } = request.specification;
  const rise_V = region.stage.freeRamp_V(point);
  if (magnetizingInductance_H === null || rise_V === 0) return null;
  return {
    inductance_H: magnetizingInductance_H.from.nominal,
    rise_V,
    reset_V: (resetMargin * rise_V * maximumDutyRatio) / (1 - maximumDutyRatio),
  };
}
