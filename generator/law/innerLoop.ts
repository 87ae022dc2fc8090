/**
 * The inner current loop in its one variable, the damping index x.
 *
 * Continuous conduction, constant output voltage over a cycle; all dimensionless.
 */

/**
 * Damping index from inductor voltages and the ramp's equivalent ma·L.
 *
 *   x = D′ + ma/(m1 + m2) = (up + ma·L)/U
 *
 * Stable above ½, deadbeat at 1.
 * @throws RangeError when the swing is not positive
 */
export function dampingIndex(up_V: number, swing_V: number, ramp_V: number): number {
  if (!(swing_V > 0)) throw new RangeError(`the inductor swing must be positive, got ${swing_V} V`);
  return (up_V + ramp_V) / swing_V;
}

/**
 * Perturbation of the inductor current from one clock edge to the next.
 *
 *   α = −(m2 − ma)/(m1 + ma) = 1 − 1/x
 *
 * |α| < 1 is stable, 0 is deadbeat, negative rings at half the switching frequency, positive is sluggish.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from memory)
 */
export function cycleRatio(index: number): number {
  return 1 - 1 / index;
}

/**
 * Quality factor of the double pole at half the switching frequency; null where the loop is not stable.
 *
 *   Q = 1/(π(x − ½))
 *
 * @source Ridley, IEEE Transactions on Power Electronics 6(2), 1991 (from memory), with x = mc·D′
 */
export function dampingQ(index: number): number | null {
  return index > 0.5 ? 1 / (Math.PI * (index - 0.5)) : null;
}

/** Cycles until a perturbation has fallen to one hundredth, at least one; null where it does not fall. */
export function settlingCycles(index: number): number | null {
  if (index <= 0.5) return null;
  const ratio = Math.abs(cycleRatio(index));
  return ratio === 0 ? 1 : Math.max(1, Math.ceil(Math.log(0.01) / Math.log(ratio)));
}
