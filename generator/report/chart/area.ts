import type { Axis, Chart, DataPoint } from './Chart.ts';
import type { Format } from './formats.ts';
import { type Scale, scaleOf } from './scale.ts';

/** What the axes need around the plot. */
const edges = { left: 46, top: 26, bottom: 40 } as const;
/** Least distance between ticks. */
const spacing = { x: 90, y: 50 } as const;

/** The plotting area with its scales: data to paper. */
export interface Area {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: Scale;
  readonly y: Scale;
  across(value: number): number;
  up(value: number): number;
}

export function areaOf({ x, y }: Chart, { width, height, margin }: Format): Area {
  const { left, top } = edges;
  const right = width - margin;
  const bottom = height - edges.bottom;
  const scales = {
    x: scaleOf(x, Math.max(3, (right - left) / spacing.x)),
    y: scaleOf(y, (bottom - top) / spacing.y),
  };
  return {
    left,
    right,
    top,
    bottom,
    ...scales,
    across: (value) => left + scales.x.position(within(x, value)) * (right - left),
    up: (value) => bottom - scales.y.position(within(y, value)) * (bottom - top),
  };
}

export function place(area: Area, [x, y]: DataPoint): DataPoint {
  return [area.across(x), area.up(y)];
}

/** What lies outside is drawn at the edge. */
function within({ low, high }: Axis, value: number): number {
  return Math.min(high, Math.max(low, value));
}
