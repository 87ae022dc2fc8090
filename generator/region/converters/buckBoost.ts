import type { ConverterKind } from '../../spec/Specification.ts';
import { loadedVoltages } from '../conductionLosses.ts';
import type { PowerStage } from '../PowerStage.ts';

/**
 * Inverting buck-boost, and SEPIC and Ćuk with L = L1∥L2 and the sum of both currents sensed.
 *
 * m1·L = Vin, m2·L = |Vout| + Vd; with no losses D = (|Vout| + Vd)/(Vin + |Vout| + Vd). The losses count at
 * I = Iload/D′.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from memory)
 */
function indirect(kind: ConverterKind): PowerStage {
  return {
    kind,
    inductorVoltages(point, drops) {
      const lossless = {
        up_V: point.inputVoltage_V,
        down_V: point.outputVoltage_V + drops.rectifierDrop_V,
      };
      return loadedVoltages(lossless, point.loadCurrent_A, {
        up_ohm: drops.switch_ohm + drops.winding_ohm,
        down_ohm: drops.rectifier_ohm + drops.winding_ohm,
      });
    },
    currentRatio: (duty) => 1 / (1 - duty),
    freeRamp_V: () => 0,
  };
}

export const buckBoost = indirect('buck-boost');
export const sepic = indirect('sepic');
export const cuk = indirect('cuk');
