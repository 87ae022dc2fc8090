import type { RegionPoint } from '../region/OperatingRegion.ts';
import type { LawKind } from '../spec/Specification.ts';
import type { Law } from './Law.ts';

/** A slope in proportion to a voltage of the operating point. */
function proportional(
  kind: LawKind,
  gainSymbol: string,
  gainUnit: Law['gainUnit'],
  basis: (point: RegionPoint) => number,
): Law {
  return {
    kind,
    gainUnit,
    gainSymbol,
    ramp_V: (gain, point) => gain * basis(point),
    gainFor: (ramp_V, point) => ramp_V / basis(point),
    clampOffDuty: () => null,
  };
}

/** ma·L = max(0, x_d·U − m1·L): x is x_d wherever a ramp is needed for that, D′ elsewhere. */
const constantQ: Law = {
  kind: 'constant-q',
  gainUnit: '',
  gainSymbol: 'x',
  ramp_V: (gain, point) => Math.max(0, gain * point.swing_V - point.up_V),
  gainFor: (ramp_V, point) => (ramp_V + point.up_V) / point.swing_V,
  clampOffDuty: (gain) => gain,
};

/** Every law, in the order in which they are compared: from the least known to the most. */
export const laws: Readonly<Record<LawKind, Law>> = {
  fixed: proportional('fixed', 'S·L', 'V', () => 1),
  vin: proportional('vin', 'k', '', (point) => point.inputVoltage_V),
  vout: proportional('vout', 'p', '', (point) => point.outputVoltage_V),
  'constant-q': constantQ,
};
