import type { Assumption } from '../base/Assumption.ts';
import type { Span } from '../base/Quantity.ts';
import type { Entry } from './entries/Entry.ts';
import type { ReadValue } from './forms/ReadValue.ts';
import { readOne } from './forms/readEntry.ts';
import type { GivenKeys, SpecKey } from './keys/SpecKey.ts';
import { membersOf, publicName, specKeys } from './keys/specKeys.ts';
import { dimensions } from './values/dimensions.ts';
import { writeSpan } from './values/writeSpan.ts';

export interface Completed {
  readonly values: ReadonlyMap<string, ReadValue>;
  readonly assumptions: readonly Assumption[];
}

type Entries = ReadonlyMap<string, Entry>;

/** Fills in what was left out, and lists it; lists also what was given without a tolerance. */
export function assume(entries: Entries, given: ReadonlyMap<string, ReadValue>): Completed {
  const values = new Map(given);
  const assumptions: Assumption[] = [];
  for (const key of specKeys) {
    const value = given.get(key.path);
    if (value !== undefined) assumptions.push(...(hasEffect(key, values) ? takenAsExact(key, value) : []));
    else if (!entries.has(key.path)) assumptions.push(...leftOut(key, entries, values));
  }
  return { values, assumptions: withLosses(entries, assumptions) };
}

function hasEffect({ converters }: SpecKey, values: ReadonlyMap<string, ReadValue>): boolean {
  const converter = values.get('converter');
  return converters === undefined || (converter?.kind === 'word' && converters.includes(converter.word));
}

function leftOut(key: SpecKey, entries: Entries, values: Map<string, ReadValue>): readonly Assumption[] {
  const assumed = typeof key.assumed === 'function' ? key.assumed(givenKeys(entries, values)) : key.assumed;
  if (assumed === undefined || assumed === null) return [];
  const { text, reason } = assumed;
  const name = publicName(key.path);
  if (text === null) return [{ key: name, value: null, unit: unitOf(key), reason }];
  const reading = readOne(text, key, { converter: null, law: null });
  if (!reading.ok)
    throw new Error(`the table's own value for ${key.path} is refused: ${reading.fault.expected}`);
  values.set(key.path, reading.value);
  return [
    { key: name, value: figureOf(reading.value), unit: unitOf(key), reason: withTolerance(reason, text) },
  ];
}

function givenKeys(entries: Entries, values: ReadonlyMap<string, ReadValue>): GivenKeys {
  const word = (path: string) => {
    const value = values.get(path);
    return value?.kind === 'word' ? value.word : '';
  };
  return {
    converter: word('converter'),
    // Where it is left out the stage comes later in the table than the duty that asks for it.
    stage: word('stage') || 'single',
    has: (path) =>
      membersOf(path) ? [...entries.keys()].some((key) => key.startsWith(`${path}.`)) : entries.has(path),
  };
}

/** The figure alone would hide that a tolerance is assumed with it. */
function withTolerance(reason: string, text: string): string {
  return text.includes('±') ? `${reason}, ${text}` : reason;
}

function unitOf({ form }: SpecKey): string {
  return form.kind === 'value' ? dimensions[form.dimension].unit : '';
}

function figureOf(value: ReadValue): number | string {
  switch (value.kind) {
    case 'spans':
      return value.spans[0]!.span.from.nominal;
    case 'number':
      return value.number;
    case 'word':
      return value.word;
    case 'truth':
      return value.truth ? 'yes' : 'no';
  }
}

/** A value without a tolerance is exact; where a range's ends are limits in themselves nothing is missed there. */
function takenAsExact(key: SpecKey, value: ReadValue): readonly Assumption[] {
  const { form } = key;
  if (form.kind !== 'value' || form.tolerance !== true || value.kind !== 'spans') return [];
  const open = value.spans.filter(
    ({ span, isRange, hasTolerance }) =>
      !hasTolerance && span.to.nominal > 0 && !(isRange && form.limits === true),
  );
  if (open.length === 0) return [];
  const reason = open.some(({ isRange }) => isRange)
    ? 'given without a tolerance: the ends of the range are taken as exact'
    : 'given without a tolerance: taken as exact';
  const figure = open.length === 1 && !open[0]!.isRange ? open[0]!.span.from.nominal : null;
  const text = open.map(({ span }) => writeSpan(span as Span, form.dimension)).join(', ');
  const unit = dimensions[form.dimension].unit;
  return [{ key: publicName(key.path), value: figure ?? text, unit: figure === null ? '' : unit, reason }];
}

const lossless =
  'losses not given: the duty is that of a lossless stage; losses raise it and lower the damping index';

/** No losses at all are one assumption, in the group's name and place. */
function withLosses(entries: Entries, assumptions: readonly Assumption[]): readonly Assumption[] {
  if ([...entries.keys()].some((path) => path.startsWith('losses.'))) return assumptions;
  const group = { key: 'losses', value: null, unit: 'Ω', reason: lossless };
  const order = specKeys.map(({ path }) => publicName(path));
  const place = assumptions.findIndex(({ key }) => order.indexOf(key) > order.indexOf('losses.switch'));
  return place < 0
    ? [...assumptions, group]
    : [...assumptions.slice(0, place), group, ...assumptions.slice(place)];
}
