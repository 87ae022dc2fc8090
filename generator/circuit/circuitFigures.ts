import { slewNeeded_V_per_s } from './boardOpamp/slewNeeded.ts';
import { bipolar, followerLag_s, nodeCapacitance_F, opamp } from './DeviceModels.ts';
import { currentSourceVoltages, rampFigures } from './rampFigures.ts';
import type { SizedDesign } from './SizedDesign.ts';

/** One figure of the real block, with the bound that it is held against where there is one. */
export interface Figure {
  readonly id: string;
  readonly value: number;
  readonly unit: string;
  readonly limit: number | null;
  readonly source: string;
}

/** What else there is to know of the block; most of it has a rule. */
export function circuitFigures(design: SizedDesign): readonly Figure[] {
  const { demand, sizing } = design;
  const low = currentSourceVoltages(design, demand.track_V.low);
  const high = currentSourceVoltages(design, demand.track_V.high);
  const top = rampFigures(design, demand.track_V.high);
  const supplyLow = demand.supply_V.low;
  const own = (id: string, value: number, unit: string, limit: number | null = null): Figure => ({
    id,
    value,
    unit,
    limit,
    source: 'from the part values',
  });
  return [
    own('divider ratio', sizing.divider.ratio, ''),
    own(
      'divider current at highest input',
      (demand.track_V.high * sizing.divider.ratio) / sizing.divider.lower_ohm,
      'A',
    ),
    own('set voltage at lowest input', low.set_V, 'V'),
    own('set voltage at highest input', high.set_V, 'V', sizing.headroom.setVoltage_V),
    own('mirror degeneration at lowest input', low.degeneration_V, 'V'),
    own(
      'voltage-to-current transistor, least collector-emitter voltage',
      supplyLow - high.degeneration_V - bipolar.baseEmitterHigh_V - high.set_V,
      'V',
      bipolar.saturation_V,
    ),
    own(
      'greatest amplitude, spread included',
      sizing.amplitude_V * sizing.spread.high,
      'V',
      sizing.headroom.ramp_V,
    ),
    own('reset residual at highest input', top.residual_V, 'V', top.amplitude_V / 100),
    own(
      'capacitance at the ramp besides the timing capacitor',
      nodeCapacitance_F,
      'F',
      sizing.capacitance_F / 10,
    ),
    own('buffer lag', followerLag_s, 's'),
    own('slew rate that the buffer needs for the reset', slewNeeded_V_per_s(sizing, demand), 'V/s'),
    own(
      'divider filter time constant',
      sizing.divider.source_ohm * (sizing.divider.filter_F ?? opamp.inputCapacitance_F),
      's',
    ),
    ...sizing.causes.map((cause) => own(`spread, low side: ${cause.parameter}`, cause.low, '')),
    own('ramp spread, low side, all causes at their worst', sizing.spread.low - 1, ''),
    own('ramp spread, high side, all causes at their worst', sizing.spread.high - 1, ''),
  ];
}
