import type { Law } from '../law/Law.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import type { Specification } from '../spec/Specification.ts';

/** A nominal unit whose limits and line response are asked for. */
export interface LoopUnit {
  readonly law: Law;
  readonly gain: number;
  readonly region: OperatingRegion;
  readonly inductance_H: number;
  readonly period_s: number;
  readonly senseGain_V_per_A: number;
  readonly controller: Specification['controller'];
}

/** Inductor-referred slope of everything that compensates, the controller's own ramp included [A/s]. */
export function rampSlope_A_per_s(unit: LoopUnit, point: RegionPoint): number {
  const own = (unit.controller?.internalRamp_V_per_s?.nominal ?? 0) / unit.senseGain_V_per_A;
  return unit.law.ramp_V(unit.gain, point) / unit.inductance_H + own;
}

/**
 * Peak inductor current at which the limit trips [A]; null where the controller's limit is not known.
 *
 *   limit/Ri − ma·D·T (where the limit sees the ramp) + m1·delay
 */
export function peakLimit_A(unit: LoopUnit, point: RegionPoint): number | null {
  const limit_V = unit.controller?.senseLimit_V?.nominal;
  if (limit_V === undefined) return null;
  const taken_A = unit.controller?.limitSeesRamp
    ? rampSlope_A_per_s(unit, point) * point.duty * unit.period_s
    : 0;
  const delay_s = unit.controller?.comparatorDelay_s?.nominal ?? 0;
  return limit_V / unit.senseGain_V_per_A - taken_A + (point.up_V / unit.inductance_H) * delay_s;
}

/**
 * Load current at which the limit trips [A]: mean inductor current at the peak limit, carried to the output.
 *
 *   (peak − ½·m2·D′·T)/(Imean/Iload)
 */
export function outputLimit_A(unit: LoopUnit, point: RegionPoint): number | null {
  const peak_A = peakLimit_A(unit, point);
  if (peak_A === null) return null;
  const halfRipple_A = (point.down_V / unit.inductance_H) * (1 - point.duty) * (unit.period_s / 2);
  return (peak_A - halfRipple_A) / unit.region.stage.currentRatio(point.duty);
}
