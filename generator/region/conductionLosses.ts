import type { InductorVoltages } from './PowerStage.ts';

/** Resistance in the path of the inductor current in each interval [Ω], referred to the inductor. */
export interface IntervalResistances {
  readonly up_ohm: number;
  readonly down_ohm: number;
}

/**
 * Inductor voltages of a stage whose inductor carries the load only while the switch is off: I = Iload·c/D′.
 *
 *   (up₀ − I·a)·D = (down₀ + I·b)·D′  ⇒  (up₀ + down₀)·D′² − (up₀ + Ic·(a − b))·D′ + Ic·a = 0
 *
 * with Ic = c·Iload; the larger root is the one that a converter settles at.
 * @returns up and down with the losses in them; `up_V` 0 where the load is more than the stage can carry
 */
export function loadedVoltages(
  lossless: InductorVoltages,
  offTimeCurrent_A: number,
  { up_ohm: a, down_ohm: b }: IntervalResistances,
): InductorVoltages {
  if (offTimeCurrent_A === 0 || (a === 0 && b === 0)) return lossless;
  const swing = lossless.up_V + lossless.down_V;
  const half = (lossless.up_V + offTimeCurrent_A * (a - b)) / 2;
  const root = half * half - swing * offTimeCurrent_A * a;
  if (root < 0) return { up_V: 0, down_V: swing };
  const offDuty = (half + Math.sqrt(root)) / swing;
  const current = offTimeCurrent_A / offDuty;
  return { up_V: lossless.up_V - current * a, down_V: lossless.down_V + current * b };
}
