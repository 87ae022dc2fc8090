import type { Place, Problem } from '../../base/Problem.ts';
import { type Entry, problemAt } from '../entries/Entry.ts';
import { kindFault } from '../entries/keyFaults.ts';
import type { SpecKey, ValueKeyForm } from '../keys/SpecKey.ts';
import { type ReadSpan, readSpan } from '../values/readSpan.ts';
import { type Reading, read, refuse, type ValueFault } from '../values/ValueFault.ts';
import type { ValueForm } from '../values/ValueForm.ts';
import type { ReadValue } from './ReadValue.ts';
import { readChoice, readYesNo } from './readChoice.ts';
import { readGain } from './readGain.ts';
import { readDate, readText } from './readText.ts';

/** What the reading of one key may depend on; null where that is not known either. */
export interface FormContext {
  readonly converter: string | null;
  readonly law: string | null;
}

const inverting = ['buck-boost', 'cuk'];

/** What an entry gives, or everything that is wrong with it. */
export function readEntry(entry: Entry, key: SpecKey, context: FormContext): ReadValue | readonly Problem[] {
  const { given, place } = entry;
  const form = key.form;
  if (form.kind === 'value' && form.list === true) return readList(entry, key, form, context);
  if (given.kind === 'list') return [problemAt(key.path, place, kindFault(key.path, 'a list'))];
  if (given.kind === 'empty' && form.kind !== 'text' && form.kind !== 'date') {
    return [problemAt(key.path, place, nothingGiven(key))];
  }
  const reading = readOne(given.kind === 'empty' ? '' : given.text, key, context);
  return reading.ok ? reading.value : [problemAt(key.path, place, mended(reading.fault, key))];
}

/** One value as text, in the key's own form. */
export function readOne(text: string, key: SpecKey, context: FormContext): Reading<ReadValue> {
  const form = key.form;
  switch (form.kind) {
    case 'value':
      return mapped(readSpan(text, valueForm(key, form, context)), (span) => ({
        kind: 'spans',
        spans: [span],
      }));
    case 'gain':
      return mapped(readGain(text, context.law), (number) => ({ kind: 'number', number }));
    case 'choice':
      return mapped(readChoice(text, form.choices), (word) => ({ kind: 'word', word }));
    case 'yes-no':
      return mapped(readYesNo(text), (truth) => ({ kind: 'truth', truth }));
    case 'text':
      return mapped(readText(text), (word) => ({ kind: 'word', word }));
    case 'date':
      return mapped(readDate(text), (word) => ({ kind: 'word', word }));
  }
}

function mapped<T>(reading: Reading<T>, value: (from: T) => ReadValue): Reading<ReadValue> {
  return reading.ok ? read(value(reading.value)) : reading;
}

/** Faults show the key's own example; only the output is a list, and only its sign depends on the converter. */
function valueForm(key: SpecKey, form: ValueKeyForm, { converter }: FormContext): ValueForm {
  const mayInvert = form.list === true && (converter === null || inverting.includes(converter));
  return { ...form, example: key.example, ...(mayInvert ? { negative: true } : {}) };
}

function readList(
  entry: Entry,
  key: SpecKey,
  form: ValueKeyForm,
  context: FormContext,
): ReadValue | readonly Problem[] {
  const items = itemsOf(entry);
  if (items.length === 0) return [problemAt(key.path, entry.place, nothingGiven(key))];
  const spans: ReadSpan[] = [];
  const problems: Problem[] = [];
  for (const { text, place } of items) {
    const reading = readSpan(text, valueForm(key, form, context));
    if (reading.ok) spans.push(reading.value);
    else problems.push(problemAt(key.path, place, mended(reading.fault, key)));
  }
  return problems.length > 0 ? problems : { kind: 'spans', spans };
}

/** A flag has no list of its own: `[3.3 V, 5 V]` or `3.3 V, 5 V`. A comma behind a digit stays, to be refused. */
function itemsOf({ given, place }: Entry): readonly { text: string; place: Place }[] {
  if (given.kind === 'list') return given.items;
  if (given.kind === 'empty') return [];
  const inner = /^\s*\[(.*)\]\s*$/s.exec(given.text)?.[1] ?? given.text;
  return inner.split(/(?<=[A-Za-z%])\s*,\s*/).map((text) => ({ text, place }));
}

function mended(fault: ValueFault, key: SpecKey): ValueFault {
  const remedy = key.remedies?.[fault.code];
  return remedy === undefined ? fault : { ...fault, fix: `${fault.fix}; ${remedy}` };
}

function nothingGiven(key: SpecKey): ValueFault {
  const reading = refuse(
    'value-missing',
    `a value such as ${key.example}`,
    '',
    `write ${key.example}, or drop the key`,
  );
  return (reading as { fault: ValueFault }).fault;
}
