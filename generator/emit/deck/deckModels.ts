import { bipolar, opamp, resetSwitch } from '../../circuit/DeviceModels.ts';
import { fixedNumber } from '../text/fixedNumber.ts';

/** Pole capacitance of the op-amp macro [F]; only its ratio to the transconductance counts. */
const pole_F = 10e-12;

/** Numbers of the generic devices as the netlist writes them. */
export const deckModels = {
  opamp: opampNumbers(),
  bipolar: {
    saturation: fixedNumber(bipolar.saturationCurrent_A),
    gain: fixedNumber(bipolar.currentGain),
    early: fixedNumber(bipolar.earlyVoltage_V),
  },
  nmos: {
    threshold: fixedNumber(resetSwitch.threshold_V),
    transconductance: fixedNumber(resetSwitch.transconductance_A_per_V2 / resetSwitch.widthLengthRatio),
  },
};

/** One pole: gm = 2π·GBW·C, and a resistance that gives the open-loop gain. */
function opampNumbers() {
  const transconductance = 2 * Math.PI * opamp.gainBandwidth_Hz * pole_F;
  return {
    inputResistance: fixedNumber(opamp.inputResistance_ohm),
    inputCapacitance: fixedNumber(opamp.inputCapacitance_F),
    transconductance: fixedNumber(transconductance, 6),
    poleResistance: fixedNumber(opamp.openLoopGain / transconductance, 6),
    poleCapacitance: fixedNumber(pole_F),
    outputResistance: fixedNumber(opamp.outputResistance_ohm),
  };
}
