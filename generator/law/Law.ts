import type { RegionPoint } from '../region/OperatingRegion.ts';
import type { LawKind } from '../spec/Specification.ts';

/**
 * How the compensating slope follows the operating point: ma = `basis_V`·gain/L.
 *
 * `basis_V` has to be linear in the point, so that the damping index is linear-fractional in it.
 */
export interface Law {
  readonly kind: LawKind;
  /** Unit of the gain: `V` for the fixed ramp, whose gain is S·L, else dimensionless. */
  readonly gainUnit: 'V' | '';
  readonly gainSymbol: string;
  basis_V(point: RegionPoint): number;
}
