import { resistorTolerance, timingCapacitorTolerance } from '../../parts/catalogue.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import {
  bipolar,
  mirrorRatio,
  nodeCapacitance_F,
  opamp,
  resetSwitch,
  stray,
  thermalVoltage_V,
} from '../DeviceModels.ts';

/** One cause of a wrong slope: relative, at its low and its high end. */
export interface SpreadCause {
  readonly parameter: string;
  readonly low: number;
  readonly high: number;
}

/** What the slope's spread depends on; voltages and current at the lowest tracked voltage, where they weigh most. */
export interface SpreadPoint {
  readonly capacitance_F: number;
  readonly totalCapacitance_F: number;
  readonly dividerRatio: number;
  readonly dividerSource_ohm: number;
  readonly setVoltageLow_V: number;
  readonly degenerationLow_V: number;
  readonly chargingCurrentLow_A: number;
}

/**
 * Every cause of a wrong slope with its extreme values, for a worst-case (extreme value) product.
 *
 * No extreme lies inside what the part equations give: ratios are exact, the mirror's are bounds. An
 * emitter voltage V_RE turns an offset δ of the pair into δ/(V_RE + V_T); the Early effect is reduced
 * by 1 + V_RE/V_T and only ever raises the slope, leakage only ever lowers it.
 */
export function spreadCauses(demand: RampDemand, point: SpreadPoint): readonly SpreadCause[] {
  const r = resistorTolerance(demand.series.resistor);
  const offset_V = opamp.offset_V + opamp.inputBias_A * point.dividerSource_ohm;
  const set = { parameter: 'set resistor', low: 1 / (1 + r) - 1, high: 1 / (1 - r) - 1 };
  const input = [
    set,
    divider(r, point.dividerRatio),
    symmetric('op-amp offset', offset_V / point.setVoltageLow_V),
  ];
  // The current that the mirror is fed with moves its emitter voltage, and with that its own errors.
  const fed = worstSpread(input);
  const feedback = point.degenerationLow_V * (1 - r) * fed.low + thermalVoltage_V;
  const most_V = point.degenerationLow_V * (1 + r) * fed.high;
  const mismatch = most_V / (most_V + thermalVoltage_V);
  const pair = bipolar.pairOffset_V / feedback;
  const nominal = mirrorRatio(bipolar.currentGain);
  const early = (demand.supply_V.high / bipolar.earlyVoltage_V) * (thermalVoltage_V / feedback);
  return [
    ...capacitances(demand, point),
    ...input,
    { parameter: 'mirror resistors', low: -2 * r * mismatch, high: ratioHigh(r) * mismatch },
    { parameter: 'mirror pair offset', low: -pair, high: Math.exp(pair) - 1 },
    { parameter: 'summing resistors', low: 1 / (1 + ratioHigh(r)) - 1, high: ratioHigh(r) },
    symmetric('reference', demand.trackToleranceRatio),
    {
      parameter: 'current gain',
      low: mirrorRatio(bipolar.currentGainLow) / nominal - 1,
      high: mirrorRatio(bipolar.currentGainHigh) / nominal - 1,
    },
    { parameter: 'Early effect', low: 0, high: early },
    {
      parameter: 'leakage',
      low:
        -(resetSwitch.leakage_A + opamp.inputBias_A) / (point.chargingCurrentLow_A * Math.max(fed.low, 0.5)),
      high: 0,
    },
  ];
}

/** How far the ratio of two resistors goes up when each is at its worst. */
function ratioHigh(tolerance: number): number {
  return (1 + tolerance) / (1 - tolerance) - 1;
}

/** The slope is inversely proportional to their sum; the strays' part is what they add to the capacitor's. */
function capacitances(demand: RampDemand, point: SpreadPoint): SpreadCause[] {
  const tolerance = demand.capacitorToleranceRatio ?? timingCapacitorTolerance;
  const own = (tolerance * point.capacitance_F) / point.totalCapacitance_F;
  const strays = (stray.toleranceRatio * nodeCapacitance_F) / point.totalCapacitance_F;
  return [
    { parameter: 'timing capacitor', low: 1 / (1 + own) - 1, high: 1 / (1 - own) - 1 },
    {
      parameter: 'stray capacitance',
      low: (1 + own) / (1 + own + strays) - 1,
      high: (1 - own) / (1 - own - strays) - 1,
    },
  ];
}

/** Lower over whole with the two parts at opposite ends. */
function divider(tolerance: number, ratio: number): SpreadCause {
  const at = (sign: 1 | -1) => (1 + sign * tolerance) / (1 + sign * tolerance * (2 * ratio - 1)) - 1;
  return { parameter: 'divider', low: at(-1), high: at(1) };
}

function symmetric(parameter: string, ratio: number): SpreadCause {
  return { parameter, low: -ratio, high: ratio };
}

/** Extreme value: every cause at its worst at once; nothing is left where one takes all. */
export function worstSpread(causes: readonly SpreadCause[]): { readonly low: number; readonly high: number } {
  return {
    low: causes.reduce((product, cause) => product * Math.max(0, 1 + cause.low), 1),
    high: causes.reduce((product, cause) => product * (1 + cause.high), 1),
  };
}
