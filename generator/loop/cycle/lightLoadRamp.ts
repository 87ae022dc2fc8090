/**
 * Least ramp, as a share of the down slope, with which a buck is stable at low frequency in discontinuous
 * conduction.
 *
 *   ma/m2 = (1 − M)(3M − 2)/(M(2 − M)),  M = Vout/Vin; nothing is needed up to M = 2/3
 *
 * At a fixed control level the output current is I ∝ (1 − M)/(M·(1 − M + M·ma/m2)²); a resistive load holds
 * it where dI/dV < I/V. Ideal switch and rectifier, the ripple of the output small, load resistive: with a
 * constant current every M above ½ needs a ramp.
 * @source Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control in the
 *   discontinuous mode (instability above 2/3, from memory); the formula derived
 */
export function lightLoadRampShare(conversionRatio: number): number {
  const M = conversionRatio;
  if (!(M > 0 && M < 1)) throw new RangeError(`a buck converts by more than 0 and less than 1, got ${M}`);
  return Math.max(0, ((1 - M) * (3 * M - 2)) / (M * (2 - M)));
}

/**
 * The ramp that is enough at every conversion ratio: ma = (3/2 − √2)·m2, needed at Vout/Vin = 2√2 − 2.
 *
 * @source Erickson & Maksimović, as above: 0.086·m2 (from memory)
 */
export const lightLoadRampForAll = { share: 1.5 - Math.SQRT2, conversionRatio: 2 * Math.SQRT2 - 2 } as const;
