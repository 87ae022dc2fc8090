import type { Document, ParsedNode } from 'yaml';
import type { Place, Problem } from '../../base/Problem.ts';
import { isTooLarge, tooLarge } from '../decodeDocument.ts';
import { problemAt } from '../entries/Entry.ts';
import type { EntryReading } from '../entries/readFlags.ts';
import { displayed } from '../values/ValueFault.ts';
import { aliasProblem } from './aliasProblem.ts';
import { nestsTooDeep } from './nestsTooDeep.ts';
import { mostProblems, readMap } from './readMap.ts';
import { yamlProblems } from './yamlProblems.ts';

export interface SpecDocument {
  /** As the user gave it, `-` for standard input. */
  readonly name: string;
  readonly text: string;
}

export interface DocumentReading extends EntryReading {
  /** Whether the document could be read to its end: if not, a key that is missing may well be there. */
  readonly isWhole: boolean;
}

/** The keys of a YAML 1.2 document with their places. The parser is loaded here, so that flags alone start quickly. */
export async function readDocument(document: SpecDocument): Promise<DocumentReading> {
  const { name, text } = document;
  if (isTooLarge(text)) return broken([tooLarge(name, `${text.length} characters`)]);
  if (nestsTooDeep(text)) return broken([nesting(name)]);
  const yaml = await import('yaml');
  const lines = new yaml.LineCounter();
  const at = (offset: number): Place => {
    const { line, col } = lines.linePos(offset);
    return { path: name, line: Math.max(line, 1), column: Math.max(col, 1) };
  };
  try {
    const options = {
      lineCounter: lines,
      prettyErrors: false,
      uniqueKeys: false,
      logLevel: 'error',
    } as const;
    const parsed = yaml.parseDocument(text.replace(/^\ufeff/, ''), options);
    if (parsed.errors.some(({ code }) => code === 'RESOURCE_EXHAUSTION')) return broken([nesting(name)]);
    if (parsed.errors.length > 0) return broken(yamlProblems(parsed.errors, at));
    const reading = readContents(parsed, yaml, at);
    return { ...reading, problems: [...yamlProblems(parsed.warnings, at), ...reading.problems] };
  } catch (error) {
    // The parser is recursive: nesting far beyond any specification ends its stack.
    if (error instanceof RangeError) return broken([nesting(name)]);
    throw error;
  }
}

function readContents(
  parsed: Document.Parsed,
  yaml: typeof import('yaml'),
  at: (offset: number) => Place,
): DocumentReading {
  const aliases = aliasProblem(parsed, yaml, at);
  if (aliases !== null) return broken([aliases]);
  const root = parsed.contents as ParsedNode | null;
  if (root === null || (yaml.isScalar(root) && root.value === null)) return broken([empty(at(0))]);
  if (!yaml.isMap(root)) {
    return broken([notAMap(at(root.range[0]), yaml.isScalar(root) ? String(root.value) : 'a list')]);
  }
  const reading = readMap(root, { yaml, document: parsed, at });
  return { ...reading, isWhole: reading.problems.length <= mostProblems };
}

function broken(problems: readonly Problem[]): DocumentReading {
  return { entries: [], problems, isWhole: false };
}

const wanted = 'a map of keys and values, such as "input: 8 V to 36 V"';

function empty(place: Place): Problem {
  const fix = 'write at least input and frequency; "counterslope init" gives a specification to start from';
  return problemAt(null, place, { code: 'empty-document', expected: wanted, received: 'nothing', fix });
}

function notAMap(place: Place, received: string): Problem {
  const fix = 'write one key per line, each with a colon and a space behind it';
  return problemAt(null, place, { code: 'wrong-kind', expected: wanted, received: displayed(received), fix });
}

function nesting(name: string): Problem {
  const place = { path: name, line: null, column: null };
  const fix = 'write the keys as the starter specification shows them';
  const received = 'maps or lists nested too deep';
  return problemAt(null, place, { code: 'nesting', expected: wanted, received, fix });
}
