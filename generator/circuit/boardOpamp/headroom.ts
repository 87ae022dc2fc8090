import type { RampDemand } from '../../ramp/RampDemand.ts';
import { bipolar, opamp } from '../DeviceModels.ts';
import { limits } from './limits.ts';

/** Voltages that the lowest supply leaves, all at the highest tracked voltage [V]. */
export interface Headroom {
  /** Across the mirror's emitter resistors. */
  readonly degeneration_V: number;
  /** Highest voltage across the set resistor for which the voltage-to-current transistor stays active. */
  readonly setVoltage_V: number;
  /** Highest voltage of the timing capacitor for which mirror and buffer stay linear. */
  readonly ramp_V: number;
}

/**
 *   V_set ≤ Vcc − V_RE − V_EB − V_CE,sat   (mirror input side; op-amp: V_set + V_BE ≤ Vcc − margin)
 *   V_ramp ≤ Vcc − V_RE − V_CE,sat         (mirror output side; buffer: V_ramp ≤ Vcc − margin)
 */
export function headroom({ supply_V, track_V }: RampDemand): Headroom {
  const degeneration_V = limits.degenerationShare * supply_V.low;
  const below = supply_V.low - degeneration_V - bipolar.saturation_V;
  return {
    degeneration_V,
    setVoltage_V: Math.min(
      limits.setVoltageHigh_V,
      below - bipolar.baseEmitterHigh_V,
      limits.dividerRatioHigh * track_V.high,
    ),
    ramp_V: Math.min(below, supply_V.low - opamp.outputMargin_V),
  };
}
