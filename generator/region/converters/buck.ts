import type { PowerStage } from '../PowerStage.ts';

/**
 * Buck: m1·L = Vin − Vout − I·(Rsw + Rw), m2·L = Vout + Vd + I·(Rrect + Rw).
 *
 * With no losses D = (Vout + Vd)/(Vin + Vd) and U = Vin + Vd.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from
 *   memory), with the drops carried through both intervals so that m1·D = m2·D′.
 */
export const buck: PowerStage = {
  kind: 'buck',
  inductorVoltages(point, drops) {
    const current = point.loadCurrent_A;
    return {
      up_V: point.inputVoltage_V - point.outputVoltage_V - current * (drops.switch_ohm + drops.winding_ohm),
      down_V:
        point.outputVoltage_V + drops.rectifierDrop_V + current * (drops.rectifier_ohm + drops.winding_ohm),
    };
  },
  currentRatio: () => 1,
  freeRamp_V: () => 0,
};
