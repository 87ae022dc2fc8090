import { loadedVoltages } from '../conductionLosses.ts';
import type { PowerStage } from '../PowerStage.ts';

/**
 * Boost: m1·L = Vin, m2·L = Vout + Vd − Vin, less and more the losses at I = Iload/D′.
 *
 * With no losses D = 1 − Vin/(Vout + Vd) and U = Vout + Vd.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from memory)
 */
export const boost: PowerStage = {
  kind: 'boost',
  inductorVoltages(point, drops) {
    const lossless = {
      up_V: point.inputVoltage_V,
      down_V: point.outputVoltage_V + drops.rectifierDrop_V - point.inputVoltage_V,
    };
    return loadedVoltages(lossless, point.loadCurrent_A, {
      up_ohm: drops.switch_ohm + drops.winding_ohm,
      down_ohm: drops.rectifier_ohm + drops.winding_ohm,
    });
  },
  currentRatio: (duty) => 1 / (1 - duty),
  freeRamp_V: () => 0,
};
