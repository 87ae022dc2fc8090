import { bipolar, mirrorRatio, resetSwitch, switchResistance_ohm, thermalVoltage_V } from './DeviceModels.ts';
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
  /** By which the clock's falling edge lets the ramp begin below the residual. */
  readonly startDrop_V: number;
}

/** Share of the current signal that the summing network lets through: Rramp/(Rramp + Rsense). */
export function senseAttenuation({ sizing }: Pick<SizedDesign, 'sizing'>): number {
  return sizing.summing_ohm / (sizing.summing_ohm + sizing.sense_ohm);
}

/**
 * Rise and fall time of the clock that the figures and decks assume [s].
 *
 * No whole number of the decks' time steps: where the end of an edge falls beside a step, one engine hands
 * the whole of the edge to the ramp, as if the switch had let go at its beginning.
 */
export function clockEdge_s(period_s: number): number {
  return period_s / 230;
}

/** When the falling clock lets go of the ramp: as it crosses the switch's threshold [s]. */
export function rampStart_s({ demand }: SizedDesign): number {
  return clockEdge_s(demand.period_s) * (1 - resetSwitch.threshold_V / demand.supply_V.nominal);
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
  const early = 1 + earlyExcess(design, track_V);
  const capacitorSlope_V_per_s = sizing.capacitorSlope_per_s * track_V * early;
  const chargingCurrent_A = capacitorSlope_V_per_s * sizing.totalCapacitance_F;
  const switch_ohm = switchResistance_ohm(demand.supply_V.nominal);
  const swing_V = capacitorSlope_V_per_s * (rise_s - rampStart_s(design) - clockEdge_s(demand.period_s));
  const residual_V =
    chargingCurrent_A * switch_ohm + swing_V * Math.exp(-reset_s / (switch_ohm * sizing.totalCapacitance_F));
  const startDrop_V = clockFeedthrough_V(design);
  const senseSlope_V_per_s = sizing.senseSlope_per_s * track_V * early;
  return {
    track_V,
    chargingCurrent_A,
    capacitorSlope_V_per_s,
    senseSlope_V_per_s,
    comparatorSlope_V_per_s: senseSlope_V_per_s * senseAttenuation(design),
    amplitude_V: swing_V + residual_V - startDrop_V,
    residual_V,
    startDrop_V,
  };
}

/**
 * By how much the mirror's output exceeds the law half-way up the ramp, a ratio.
 *
 *   ln(1 + V_CB/V_A)·V_T/(V_T + V_RE)
 *
 * The input side has no collector-base voltage; the emitter resistors oppose the difference. It is above
 * nought and largest at the lowest voltage tracked, so that it adds to stability.
 */
function earlyExcess(design: SizedDesign, track_V: number): number {
  const { demand, sizing } = design;
  const { degeneration_V } = currentSourceVoltages(design, track_V);
  const slope = sizing.capacitorSlope_per_s * track_V;
  const current_A = slope * sizing.totalCapacitance_F;
  const emitterBase_V = thermalVoltage_V * Math.log(current_A / bipolar.saturationCurrent_A);
  const base_V = demand.supply_V.nominal - degeneration_V - emitterBase_V;
  const halfWay_V = (slope * rampTiming(design).rise_s) / 2;
  return (
    (Math.log1p((base_V - halfWay_V) / bipolar.earlyVoltage_V) * thermalVoltage_V) /
    (thermalVoltage_V + degeneration_V)
  );
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
