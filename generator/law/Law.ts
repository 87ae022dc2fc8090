import type { RegionPoint } from '../region/OperatingRegion.ts';
import type { LawKind } from '../spec/Specification.ts';

/**
 * How the compensating slope follows the operating point, as its equivalent ma·L in volts.
 *
 * The damping index of every law is linear-fractional in the point, or a function of D′ alone between the
 * points at which it clamps: the extremes over a region are at its vertices and where the law clamps.
 */
export interface Law {
  readonly kind: LawKind;
  /** Unit of the gain: `V` for the fixed ramp, whose gain is S·L, else dimensionless. */
  readonly gainUnit: 'V' | '';
  readonly gainSymbol: string;
  /** ma·L for a gain [V]. */
  ramp_V(gain: number, point: RegionPoint): number;
  /** The gain whose ma·L is the voltage asked for, which is positive. */
  gainFor(ramp_V: number, point: RegionPoint): number;
  /** Off-duty D′ from which on a gain gives no ramp at all; null where it always does. */
  clampOffDuty(gain: number): number | null;
}
