/**
 * Generic devices of our own that the boards are sized with and the netlists carry.
 *
 * No maker's part: each value is what any current catalogue part of its class reaches (common practice).
 */

/** Thermal voltage at 27 °C, the engines' nominal temperature [V]. */
export const thermalVoltage_V = 0.025864;

/** Small-signal bipolar transistor of either polarity. */
export const bipolar = {
  saturationCurrent_A: 1e-14,
  currentGain: 200,
  /** Spread of the current gain over units and temperature. */
  currentGainLow: 100,
  currentGainHigh: 400,
  earlyVoltage_V: 100,
  /** Least collector-emitter voltage at which it still is a current source [V]. */
  saturation_V: 0.4,
  /** Greatest base-emitter voltage at these currents, cold [V]. */
  baseEmitterHigh_V: 0.8,
  /** Offset between the base-emitter voltages of a matched pair [V]. */
  pairOffset_V: 1e-3,
} as const;

/** Logic-level small-signal MOSFET as the reset switch. */
export const resetSwitch = {
  threshold_V: 1.5,
  /** Transconductance parameter at its width over length of one hundred [A/V²]. */
  transconductance_A_per_V2: 0.1,
  widthLengthRatio: 100,
  /** Gate-drain capacitance: couples the clock edge into the timing capacitor [F]. */
  gateDrain_F: 1e-12,
  /** Drain current with the gate low, hot, at a few volts [A]. */
  leakage_A: 100e-9,
} as const;

/** Rail-to-rail op-amp; a dual serves both places. */
export const opamp = {
  openLoopGain: 1e5,
  gainBandwidth_Hz: 20e6,
  inputCapacitance_F: 3e-12,
  inputResistance_ohm: 1e9,
  outputResistance_ohm: 20,
  offset_V: 1e-3,
  /** CMOS input, hot [A]. */
  inputBias_A: 1e-9,
  /** Closest that the output comes to the supply [V]. */
  outputMargin_V: 0.1,
} as const;

/** What layout and the transistor junctions add at the timing capacitor [F], and how well strays are known. */
export const stray = { capacitance_F: 5e-12, toleranceRatio: 0.5 } as const;

/** Resistance of the reset switch, its gate at `gate_V` [Ω]. */
export function switchResistance_ohm(gate_V: number): number {
  return 1 / (resetSwitch.transconductance_A_per_V2 * (gate_V - resetSwitch.threshold_V));
}

/** Everything that hangs on the timing capacitor besides itself [F]; no part of it is known well. */
export const nodeCapacitance_F = stray.capacitance_F + opamp.inputCapacitance_F + resetSwitch.gateDrain_F;

/**
 * Output over input of a degenerated mirror fed by a transistor: base currents only.
 *
 *   β/(β + 1) · 1/(1 + 2/β)
 */
export function mirrorRatio(currentGain: number): number {
  return currentGain / (currentGain + 1) / (1 + 2 / currentGain);
}

/** Time constant with which a follower trails its input [s]: 1/(2π·GBW). */
export const followerLag_s = 1 / (2 * Math.PI * opamp.gainBandwidth_Hz);
