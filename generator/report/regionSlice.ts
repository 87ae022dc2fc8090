import type { SizedDesign, SizedLaw } from '../circuit/SizedDesign.ts';
import { dampingIndex } from '../law/innerLoop.ts';
import { ownRamp_V } from '../law/leastGain.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from '../region/OperatingRegion.ts';

/**
 * The region at one input voltage: points whose hull is the slice, none where the region does not reach.
 *
 * The region is a union of convex pieces, one for each output and corner of the drops. Every edge of a
 * piece joins two of its vertices, so the slice's own vertices are where segments between vertices cross
 * the plane; the further crossings lie inside and do no harm.
 */
export function regionSlice(region: OperatingRegion, inputVoltage_V: number): readonly RegionPoint[] {
  return region.vertices.flatMap((a, index) =>
    region.vertices
      .slice(index)
      .filter((b) => b.outputIndex === a.outputIndex && sameDrops(a, b))
      .flatMap((b) => crossing(region, a, b, inputVoltage_V)),
  );
}

function crossing(region: OperatingRegion, a: RegionPoint, b: RegionPoint, input_V: number): RegionPoint[] {
  const span = b.inputVoltage_V - a.inputVoltage_V;
  const slack = 1e-9 * input_V;
  if (Math.abs(span) <= slack) return Math.abs(a.inputVoltage_V - input_V) <= slack ? [a, b] : [];
  const t = (input_V - a.inputVoltage_V) / span;
  if (t < -1e-9 || t > 1 + 1e-9) return [];
  const between = (from: number, to: number) => from + t * (to - from);
  const point = {
    inputVoltage_V: input_V,
    outputVoltage_V: between(a.outputVoltage_V, b.outputVoltage_V),
    loadCurrent_A: between(a.loadCurrent_A, b.loadCurrent_A),
  };
  return [regionPoint(region.stage, point, a.drops, a.outputIndex)];
}

function sameDrops({ drops: a }: RegionPoint, { drops: b }: RegionPoint): boolean {
  return (
    a.rectifierDrop_V === b.rectifierDrop_V &&
    a.switch_ohm === b.switch_ohm &&
    a.winding_ohm === b.winding_ohm &&
    a.rectifier_ohm === b.rectifier_ohm
  );
}

/** Smallest and largest damping index at one input voltage. */
export interface IndexBand {
  readonly inputVoltage_V: number;
  readonly low: number;
  readonly high: number;
}

/**
 * Damping index of a law over one slice: every output, load and corner; null where the slice is empty.
 */
export function indexBand(
  { region, corners, sizing }: SizedDesign,
  { law, realisedGain }: SizedLaw,
  slice: readonly RegionPoint[],
): IndexBand | null {
  if (slice.length === 0) return null;
  const indices = (corner: 'low' | 'high') =>
    slice.map((point) => {
      const ramp_V =
        corners.at(point).lambda[corner] * sizing.spread[corner] * law.ramp_V(realisedGain, point);
      return dampingIndex(point.up_V, point.swing_V, ramp_V + ownRamp_V(region, corners, point)[corner]);
    });
  return {
    inputVoltage_V: slice[0]!.inputVoltage_V,
    low: Math.min(...indices('low')),
    high: Math.max(...indices('high')),
  };
}

/** Intervals into which the input range is divided. */
const steps = 60;

/** Slices over the whole input range, close enough for a curve; kinks of the region are among them. */
export function regionSlices(region: OperatingRegion): readonly (readonly RegionPoint[])[] {
  const { low, high } = region.inputVoltage_V;
  const even = Array.from({ length: steps + 1 }, (_, step) => low + ((high - low) * step) / steps);
  const kinks = region.vertices.map((vertex) => vertex.inputVoltage_V);
  const inputs = [...new Set([...even, ...kinks])].sort((a, b) => a - b);
  return inputs.map((input) => regionSlice(region, input));
}
