import { bipolar, mirrorRatio, resetSwitch, switchResistance_ohm } from './DeviceModels.ts';
import type { SizedDesign } from './SizedDesign.ts';

/** What the generator does at one tracked voltage, nominal parts and nominal period. */
export interface RampFigures {
  readonly track_V: number;
  readonly chargingCurrent_A: number;
  readonly capacitorSlope_V_per_s: number;
  /** At the sense element, before the summing network. */
  readonly senseSlope_V_per_s: number;
  /** At the comparator's input. */
  readonly comparatorSlope_V_per_s: number;
  /** At the capacitor at the end of the rise, with what reset and clock edge leave. */
  readonly amplitude_V: number;
  readonly residual_V: number;
}

/** Share of the current signal that the summing network lets through: Rramp/(Rramp + Rsense). */
export function senseAttenuation({ sizing }: Pick<SizedDesign, 'sizing'>): number {
  return sizing.summing_ohm / (sizing.summing_ohm + sizing.sense_ohm);
}

/** Rise and fall time of the clock that the figures and decks assume [s]. */
export function clockEdge_s(period_s: number): number {
  return period_s / 1000;
}

/** Nominal period [s] and the part of it in which the ramp rises, in which it is reset. */
export function rampTiming({ demand, request }: SizedDesign) {
  const rise_s = request.specification.maximumDutyRatio * demand.period_s;
  return { period_s: demand.period_s, rise_s, reset_s: demand.period_s - rise_s };
}

/**
 * Closed form of the ramp from the part values.
 *
 *   residual = I·Ron + A·e^(−t_reset/(Ron·C))
 */
export function rampFigures(design: SizedDesign, track_V: number): RampFigures {
  const { sizing, demand } = design;
  const { rise_s, reset_s } = rampTiming(design);
  const capacitorSlope_V_per_s = sizing.capacitorSlope_per_s * track_V;
  const chargingCurrent_A = capacitorSlope_V_per_s * sizing.totalCapacitance_F;
  const switch_ohm = switchResistance_ohm(demand.supply_V.nominal);
  const swing_V = capacitorSlope_V_per_s * (rise_s - 2 * clockEdge_s(demand.period_s));
  const residual_V =
    chargingCurrent_A * switch_ohm + swing_V * Math.exp(-reset_s / (switch_ohm * sizing.totalCapacitance_F));
  const senseSlope_V_per_s = sizing.senseSlope_per_s * track_V;
  return {
    track_V,
    chargingCurrent_A,
    capacitorSlope_V_per_s,
    senseSlope_V_per_s,
    comparatorSlope_V_per_s: senseSlope_V_per_s * senseAttenuation(design),
    amplitude_V: swing_V + residual_V - clockFeedthrough_V(design),
    residual_V,
  };
}

/**
 * What the falling clock edge takes from the start of the ramp [V].
 *
 *   (C_gd/C)·(V_th + √(πUC/2β)·erf((V_clk − V_th)·√(β/2UC))),  U the edge's slope, β the switch's
 *
 * The channel absorbs the feedthrough until it is too weak to follow the edge. tanh stands in for erf,
 * within 0.03.
 * @source Sheu & Hu, Switch-induced error voltage on a switched capacitor, IEEE J. Solid-State Circuits,
 *   1984 (from memory); its gate-channel charge is left out, the gate-drain capacitance being the larger
 */
function clockFeedthrough_V({ sizing, demand }: SizedDesign): number {
  const { gateDrain_F, threshold_V, transconductance_A_per_V2: beta } = resetSwitch;
  const capacitance_F = sizing.totalCapacitance_F;
  const swing_V = demand.supply_V.nominal;
  const slope = swing_V / clockEdge_s(demand.period_s);
  const scale_V = Math.sqrt((2 * slope * capacitance_F) / beta);
  const weak_V =
    (Math.sqrt(Math.PI) / 2) *
    scale_V *
    Math.tanh((2 / Math.sqrt(Math.PI)) * ((swing_V - threshold_V) / scale_V));
  return (gateDrain_F / capacitance_F) * (threshold_V + weak_V);
}

/** Voltage across the set resistor, and what the mirror's emitter resistors take, at a tracked voltage [V]. */
export function currentSourceVoltages({ sizing }: SizedDesign, track_V: number) {
  const set_V = sizing.divider.ratio * track_V;
  const degeneration_V =
    (set_V / sizing.set_ohm) * sizing.degeneration_ohm * (mirrorRatio(bipolar.currentGain) + 1) * 0.5;
  return { set_V, degeneration_V };
}
