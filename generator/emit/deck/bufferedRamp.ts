import { followerLag_s } from '../../circuit/DeviceModels.ts';
import type { RampFigures } from '../../circuit/rampFigures.ts';

/** The ramp behind its buffer, some time after its start, as if the summing network were not there. */
export interface BufferedRamp {
  readonly value_V: number;
  readonly slope_V_per_s: number;
}

/**
 * The buffer trails the ramp's slope S, and the drop d with which the clock's edge begins it:
 *
 *   y = residual − d·(1 − e) + S·(t − τ·(1 − e)),  e = e^(−t/τ)
 */
export function bufferedRamp(figures: RampFigures, time_s: number): BufferedRamp {
  const { capacitorSlope_V_per_s: slope, residual_V, startDrop_V } = figures;
  const left = Math.exp(-time_s / followerLag_s);
  return {
    value_V: residual_V - startDrop_V * (1 - left) + slope * (time_s - followerLag_s * (1 - left)),
    slope_V_per_s: slope * (1 - left) - (startDrop_V / followerLag_s) * left,
  };
}
