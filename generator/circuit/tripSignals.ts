import type { RegionPoint } from '../region/OperatingRegion.ts';
import { senseAttenuation } from './rampFigures.ts';
import type { SizedDesign } from './SizedDesign.ts';

/** What the comparator sees when it trips, nominal unit [V]. */
export interface TripSignal {
  readonly inputVoltage_V: number;
  readonly ramp_V: number;
  /** Null where the load is not known. */
  readonly signal_V: number | null;
}

export interface TripSignals {
  /** At the lowest and the highest input, at the largest duty there and the lightest load. */
  readonly ends: readonly [TripSignal, TripSignal];
  /** Least current signal over the region of the unit that has the least; null where the load is not known. */
  readonly leastSignal_V: number | null;
}

/**
 *   ramp = Se·att·D·T,  signal = Ri·att·I_peak at the lightest load
 *
 * I_peak = I + ΔI/2 where conduction is continuous, √(2·I·ΔI) below half the ripple, where the triangle
 * of the same slopes shrinks.
 */
export function tripSignals(design: SizedDesign): TripSignals {
  const { region } = design;
  const at = (inputVoltage_V: number) => {
    const near = nearest(region.vertices, inputVoltage_V);
    const largest = near.reduce((a, b) => (b.duty > a.duty ? b : a));
    return {
      inputVoltage_V,
      ramp_V: rampAtTrip(design, largest),
      signal_V: signalAtTrip(design, largest, nominalUnit(design)),
    };
  };
  const least = faintestUnit(design);
  const signals = region.vertices.flatMap((vertex) => signalAtTrip(design, vertex, least) ?? []);
  return {
    ends: [at(region.inputVoltage_V.low), at(region.inputVoltage_V.high)],
    leastSignal_V: signals.length > 0 ? Math.min(...signals) : null,
  };
}

/** The vertices whose input voltage is closest to one: a clipped region may not reach its end. */
function nearest(vertices: readonly RegionPoint[], inputVoltage_V: number): readonly RegionPoint[] {
  const distance = (vertex: RegionPoint) => Math.abs(vertex.inputVoltage_V - inputVoltage_V);
  const least = Math.min(...vertices.map(distance));
  return vertices.filter((vertex) => distance(vertex) <= least + 1e-9 * inputVoltage_V);
}

function rampAtTrip(design: SizedDesign, point: RegionPoint): number {
  const { demand, sizing } = design;
  const track_V = demand.tracks === 'input' ? point.inputVoltage_V : demand.track_V.high;
  return sizing.senseSlope_per_s * track_V * senseAttenuation(design) * point.duty * demand.period_s;
}

/** What scales the current signal besides the operating point. */
interface Unit {
  readonly inductance_H: number;
  readonly senseGain_V_per_A: number;
  readonly period_s: number;
}

function nominalUnit({ corners, demand }: SizedDesign): Unit {
  return {
    inductance_H: corners.referenceInductance_H,
    senseGain_V_per_A: corners.senseGain_V_per_A.nominal,
    period_s: demand.period_s,
  };
}

/** The least ripple, from the largest inductance at the highest frequency, sensed with the least gain. */
function faintestUnit({ corners, request }: SizedDesign): Unit {
  return {
    inductance_H: corners.inductance_H.high,
    senseGain_V_per_A: corners.senseGain_V_per_A.low,
    period_s: 1 / request.specification.frequency_Hz.to.high,
  };
}

/** The ripple is concave in the duty, so that its least over the region is at a vertex. */
function signalAtTrip(design: SizedDesign, point: RegionPoint, unit: Unit): number | null {
  const { load_A } = design.request.specification;
  if (load_A === null) return null;
  const ripple_A = (point.up_V / unit.inductance_H) * point.duty * unit.period_s;
  const light_A = load_A.from.low;
  const peak_A = light_A >= ripple_A / 2 ? light_A + ripple_A / 2 : Math.sqrt(2 * light_A * ripple_A);
  return unit.senseGain_V_per_A * senseAttenuation(design) * peak_A;
}
