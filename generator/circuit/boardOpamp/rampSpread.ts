import { resistorTolerance, timingCapacitorTolerance } from '../../parts/catalogue.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import { bipolar, mirrorRatio, opamp, stray, thermalVoltage_V } from '../DeviceModels.ts';

/** One cause of a wrong slope: relative, at its low and its high end. */
export interface SpreadCause {
  readonly parameter: string;
  readonly low: number;
  readonly high: number;
}

/** What the slope's spread depends on; voltages at the lowest tracked voltage, where they weigh most. */
export interface SpreadPoint {
  readonly capacitance_F: number;
  readonly totalCapacitance_F: number;
  readonly dividerRatio: number;
  readonly setVoltageLow_V: number;
  readonly degenerationLow_V: number;
}

/**
 * Every cause of a wrong slope with its extreme values, for a worst-case (extreme value) sum.
 *
 * An emitter voltage V_RE turns an offset δ of the pair into δ/(V_RE + V_T); the Early effect is reduced
 * by 1 + V_RE/V_T and only ever raises the slope.
 */
export function spreadCauses(demand: RampDemand, point: SpreadPoint): readonly SpreadCause[] {
  const r = resistorTolerance(demand.series.resistor);
  const share = (part: number) => part / point.totalCapacitance_F;
  const feedback = point.degenerationLow_V + thermalVoltage_V;
  const nominal = mirrorRatio(bipolar.currentGain);
  const early = (demand.supply_V.high / bipolar.earlyVoltage_V) * (thermalVoltage_V / feedback);
  return [
    divisor('timing capacitor', timingCapacitorTolerance * share(point.capacitance_F)),
    divisor('stray capacitance', stray.toleranceRatio * share(stray.capacitance_F)),
    divisor('set resistor', r),
    symmetric('divider', 2 * r * (1 - point.dividerRatio)),
    symmetric('mirror resistors', (2 * r * point.degenerationLow_V) / feedback),
    symmetric('mirror pair offset', bipolar.pairOffset_V / feedback),
    symmetric('op-amp offset', opamp.offset_V / point.setVoltageLow_V),
    symmetric('summing resistors', 2 * r),
    symmetric('reference', demand.trackToleranceRatio),
    {
      parameter: 'current gain',
      low: mirrorRatio(bipolar.currentGainLow) / nominal - 1,
      high: mirrorRatio(bipolar.currentGainHigh) / nominal - 1,
    },
    { parameter: 'Early effect', low: 0, high: early },
  ];
}

function symmetric(parameter: string, ratio: number): SpreadCause {
  return { parameter, low: -ratio, high: ratio };
}

/** The slope is inversely proportional to it. */
function divisor(parameter: string, ratio: number): SpreadCause {
  return { parameter, low: 1 / (1 + ratio) - 1, high: 1 / (1 - ratio) - 1 };
}

/** Extreme value: every cause at its worst at once. */
export function worstSpread(causes: readonly SpreadCause[]): { readonly low: number; readonly high: number } {
  return {
    low: causes.reduce((product, cause) => product * (1 + cause.low), 1),
    high: causes.reduce((product, cause) => product * (1 + cause.high), 1),
  };
}
