/** Slopes of a buck from first principles, in the tests' own words: A/s at L, V/s nowhere. */
export interface BuckSlopes {
  readonly up: number;
  readonly down: number;
  readonly duty: number;
}

export function buckSlopes(input: number, output: number, inductance: number): BuckSlopes {
  return { up: (input - output) / inductance, down: output / inductance, duty: output / input };
}

/**
 * Perturbation after one cycle, found by walking the waveform with a ramp: no formula for it is used.
 *
 * The valley current starts the cycle; the switch turns off where valley + up·t = peak − ramp·t.
 */
export function walkedRatio(up: number, down: number, ramp: number): number {
  const period = 1;
  const duty = down / (up + down);
  const valley = 0;
  const control = valley + up * duty * period + ramp * duty * period;
  const next = (start: number) => {
    const onTime = (control - start) / (up + ramp);
    return start + up * onTime - down * (period - onTime);
  };
  const shift = 1e-3 * up * duty;
  return (next(valley + shift) - next(valley)) / shift;
}
