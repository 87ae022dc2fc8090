import { engineering } from '../../base/engineering.ts';
import type { Problem } from '../../base/Problem.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { nodeCapacitance_F, resetSwitch } from '../DeviceModels.ts';
import { type Bound, boundsOf, isBroken } from './bounds.ts';
import type { BoardOpampSizing } from './candidate.ts';
import type { Headroom } from './headroom.ts';
import { limits } from './limits.ts';
import { resetTimeNeeded_s } from './resetTime.ts';

interface Inequality {
  readonly key: string;
  /** In words, `left ≤ right`. */
  readonly inequality: string;
  readonly left: number;
  readonly right: number;
  readonly unit: string;
  readonly fix: string;
}

/** The inequalities that no set of parts can meet, with their numbers and the ways out. */
export function refusals(demand: RampDemand, room: Headroom, request: ReadSpecification): Problem[] {
  const supply = [switchDrive(demand), setVoltage(room, demand)].filter(isBroken);
  // Without the voltages that the build needs, the rest has no meaning.
  if (supply.length > 0) return supply.map((check) => problemOf(check, request));
  return [resetTime(demand), attenuation(demand, room), faintness(demand, room), current(demand, room)]
    .filter(isBroken)
    .map((check) => problemOf(check, request));
}

/** What the set of parts that comes closest still breaks: each bound can be met, not all together. */
export function refuseNearest(
  demand: RampDemand,
  sets: readonly BoardOpampSizing[],
  request: ReadSpecification,
): Problem[] {
  const brokenOf = (set: BoardOpampSizing) => boundsOf(demand, set).filter(isBroken);
  const distance = (broken: readonly Bound[]) =>
    broken.reduce((sum, { left, right }) => sum + Math.log(left / Math.max(right, 1e-3 * left)), 0);
  const nearest = sets.map(brokenOf).reduce((a, b) => (distance(b) < distance(a) ? b : a));
  return nearest.map((bound) =>
    problemOf({ ...bound, ...wordsOf(bound.id, demand, sets[0]!.headroom) }, request),
  );
}

function problemOf(check: Inequality, request: ReadSpecification): Problem {
  return {
    code: 'no-circuit',
    severity: 'error',
    key: check.key,
    place: request.place(check.key),
    expected: `${check.inequality}: at most ${engineering(check.right, check.unit, 4)}`,
    received: engineering(check.left, check.unit, 4),
    fix: check.fix,
  };
}

function switchDrive(demand: RampDemand): Inequality {
  return {
    key: 'ramp.supply',
    inequality: 'gate voltage that turns the reset switch on ≤ lowest supply',
    left: resetSwitch.threshold_V + limits.gateOverdrive_V,
    right: demand.supply_V.low,
    unit: 'V',
    fix: 'raise ramp.supply',
  };
}

function setVoltage(room: Headroom, demand: RampDemand): Inequality {
  const spent = demand.supply_V.low - room.setVoltage_V;
  const supplyBound = demand.track_V.high * limits.dividerRatioHigh > room.setVoltage_V;
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

function resetTime(demand: RampDemand): Inequality {
  return {
    key: 'maximumDuty',
    inequality: 'time to reset the ramp ≤ time left of the period at maximum duty',
    left: resetTimeNeeded_s(demand, demand.capacitance_F ?? limits.capacitanceLow_F),
    right: demand.resetTime_s,
    unit: 's',
    fix: 'lower maximumDuty so that (1 − maximumDuty)/frequency leaves that time, or lower the frequency',
  };
}

/** Amplitude at the sense element that the demand asks for at the highest tracked voltage [V]. */
function wantedAmplitude_V(demand: RampDemand): number {
  return (demand.givenSlope_per_s ?? demand.requiredSlope_per_s) * demand.track_V.high * demand.riseTime_s;
}

const scaleDown = 'raise the inductance or the frequency, lower senseGain, or raise ramp.supply';

function attenuation(demand: RampDemand, room: Headroom): Inequality {
  return {
    key: 'senseGain',
    inequality:
      'ramp at the sense element, at the highest input and maximum duty ≤ capacitor amplitude with equal summing resistors',
    left: wantedAmplitude_V(demand),
    right: room.ramp_V / limits.summingRatioLow,
    unit: 'V',
    fix: scaleDown,
  };
}

const scaleUp = 'so small a ramp is hardly needed: give a larger ramp.gain, or leave the ramp out';

function faintness(demand: RampDemand, room: Headroom): Inequality {
  const ratio = limits.senseResistor_ohm / limits.summingResistorHigh_ohm;
  return {
    key: 'ramp.gain',
    inequality: 'least ramp that the summing resistors can make ≤ ramp at the sense element',
    left: ratio * limits.amplitudeShareLow * room.ramp_V,
    right: wantedAmplitude_V(demand),
    unit: 'V',
    fix: scaleUp,
  };
}

function current(demand: RampDemand, room: Headroom): Inequality {
  const least = demand.capacitance_F ?? limits.capacitanceLow_F;
  const amplitude = Math.max(limits.amplitudeShareLow * room.ramp_V, wantedAmplitude_V(demand));
  return {
    ...wordsOf('current high', demand, room),
    inequality: 'charging current of the least capacitor at the least amplitude ≤ what the build carries',
    left: ((least + nodeCapacitance_F) * amplitude) / demand.riseTime_s,
    right: limits.chargingCurrentHigh_A,
  };
}

type Words = Omit<Inequality, 'left' | 'right'>;

/** What a bound of a set of parts is called, and which key of the specification moves it. */
function wordsOf(id: Bound['id'], demand: RampDemand, room: Headroom): Words {
  const free = demand.capacitance_F === null;
  switch (id) {
    case 'amplitude high':
      return {
        key: 'ramp.supply',
        inequality: 'greatest amplitude on the timing capacitor ≤ its headroom',
        unit: 'V',
        fix: 'raise ramp.supply, or choose a finer resistor series',
      };
    case 'amplitude low':
      return {
        key: 'ramp.series.resistor',
        inequality: 'a tenth of the headroom ≤ amplitude on the timing capacitor',
        unit: 'V',
        fix: 'choose a finer resistor series',
      };
    case 'current high':
      return { ...currentWords(demand, room), unit: 'A' };
    case 'current low':
      return {
        key: free ? 'input' : 'ramp.capacitance',
        inequality: 'least charging current that leakage leaves in peace ≤ that at the lowest input',
        unit: 'A',
        fix: 'narrow the input range, or raise ramp.capacitance where it is given',
      };
    case 'summing low':
      return {
        key: 'senseGain',
        inequality: 'resistor at the sense element ≤ ramp resistor',
        unit: 'Ω',
        fix: scaleDown,
      };
    case 'summing high':
      return {
        key: 'ramp.gain',
        inequality: 'ramp resistor ≤ what noise allows',
        unit: 'Ω',
        fix: scaleUp,
      };
    case 'reset':
      return {
        key: free ? 'maximumDuty' : 'ramp.capacitance',
        inequality: 'time to reset the ramp ≤ time left of the period at maximum duty',
        unit: 's',
        fix: 'lower maximumDuty or the frequency, or ramp.capacitance where it is given',
      };
    case 'spread':
      return {
        key: 'input',
        inequality: 'half of the nominal slope ≤ what the worst unit delivers at the lowest input',
        unit: '',
        fix: 'narrow the input range: offsets weigh most where the input is lowest',
      };
  }
}

/** A steep ramp takes its current at any frequency; a small amplitude only in a short period. */
function currentWords(demand: RampDemand, room: Headroom): Omit<Words, 'unit'> {
  const inequality = 'charging current at the highest input ≤ what the build carries';
  if (demand.capacitance_F !== null)
    return { key: 'ramp.capacitance', inequality, fix: 'lower ramp.capacitance, or leave it free' };
  if (wantedAmplitude_V(demand) > limits.amplitudeShareLow * room.ramp_V)
    return {
      key: 'senseGain',
      inequality,
      fix: 'raise the inductance or lower senseGain: the ramp is steep',
    };
  return { key: 'frequency', inequality, fix: 'lower the frequency' };
}
