import { engineering } from '../../base/engineering.ts';
import type { Problem } from '../../base/Problem.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { nodeCapacitance_F, switchResistance_ohm } from '../DeviceModels.ts';
import type { Divider } from './divider.ts';
import type { Headroom } from './headroom.ts';
import { limits } from './limits.ts';

/**
 * The inequalities that no set of parts can meet, with their numbers and the ways out.
 *
 * With a divider: the search came back empty, and the bounds that the parts meet one by one are listed.
 */
export function refusals(
  demand: RampDemand,
  room: Headroom,
  request: ReadSpecification,
  divider?: Divider,
): Problem[] {
  const checks = [
    resetTime(demand),
    setVoltage(room, demand),
    attenuation(demand, room),
    faintness(demand, room),
    current(demand, room),
  ];
  const broken = checks.filter((check) => !(check.left <= check.right));
  const refused = broken.length === 0 && divider ? [search(demand)] : broken;
  return refused.map((check) => ({
    code: 'no-circuit',
    severity: 'error',
    key: check.key,
    place: request.place(check.key),
    expected: `${check.inequality}: at most ${engineering(check.right, check.unit)}`,
    received: engineering(check.left, check.unit),
    fix: check.fix,
  }));
}

interface Inequality {
  readonly key: string;
  /** In words, `left ≤ right`. */
  readonly inequality: string;
  readonly left: number;
  readonly right: number;
  readonly unit: string;
  readonly fix: string;
}

/** Least time in which the timing capacitor falls to one per cent, edges included [s]. */
export function resetTimeNeeded_s(demand: RampDemand, capacitance_F: number): number {
  const switch_ohm = switchResistance_ohm(demand.supply_V.low);
  return limits.resetOverhead_s + Math.log(100) * switch_ohm * (capacitance_F + nodeCapacitance_F);
}

function resetTime(demand: RampDemand): Inequality {
  return {
    key: 'maximumDuty',
    inequality: 'time to reset the ramp ≤ time left of the period at maximum duty',
    left: resetTimeNeeded_s(demand, demand.capacitance_F ?? limits.capacitanceLow_F),
    right: demand.resetTime_s,
    unit: 's',
    fix: `lower maximumDuty so that (1 − maximumDuty)/frequency leaves that time, or lower the frequency`,
  };
}

function setVoltage(room: Headroom, demand: RampDemand): Inequality {
  const spent = demand.supply_V.low - room.setVoltage_V;
  const supplyBound = demand.track_V.high * 0.8 > room.setVoltage_V;
  return {
    key: supplyBound ? 'ramp.supply' : 'input',
    inequality: 'least voltage across the set resistor at the highest input ≤ what the lowest supply leaves',
    left: limits.setVoltageLow_V,
    right: room.setVoltage_V,
    unit: 'V',
    fix: supplyBound
      ? `raise ramp.supply: mirror and transistor take ${engineering(spent, 'V')} of it`
      : 'raise the input voltage',
  };
}

/** Amplitude at the sense element that the demand asks for at the highest tracked voltage [V]. */
function wantedAmplitude_V(demand: RampDemand): number {
  return (demand.givenSlope_per_s ?? demand.requiredSlope_per_s) * demand.track_V.high * demand.riseTime_s;
}

function attenuation(demand: RampDemand, room: Headroom): Inequality {
  return {
    key: 'senseGain',
    inequality:
      'ramp at the sense element, at the highest input and maximum duty ≤ capacitor amplitude with equal summing resistors',
    left: wantedAmplitude_V(demand),
    right: room.ramp_V / limits.summingRatioLow,
    unit: 'V',
    fix: 'raise the inductance or the frequency, lower senseGain, or raise ramp.supply',
  };
}

function faintness(demand: RampDemand, room: Headroom): Inequality {
  const ratio = limits.senseResistor_ohm / limits.summingResistorHigh_ohm;
  return {
    key: 'ramp.gain',
    inequality: 'least ramp that the summing resistors can make ≤ ramp at the sense element',
    left: ratio * limits.amplitudeShareLow * room.ramp_V,
    right: wantedAmplitude_V(demand),
    unit: 'V',
    fix: 'so small a ramp is hardly needed: give a larger ramp.gain, or leave the ramp out',
  };
}

function current(demand: RampDemand, room: Headroom): Inequality {
  const least = demand.capacitance_F ?? limits.capacitanceLow_F;
  const amplitude = Math.max(limits.amplitudeShareLow * room.ramp_V, wantedAmplitude_V(demand));
  return {
    key: demand.capacitance_F === null ? 'frequency' : 'ramp.capacitance',
    inequality: 'charging current of the least capacitor at the least amplitude ≤ what the build carries',
    left: ((least + nodeCapacitance_F) * amplitude) / demand.riseTime_s,
    right: limits.chargingCurrentHigh_A,
    unit: 'A',
    fix: 'lower the frequency, or ramp.capacitance where it is given',
  };
}

/** Each bound can be met, not all together: the span of currents over the input is what is left. */
function search(demand: RampDemand): Inequality {
  return {
    key: 'input',
    inequality:
      'highest over lowest charging current ≤ the span that the build carries with parts of the series',
    left: demand.track_V.high / demand.track_V.low,
    right: limits.chargingCurrentHigh_A / limits.chargingCurrentLow_A / 10,
    unit: '',
    fix: 'narrow the input range, leave ramp.capacitance free, or choose a finer resistor series',
  };
}
