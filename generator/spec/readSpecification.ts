import type { Assumption } from '../base/Assumption.ts';
import { failure, type Outcome, type Place, type Problem, success } from '../base/Problem.ts';
import { assembleSpecification } from './assembleSpecification.ts';
import { assume } from './assume.ts';
import { checkTogether, missingKeys, withoutEffect } from './checkTogether.ts';
import { type DocumentReading, readDocument, type SpecDocument } from './document/readDocument.ts';
import type { Entry } from './entries/Entry.ts';
import { mergeEntries } from './entries/mergeEntries.ts';
import { type EntryReading, type GivenFlag, readFlags } from './entries/readFlags.ts';
import { ReadValues } from './forms/ReadValue.ts';
import { specKey } from './keys/specKeys.ts';
import { readValues } from './readValues.ts';
import type { Specification } from './Specification.ts';

export interface SpecificationRequest {
  /** Null: flags only. */
  readonly document: SpecDocument | null;
  /** Flags of the table of keys, with their dashes; they override the document. */
  readonly flags: readonly GivenFlag[];
  /** `KEY=VALUE` of each `--set`. */
  readonly sets: readonly string[];
}

export interface ReadSpecification {
  readonly specification: Specification;
  readonly assumptions: readonly Assumption[];
  /** Where the value of a key, or the first of a group, was given; null where it was not. */
  readonly place: (key: string) => Place | null;
}

/** The normalised specification with all that was assumed, or every problem at once. */
export async function readSpecification(request: SpecificationRequest): Promise<Outcome<ReadSpecification>> {
  const document = request.document === null ? null : await readDocument(request.document);
  const flags = readFlags(request.flags, request.sets);
  const entries = mergeEntries(document?.entries ?? [], flags.entries);
  const reading = readValues(entries);
  const problems = [
    ...(document?.problems ?? []),
    ...flags.problems,
    ...reading.problems,
    ...checkTogether(entries, reading),
    ...missing(request, document, flags, entries),
  ];
  if (problems.length > 0) return failure(inOrder(problems));
  const { values, assumptions } = assume(entries, reading.values);
  const specification = assembleSpecification(new ReadValues(values));
  const warnings = withoutEffect(entries, specification.converter);
  return success({ specification, assumptions, place: (key) => placeOf(entries, key) }, warnings);
}

/** A key whose document or flag cannot be read at all is not called missing on top. */
function missing(
  { document: source }: SpecificationRequest,
  document: DocumentReading | null,
  flags: EntryReading,
  entries: ReadonlyMap<string, Entry>,
): readonly Problem[] {
  if (document?.isWhole === false) return [];
  const blamed = [...(document?.problems ?? []), ...flags.problems].map(({ key }) => key);
  const top = source === null ? null : { path: source.name, line: 1, column: 1 };
  return missingKeys(entries, top).filter(({ key }) => !blamed.includes(key));
}

/** As they stand in the document; those of flags follow. */
function inOrder(problems: readonly Problem[]): readonly Problem[] {
  const rank = ({ place }: Problem) => place?.line ?? Number.POSITIVE_INFINITY;
  return [...problems].sort((a, b) => {
    const byLine = rank(a) === rank(b) ? 0 : rank(a) - rank(b);
    return byLine || (a.place?.column ?? 0) - (b.place?.column ?? 0);
  });
}

function placeOf(entries: ReadonlyMap<string, Entry>, key: string): Place | null {
  const exact = entries.get(specKey(key)?.path ?? key);
  if (exact !== undefined) return exact.place;
  for (const [path, { place }] of entries) if (path.startsWith(`${key}.`)) return place;
  return null;
}
