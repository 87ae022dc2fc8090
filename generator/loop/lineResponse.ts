import { type RegionPoint, regionPoint } from '../region/OperatingRegion.ts';
import { type LoopUnit, rampSlope_A_per_s } from './peakLimits.ts';

/** Step of the central difference, relative: far above rounding, far below any curvature. */
const relativeStep = 1e-5;

/**
 * Slow response of the mean inductor current to the input at constant control and output [A/V].
 *
 *   I = vc/Ri − ma·D·T − ½·m1·D·T,  differentiated along Vin with the ramp's own dependence on it
 *
 * For a buck this is (S_eff − ½·m2)·T·Vout/Vin², S_eff = S for a fixed ramp, 0 for one in proportion to
 * Vin, p·m2 for one in proportion to Vout: a fixed ramp of ½·m2 nulls it.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from memory)
 */
export function lineResponse_A_per_V(unit: LoopUnit, point: RegionPoint): number {
  const step = relativeStep * point.inputVoltage_V;
  return (belowControl_A(unit, point, -step) - belowControl_A(unit, point, step)) / (2 * step);
}

/** What ramp and half the ripple take from the control's current [A], the input moved by a step. */
function belowControl_A(unit: LoopUnit, point: RegionPoint, step_V: number): number {
  const moved = regionPoint(
    unit.region.stage,
    {
      inputVoltage_V: point.inputVoltage_V + step_V,
      outputVoltage_V: point.outputVoltage_V,
      loadCurrent_A: point.loadCurrent_A,
    },
    point.drops,
    point.outputIndex,
  );
  const rise = moved.up_V / unit.inductance_H;
  return (rampSlope_A_per_s(unit, moved) + rise / 2) * moved.duty * unit.period_s;
}
