import { outerInterval } from '../../generator/base/Quantity.ts';
import {
  type OperatingRegion,
  type RegionPoint,
  regionPoint,
} from '../../generator/region/OperatingRegion.ts';
import type { Specification } from '../../generator/spec/Specification.ts';

/** A generator of numbers from 0 to 1 that a seed repeats (mulberry32). */
export function randomFrom(seed: number): () => number {
  let state = seed | 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

/**
 * Points of a region, drawn from the box of everything that varies and kept where the duty is allowed: no
 * vertex of the region is asked. Each coordinate is at one of its ends half of the time.
 */
export function randomPoints(
  specification: Specification,
  { stage }: OperatingRegion,
  count: number,
  seed: number,
): RegionPoint[] {
  const random = randomFrom(seed);
  const draw = (low: number, high: number) => {
    const share = random() < 0.5 ? Math.round(random()) : random();
    return low + (high - low) * share;
  };
  const { input_V, output_V, load_A, rectifierDrop_V, losses, maximumDutyRatio } = specification;
  const leastDuty = specification.minimumOnTime_s.high * specification.frequency_Hz.to.high;
  const input = outerInterval(input_V);
  const load = load_A === null ? { low: 0, high: 0 } : outerInterval(load_A);
  return Array.from({ length: count }).flatMap(() => {
    const index = output_V === null ? 0 : Math.floor(random() * output_V.length);
    const inputVoltage_V = draw(input.low, input.high);
    const span = output_V === null ? { low: 0, high: 10 * input.high } : outerInterval(output_V[index]!);
    const warmth = draw(0, 1);
    const ohm = (name: 'switch_ohm' | 'winding_ohm' | 'rectifier_ohm') =>
      losses === null ? 0 : losses[name].low + warmth * (losses[name].high - losses[name].low);
    const drops = {
      rectifierDrop_V: draw(rectifierDrop_V.low, rectifierDrop_V.high),
      switch_ohm: ohm('switch_ohm'),
      winding_ohm: ohm('winding_ohm'),
      rectifier_ohm: ohm('rectifier_ohm'),
    };
    const outputVoltage_V = draw(span.low, span.high);
    const at = { inputVoltage_V, outputVoltage_V, loadCurrent_A: draw(load.low, load.high) };
    const point = regionPoint(stage, at, drops, index);
    const isAllowed =
      point.swing_V > 0 && point.duty >= Math.max(0, leastDuty) && point.duty <= maximumDutyRatio;
    return isAllowed && point.down_V >= 0 ? [point] : [];
  });
}
