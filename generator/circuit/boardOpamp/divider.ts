import { resistorWorkingVoltage_V } from '../../parts/catalogue.ts';
import { preferredAtLeast, preferredAtMost, preferredValues } from '../../parts/eSeries.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import { opamp } from '../DeviceModels.ts';
import { limits } from './limits.ts';

/** The input divider: `count` equal resistors above, one below, a filter capacitor across the lower. */
export interface Divider {
  readonly upper_ohm: number;
  readonly upperCount: number;
  readonly lower_ohm: number;
  /** Loaded by the op-amp's input. */
  readonly ratio: number;
  readonly source_ohm: number;
  /** Null where less than 10 pF would do. */
  readonly filter_F: number | null;
}

/**
 * The pair of preferred values whose ratio comes closest below `setVoltage_V` at the highest input.
 *
 * Several resistors in series share a voltage that one alone should not carry.
 */
export function chooseDivider(demand: RampDemand, setVoltage_V: number): Divider {
  const { resistor } = demand.series;
  const top = demand.track_V.high;
  const wanted = setVoltage_V / top;
  const total = top / limits.dividerCurrent_A;
  const upperCount = Math.max(1, Math.ceil((top - setVoltage_V) / resistorWorkingVoltage_V));
  const pairs = preferredValues(resistor, (wanted * total) / 3.2, wanted * total * 3.2).map((lower_ohm) => {
    const upper_ohm = preferredAtLeast(resistor, (lower_ohm * (1 / wanted - 1)) / upperCount);
    return { lower_ohm, upper_ohm, ideal: lower_ohm / (lower_ohm + upperCount * upper_ohm) };
  });
  const best = pairs.reduce((a, b) => (b.ideal > a.ideal * (1 + 1e-9) ? b : a));
  return describe(demand, best.upper_ohm, upperCount, best.lower_ohm);
}

function describe(demand: RampDemand, upper_ohm: number, upperCount: number, lower_ohm: number): Divider {
  const upper = upper_ohm * upperCount;
  const lower = parallel(lower_ohm, opamp.inputResistance_ohm);
  const source_ohm = parallel(upper, lower);
  const filter = demand.period_s / 2 / source_ohm;
  return {
    upper_ohm,
    upperCount,
    lower_ohm,
    ratio: lower / (lower + upper),
    source_ohm,
    filter_F: filter < 10e-12 ? null : preferredAtMost('E6', filter),
  };
}

function parallel(a: number, b: number): number {
  return (a * b) / (a + b);
}
