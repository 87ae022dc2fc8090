import { clockEdge_s, rampTiming } from '../../circuit/rampFigures.ts';
import type { SizedDesign } from '../../circuit/SizedDesign.ts';

/** Clock of every deck: low while the ramp may rise, high from maximum duty to the end of the period [s]. */
export interface ClockTiming {
  readonly period_s: number;
  readonly rise_s: number;
  /** Rise and fall of the clock itself. */
  readonly edge_s: number;
  /** What the PULSE source calls its width: the flat low part. */
  readonly low_s: number;
}

/** The ramp starts where the falling edge crosses the reset switch's threshold, close to its end. */
export function clockTiming(design: SizedDesign): ClockTiming {
  const { period_s, rise_s } = rampTiming(design);
  const edge_s = clockEdge_s(period_s);
  return { period_s, rise_s, edge_s, low_s: rise_s - 2 * edge_s };
}
