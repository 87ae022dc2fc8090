/** What a rule may speak of: its SI unit (`1` where it is a plain ratio) and what it means. */
export interface QuantityMeaning {
  readonly unit: string;
  readonly meaning: string;
}

/**
 * Every named quantity of a rule deck; a new one is one line here.
 *
 * The design passes them as plain SI numbers; null says that the figure does not exist for this design,
 * and every rule that speaks of it is left out.
 */
export const quantities = {
  dampingIndexMin: { unit: '1', meaning: 'least damping index x over region and corners' },
  dampingIndexMax: { unit: '1', meaning: 'greatest damping index x over region and corners' },
  dampingIndexGoal: { unit: '1', meaning: 'damping index that the specification asks for' },
  dampingIndexCeiling: { unit: '1', meaning: 'damping index above which the loop is called sluggish' },
  cycleRatioMin: { unit: '1', meaning: 'most negative cycle ratio (ringing)' },
  cycleRatioMax: { unit: '1', meaning: 'most positive cycle ratio (sluggish)' },
  signalAtTripMin: { unit: 'V', meaning: 'least current signal at the comparator when it trips' },
  signalFloor: { unit: 'V', meaning: 'least current signal that the specification accepts at the trip' },
  rampAmplitudeMax: { unit: 'V', meaning: 'highest capacitor voltage, at highest input and maximum duty' },
  rampHeadroom: { unit: 'V', meaning: 'highest capacitor voltage that the circuit carries at lowest supply' },
  mirrorHeadroom: {
    unit: 'V',
    meaning: 'voltage left across the voltage-to-current transistor at highest input and lowest supply',
  },
  mirrorHeadroomFloor: { unit: 'V', meaning: 'least voltage that keeps that transistor out of saturation' },
  resetTime: { unit: 's', meaning: 'time available for the reset at maximum duty' },
  resetTimeNeeded: { unit: 's', meaning: 'time in which the reset reaches 1 % of the amplitude' },
  residualVoltage: { unit: 'V', meaning: 'capacitor voltage left when the next ramp starts' },
  residualRatio: { unit: '1', meaning: 'that residual as a share of the amplitude' },
  timingCapacitance: { unit: 'F', meaning: 'timing capacitor' },
  strayCapacitance: { unit: 'F', meaning: 'capacitance of switch, buffer and board at the ramp node' },
  chargingCurrentLow: { unit: 'A', meaning: 'charging current at lowest input' },
  chargingCurrentHigh: { unit: 'A', meaning: 'charging current at highest input' },
  senseAttenuation: { unit: '1', meaning: 'share of the sensed current signal that reaches the comparator' },
  senseFilterTime: { unit: 's', meaning: 'time constant at the comparator input' },
  dividerResistance: { unit: 'Ohm', meaning: 'resistance of the divider as the op-amp input sees it' },
  dividerBiasError: { unit: '1', meaning: 'error from the input bias current through the divider' },
  injectionResistance: { unit: 'Ohm', meaning: 'resistor that sums the ramp into the sense input' },
  inputVoltageMax: { unit: 'V', meaning: 'highest input voltage' },
  inputVoltageMin: { unit: 'V', meaning: 'lowest input voltage' },
  supplyVoltage: { unit: 'V', meaning: 'supply of the ramp circuit' },
  realisedGain: { unit: '1', meaning: 'gain that the chosen standard parts give nominally' },
  requiredGain: { unit: '1', meaning: 'least gain that the worst unit must deliver' },
  designGain: { unit: '1', meaning: 'nominal gain asked for, part tolerances of the ramp included' },
  gainExcess: { unit: '1', meaning: 'realised gain over design gain, less one' },
  maximumDuty: { unit: '1', meaning: 'maximum duty of the controller' },
  minimumOnTime: { unit: 's', meaning: 'shortest on-time of the controller' },
  switchingPeriod: { unit: 's', meaning: 'switching period' },
  dividerSettlingTime: { unit: 's', meaning: 'time in which the slope follows a step of the input' },
  rampToleranceRatio: { unit: '1', meaning: "slope error from the ramp circuit's own parts, worst case" },
  mirrorDegeneration: { unit: 'V', meaning: 'voltage across the mirror emitter resistors at lowest input' },
  bufferLag: { unit: 's', meaning: 'delay of the buffer behind the timing capacitor' },
  controlVoltageLow: { unit: 'V', meaning: 'control voltage of the current source at lowest input' },
} as const satisfies Readonly<Record<string, QuantityMeaning>>;

export type QuantityName = keyof typeof quantities;

/** SI values by name; null or left out: the figure does not exist for this design. */
export type DesignQuantities = Readonly<Partial<Record<QuantityName, number | null>>>;

export function isQuantityName(name: string): name is QuantityName {
  return Object.hasOwn(quantities, name);
}
