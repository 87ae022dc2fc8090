import type { Problem } from '../base/Problem.ts';
import type { Entry } from './entries/Entry.ts';
import type { ReadValue } from './forms/ReadValue.ts';
import { type FormContext, readEntry } from './forms/readEntry.ts';
import { specKeys } from './keys/specKeys.ts';

export interface ValueReading {
  readonly values: ReadonlyMap<string, ReadValue>;
  readonly problems: readonly Problem[];
}

/** Every entry in the table's order; converter and law come first because others are read by them. */
export function readValues(entries: ReadonlyMap<string, Entry>): ValueReading {
  const context: FormContext = {
    converter: deciding(entries, 'converter', 'buck'),
    law: deciding(entries, 'ramp.law', 'vin'),
  };
  const values = new Map<string, ReadValue>();
  const problems: Problem[] = [];
  for (const key of specKeys) {
    const entry = entries.get(key.path);
    if (entry === undefined) continue;
    const value = readEntry(entry, key, context);
    if ('kind' in value) values.set(key.path, value);
    else problems.push(...value);
  }
  return { values, problems };
}

/** A choice on which the reading of other keys depends: null where it cannot be read, so that they are not blamed. */
function deciding(entries: ReadonlyMap<string, Entry>, path: string, otherwise: string): string | null {
  const entry = entries.get(path);
  if (entry === undefined) return otherwise;
  const key = specKeys.find((candidate) => candidate.path === path)!;
  const value = readEntry(entry, key, { converter: null, law: null });
  return 'kind' in value && value.kind === 'word' ? value.word : null;
}
