/**
 * Bounds within which the build is known to behave; all common practice.
 */
export const limits = {
  /** Below, leakage, base currents and offsets count [A]. */
  chargingCurrentLow_A: 2e-6,
  /** Above, the op-amp and the mirror's headroom suffer [A]. */
  chargingCurrentHigh_A: 1e-3,
  /** Below, strays make the slope [F]. */
  capacitanceLow_F: 100e-12,
  /** Above, C0G becomes large and dear, and the reset slow [F]. */
  capacitanceHigh_F: 10e-9,
  /** Share of the supply that the mirror's emitter resistors take at the highest current. */
  degenerationShare: 0.2,
  /** Highest voltage across the set resistor: more gains no accuracy [V]. */
  setVoltageHigh_V: 2,
  /** Highest share of the tracked voltage that the divider passes on. */
  dividerRatioHigh: 0.8,
  /** Lowest of it at the highest input: less drowns in the op-amp's offset [V]. */
  setVoltageLow_V: 0.4,
  /** Current through the divider at the highest input [A]. */
  dividerCurrent_A: 100e-6,
  /** Resistor between sense element and comparator [Ω]. */
  senseResistor_ohm: 1e3,
  /** Ramp resistor over sense resistor: at 1 the current signal is halved. */
  summingRatioLow: 1,
  /** Above, the ramp resistor picks up noise [Ω]. */
  summingResistorHigh_ohm: 1e6,
  /** Least amplitude on the timing capacitor as a share of the greatest possible. */
  amplitudeShareLow: 0.1,
  /** What the reset switch's gate must have above its threshold [V]. */
  gateOverdrive_V: 0.5,
  /** Least that the worst unit may deliver of the nominal slope. */
  spreadLow: 0.5,
  /** Clock edges and propagation that the reset must have besides its time constants [s]. */
  resetOverhead_s: 10e-9,
} as const;

/** What the search prefers where several sets of parts meet the bounds. */
export const preferences = {
  capacitance_F: 470e-12,
  chargingCurrent_A: 250e-6,
  /** Share of the possible amplitude. */
  amplitudeShare: 0.8,
} as const;
