import { loadedVoltages } from '../conductionLosses.ts';
import type { PowerStage } from '../PowerStage.ts';

/**
 * Flyback, all referred to the primary, n = Np/Ns: m1·L = Vin, m2·L = n(Vout + Vd).
 *
 * The magnetizing inductance is the inductor itself. Losses count at I = Iload/(n·D′): switch and winding
 * while it rises, the rectifier n² times while it falls.
 * @source the indirect converter seen through an ideal transformer (common practice)
 */
export function flyback(turnsRatio: number): PowerStage {
  return {
    kind: 'flyback',
    inductorVoltages(point, drops) {
      const lossless = {
        up_V: point.inputVoltage_V,
        down_V: turnsRatio * (point.outputVoltage_V + drops.rectifierDrop_V),
      };
      return loadedVoltages(lossless, point.loadCurrent_A / turnsRatio, {
        up_ohm: drops.switch_ohm + drops.winding_ohm,
        down_ohm: turnsRatio ** 2 * drops.rectifier_ohm,
      });
    },
    currentRatio: (duty) => 1 / (turnsRatio * (1 - duty)),
    freeRamp_V: () => 0,
  };
}
