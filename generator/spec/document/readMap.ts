import type { Document, Node, Pair, ParsedNode, Scalar, YAMLMap } from 'yaml';
import type { Place, Problem } from '../../base/Problem.ts';
import { type Entry, type Given, problemAt } from '../entries/Entry.ts';
import { keyFault, kindFault } from '../entries/keyFaults.ts';
import type { EntryReading } from '../entries/readFlags.ts';
import { membersOf, specKey } from '../keys/specKeys.ts';
import { displayed, type ValueFault } from '../values/ValueFault.ts';

export interface DocumentContext {
  readonly yaml: typeof import('yaml');
  readonly document: Document.Parsed;
  readonly at: (offset: number) => Place;
}

/** A document with more is no specification: listing its every line helps nobody. */
export const mostProblems = 100;

/** The keys of a map and of the groups in it; no deeper than the table of keys goes. */
export function readMap(map: YAMLMap, context: DocumentContext, group = ''): EntryReading {
  const entries: Entry[] = [];
  const problems: Problem[] = [];
  const lineOf = new Map<string, number | null>();
  for (const pair of map.items) {
    if (problems.length >= mostProblems) return { entries, problems: [...problems, andMore(pair, context)] };
    const reading = readPair(pair as Pair<ParsedNode, ParsedNode | null>, context, group, lineOf);
    entries.push(...reading.entries);
    problems.push(...reading.problems);
  }
  return { entries, problems };
}

function andMore(pair: Pair, { at }: DocumentContext): Problem {
  return problemAt(null, at((pair.key as ParsedNode).range[0]), {
    code: 'too-many-problems',
    expected: 'a specification',
    received: `more than ${mostProblems} problems; the rest is not read`,
    fix: 'mend those above first',
  });
}

function readPair(
  pair: Pair<ParsedNode, ParsedNode | null>,
  context: DocumentContext,
  group: string,
  lineOf: Map<string, number | null>,
): EntryReading {
  const place = context.at(pair.key.range[0]);
  const key = resolved(pair.key, context);
  if (!context.yaml.isScalar(key)) return refused(null, place, keyForm);
  const name = textOf(key);
  const path = group === '' ? name : `${group}.${name}`;
  const fault = keyFault(group, name, 'nested');
  if (fault !== null) return refused(path, place, fault);
  if (lineOf.has(name)) return refused(path, place, duplicate(name, lineOf.get(name)!));
  lineOf.set(name, place.line);
  return readValue(path, place, pair.value, context);
}

function readValue(
  path: string,
  keyPlace: Place,
  node: ParsedNode | null,
  context: DocumentContext,
): EntryReading {
  const value = resolved(node, context);
  const isEmpty = value === null || (context.yaml.isScalar(value) && value.value === null && isBlank(value));
  const place = isEmpty ? keyPlace : context.at(node!.range[0]);
  const isGroup = membersOf(path) !== undefined;
  if (isGroup && context.yaml.isMap(value)) return readMap(value as YAMLMap, context, path);
  if (isGroup && isEmpty) return { entries: [], problems: [] };
  const key = specKey(path);
  if (key === undefined || context.yaml.isMap(value))
    return refused(path, place, kindFault(path, kindOf(value, context)));
  const given = isEmpty ? ({ kind: 'empty' } as const) : givenOf(value!, context);
  if (given === null) return refused(path, place, kindFault(path, 'a list of maps or lists'));
  return { entries: [{ path: key.path, place, given }], problems: [] };
}

/** A scalar, or a list of scalars; null where a list holds anything else. */
function givenOf(node: Node, context: DocumentContext): Given | null {
  if (context.yaml.isScalar(node)) return { kind: 'scalar', text: textOf(node) };
  if (!context.yaml.isSeq(node)) return null;
  const items = node.items.map((item) => ({
    item: item as ParsedNode,
    value: resolved(item as ParsedNode, context),
  }));
  if (!items.every(({ value }) => context.yaml.isScalar(value))) return null;
  return {
    kind: 'list',
    items: items.map(({ item, value }) => ({
      text: textOf(value as Scalar),
      place: context.at(item.range[0]),
    })),
  };
}

function resolved(node: ParsedNode | null, { yaml, document }: DocumentContext): Node | null {
  return yaml.isAlias(node) ? (node.resolve(document) ?? null) : node;
}

/** Plain scalars as typed: `0x10`, `1e3` and `2026-12-01` stay what the user wrote. */
function textOf(scalar: Scalar): string {
  return typeof scalar.value === 'string' ? scalar.value : (scalar.source ?? String(scalar.value ?? ''));
}

function isBlank(scalar: Scalar): boolean {
  return ['', '~', 'null', 'Null', 'NULL'].includes(scalar.source ?? '');
}

function kindOf(node: Node | null, { yaml }: DocumentContext): string {
  if (yaml.isMap(node)) return 'a map';
  if (yaml.isSeq(node)) return 'a list';
  return yaml.isScalar(node) ? displayed(textOf(node)) : 'nothing';
}

function refused(path: string | null, place: Place, fault: ValueFault): EntryReading {
  return { entries: [], problems: [problemAt(path, place, fault)] };
}

const keyForm: ValueFault = {
  code: 'key-form',
  expected: 'a key that is one word',
  received: 'a map or a list as a key',
  fix: 'write the key as a word',
};

function duplicate(name: string, line: number | null): ValueFault {
  const received = `${displayed(name)}, given in line ${line} already`;
  return { code: 'duplicate-key', expected: 'each key once', received, fix: 'keep one of the two' };
}
