import type { SeriesName } from '../spec/Specification.ts';

/**
 * Tolerances of the classes of part that a board is built from, taken as ordered (common practice):
 * thick-film resistors of 1 % in every series, 0.5 % where E192 is asked for; C0G capacitors of 2 %.
 */
export function resistorTolerance(series: SeriesName): number {
  return series === 'E192' ? 0.005 : 0.01;
}

export const timingCapacitorTolerance = 0.02;

/** Working voltage up to which one resistor of a divider is trusted [V]: half of what a 0805 stands. */
export const resistorWorkingVoltage_V = 75;
