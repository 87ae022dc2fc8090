import type { ForwardStage } from '../../spec/Specification.ts';
import type { PowerStage } from '../PowerStage.ts';

/** Share of the input that a stage puts across its primary. */
const primaryShare: Record<ForwardStage, number> = {
  single: 1,
  'two-switch': 1,
  'half-bridge': 0.5,
  'push-pull': 1,
  'full-bridge': 1,
};

/**
 * Forward family, inductor on the secondary, n = Np/Ns: m1·L = Vin/n − Vout − Vd, m2·L = Vout + Vd.
 *
 * A half-bridge puts half the input across its primary. The magnetizing current is sensed with the load's:
 * its slope counts n·Vp/Lm per secondary ampere, compensation that comes free.
 * @source the buck converter seen through an ideal transformer (common practice)
 */
export function forward(turnsRatio: number, stage: ForwardStage): PowerStage {
  const primary_V = (input_V: number) => input_V * primaryShare[stage];
  return {
    kind: 'forward',
    inductorVoltages(point, drops) {
      const current = point.loadCurrent_A;
      const secondary_ohm = drops.winding_ohm + drops.rectifier_ohm;
      const switch_V = (current / turnsRatio) * drops.switch_ohm;
      const falling_V = point.outputVoltage_V + drops.rectifierDrop_V + current * secondary_ohm;
      return {
        up_V: (primary_V(point.inputVoltage_V) - switch_V) / turnsRatio - falling_V,
        down_V: falling_V,
      };
    },
    currentRatio: () => 1,
    freeRamp_V: (point) => turnsRatio * primary_V(point.inputVoltage_V),
  };
}
