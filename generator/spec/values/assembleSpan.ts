import { exactly, type Quantity, spanOf } from '../../base/Quantity.ts';
import { type End, unitOf } from './readEnd.ts';
import type { ReadSpan } from './readSpan.ts';
import { splitTolerance } from './splitRange.ts';
import { applyTolerance, exactTolerance, type Tolerance, tooWide } from './tolerance.ts';
import { type Reading, read, refuse } from './ValueFault.ts';
import { type ValueForm, wanted } from './ValueForm.ts';

/** One or two ends put together: order, signs, and tolerances shared. */
export function assembleSpan(text: string, ends: readonly End[], form: ValueForm): Reading<ReadSpan> {
  const [first, last] = [ends[0]!, ends.at(-1)!];
  if (first.negative !== last.negative) {
    return refuse('range-sign', 'ends of one sign', text, 'give both ends the same sign');
  }
  if (first.value > last.value && !first.negative) {
    return refuse('range-reversed', 'the lower end first', text, `write ${swapped(ends)}`);
  }
  const shared = first.tolerance ?? last.tolerance ?? exactTolerance;
  const tolerances = [shared, last.tolerance ?? exactTolerance] as const;
  const fault = toleranceFault(text, ends, tolerances, form);
  if (fault !== null) return fault;
  const quantities = ends.map((end, index) =>
    quantity(end.value, ends.length === 1 ? shared : tolerances[index]!),
  );
  quantities.sort((a, b) => a.nominal - b.nominal);
  const span = spanOf(quantities[0]!, quantities.at(-1)!);
  const hasTolerance = ends.some((end) => end.tolerance !== null);
  return read({ span, isRange: ends.length === 2, hasTolerance });
}

/** The unit and a tolerance at the end of a range stay where they are; only values change places. */
function swapped(ends: readonly End[]): string {
  const [first, last] = ends.map((end) => ({ end, parted: splitTolerance(end.text) }));
  const body = (part: typeof first) => part!.parted?.body ?? part!.end.text;
  const unit = unitOf(body(last));
  const low = body(last);
  const high = unitOf(body(first)) === '' && unit !== '' ? `${body(first)} ${unit}` : body(first);
  return `${low} to ${high}${last!.end.text.slice(low.length)}`;
}

function toleranceFault(
  text: string,
  ends: readonly End[],
  tolerances: readonly Tolerance[],
  form: ValueForm,
): Reading<never> | null {
  const given = ends.some((end) => end.tolerance !== null);
  if (given && form.tolerance !== true) {
    const expected = `${wanted(form)}, without a tolerance`;
    return refuse('tolerance-not-allowed', expected, text, 'drop the tolerance');
  }
  const wide = ends.some((end, index) => given && tooWide(end.value, tolerances[index]!));
  if (!wide) return null;
  return refuse(
    'tolerance-too-wide',
    'a tolerance below 100 % of the value',
    text,
    'give a smaller tolerance',
  );
}

function quantity(nominal: number, tolerance: Tolerance): Quantity {
  return tolerance === exactTolerance ? exactly(nominal) : applyTolerance(nominal, tolerance);
}
