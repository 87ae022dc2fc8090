/**
 * A simulated figure as files carry it.
 *
 * Engines agree to about this many digits; more would differ between machines and say nothing.
 * @throws RangeError when the value is not finite
 */
export function roundTo6Digits(value: number): number {
  if (!Number.isFinite(value)) throw new RangeError(`cannot round ${value}`);
  const rounded = Number(value.toPrecision(6));
  return rounded === 0 ? 0 : rounded;
}
