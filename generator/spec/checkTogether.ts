import type { Place, Problem } from '../base/Problem.ts';
import { type Entry, problemAt } from './entries/Entry.ts';
import { ReadValues } from './forms/ReadValue.ts';
import { publicName, specKey, specKeys } from './keys/specKeys.ts';
import type { ValueReading } from './readValues.ts';
import { displayed } from './values/ValueFault.ts';
import { wanted } from './values/ValueForm.ts';
import { writeSpan } from './values/writeSpan.ts';

type Entries = ReadonlyMap<string, Entry>;

/** Keys that are required. `document` is the place of its first line, or null where there is none. */
export function missingKeys(entries: Entries, document: Place | null): readonly Problem[] {
  return specKeys
    .filter((key) => key.required === true && !entries.has(key.path))
    .map((key) => {
      const place = document ?? { path: key.flag!, line: null, column: null };
      const expected = `${key.path}: ${key.form.kind === 'value' ? wanted({ ...key.form, example: key.example }) : key.example}`;
      const fix = `write ${key.path}: ${key.example}, or pass ${key.flag} "${key.example}"`;
      return problemAt(key.path, place, { code: 'key-missing', expected, received: 'nothing', fix });
    });
}

/** What single keys cannot show: pairs that exclude or need each other, and orders between values. */
export function checkTogether(entries: Entries, { values }: ValueReading): readonly Problem[] {
  const read = new ReadValues(values);
  return [
    ...excluding(entries, 'goal.dampingQ', 'goal.dampingIndex'),
    ...excluding(entries, 'inductance.value', 'inductance.ripple'),
    ...excluding(entries, 'inductance.atPeakLimit', 'inductance.ripple'),
    ...needing(entries, 'inductance.atPeakLimit', ['inductance.value', 'inductance.ripple']),
    ...needing(entries, 'inductance.ripple', ['inductance.of']),
    ...needing(entries, 'inductance.of', ['inductance.ripple']),
    ...needing(entries, 'outputCapacitor.seriesResistance', ['outputCapacitor.capacitance']),
    ...needing(entries, 'controller.oscillator.valley', ['controller.oscillator.peak']),
    ...needing(entries, 'controller.oscillator.peak', ['controller.oscillator.valley']),
    ...ordered(entries, read, 'controller.oscillator.valley', 'controller.oscillator.peak'),
    ...saturating(entries, read),
  ];
}

/** Keys that mean nothing to the converter at hand, each a warning. */
export function withoutEffect(entries: Entries, converter: string): readonly Problem[] {
  return specKeys
    .filter((key) => entries.has(key.path) && key.converters?.includes(converter) === false)
    .map((key) => ({
      code: 'key-without-effect',
      severity: 'warning',
      key: publicName(key.path),
      place: entries.get(key.path)!.place,
      expected: `a key that a ${converter} has a use for`,
      received: key.path,
      fix: `drop it, or choose a converter it belongs to: ${key.converters!.join(', ')}`,
    }));
}

function excluding(entries: Entries, first: string, second: string): readonly Problem[] {
  const [a, b] = [entries.get(first), entries.get(second)];
  if (a === undefined || b === undefined) return [];
  const expected = `${first} or ${second}, not both`;
  return [
    problemAt(second, b.place, {
      code: 'keys-exclude',
      expected,
      received: 'both',
      fix: 'drop one of the two',
    }),
  ];
}

/** @param others one of these must be there */
function needing(entries: Entries, path: string, others: readonly string[]): readonly Problem[] {
  const entry = entries.get(path);
  if (entry === undefined || others.some((other) => entries.has(other))) return [];
  const [needed] = others;
  const fix = `give ${needed} too, such as ${specKey(needed!)!.example}, or drop ${path}`;
  return [
    problemAt(path, entry.place, {
      code: 'key-missing',
      expected: `${path} with ${needed}`,
      received: `${path} alone`,
      fix,
    }),
  ];
}

function ordered(entries: Entries, read: ReadValues, lower: string, upper: string): readonly Problem[] {
  const [low, high] = [read.quantity(lower), read.quantity(upper)];
  if (low === null || high === null || low.nominal < high.nominal) return [];
  const received = `${writeSpan(read.span(lower)!, 'voltage')} and ${writeSpan(read.span(upper)!, 'voltage')}`;
  const expected = `${lower} below ${upper}`;
  const fix = 'swap them, or correct one';
  return [problemAt(upper, entries.get(upper)!.place, { code: 'order', expected, received, fix })];
}

/** Saturation takes inductance away. */
function saturating(entries: Entries, read: ReadValues): readonly Problem[] {
  const [rated, left] = [read.span('inductance.value'), read.quantity('inductance.atPeakLimit')];
  if (rated === null || left === null || left.nominal <= rated.to.nominal) return [];
  const place = entries.get('inductance.atPeakLimit')!.place;
  const fault = {
    code: 'order',
    expected: `at the peak limit no more than ${writeSpan(rated, 'inductance')}`,
    received: displayed(writeSpan({ from: left, to: left }, 'inductance')),
    fix: 'swap the two values, or correct one',
  };
  return [problemAt('inductance.atPeakLimit', place, fault)];
}
