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
  /** Least current signal over the region; null where the load is not known. */
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
    return { inputVoltage_V, ramp_V: rampAtTrip(design, largest), signal_V: signalAtTrip(design, largest) };
  };
  const signals = region.vertices.flatMap((vertex) => signalAtTrip(design, vertex) ?? []);
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

function signalAtTrip(design: SizedDesign, point: RegionPoint): number | null {
  const { load_A, senseGain_V_per_A } = design.request.specification;
  if (load_A === null) return null;
  const ripple_A = (point.up_V / design.corners.referenceInductance_H) * point.duty * design.demand.period_s;
  const light_A = load_A.from.low;
  const peak_A = light_A >= ripple_A / 2 ? light_A + ripple_A / 2 : Math.sqrt(2 * light_A * ripple_A);
  return senseGain_V_per_A.nominal * senseAttenuation(design) * peak_A;
}
