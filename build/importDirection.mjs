import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import { argv } from 'node:process';
import { fileURLToPath } from 'node:url';

/** In the order in which a design grows: each stage imports itself and those before it. */
export const stages = [
  'base',
  'spec',
  'region',
  'law',
  'ramp',
  'parts',
  'circuit',
  'loop',
  'tolerance',
  'rules',
  'emit',
  'spice',
  'report',
  'design.ts',
  'cli',
  'index.ts',
];

/** The effects at the edges; everything else runs in a browser too. */
const nodePlaces = ['emit/write/', 'spice/engine/', 'cli/entry.ts'];

/** Data in its written form; every stage may speak of it, in types only. */
const openToTypes = ['emit/resultSchema.ts'];

const statement = /^(import|export)\s(type\s)?[^;'"]*?from\s+'([^']+)'|^(import)\s+'([^']+)'/gm;
const call = /\b(typeof\s+)?import\(\s*'([^']+)'\s*\)/g;

/**
 * Imports of one file that go against the pipeline's direction or out of the core.
 *
 * @param {string} file relative to `generator`, with slashes
 * @param {string} text
 * @returns {readonly { line: number, message: string }[]}
 */
export function directionFaults(file, text) {
  return importsOf(text).flatMap(({ specifier, typeOnly, index }) => {
    const message = specifier.startsWith('.')
      ? pipelineFault(file, join(dirname(file), specifier).split(sep).join('/'), typeOnly)
      : nodeFault(file, specifier);
    return message === null ? [] : [{ line: text.slice(0, index).split('\n').length, message }];
  });
}

function importsOf(text) {
  const statements = [...text.matchAll(statement)].map((match) => ({
    specifier: match[3] ?? match[5],
    typeOnly: match[2] !== undefined,
    index: match.index,
  }));
  const calls = [...text.matchAll(call)].map((match) => ({
    specifier: match[2],
    typeOnly: match[1] !== undefined,
    index: match.index,
  }));
  return [...statements, ...calls];
}

function pipelineFault(file, target, typeOnly) {
  // Templates and rule decks are data.
  if (target.startsWith('../templates/') || target.startsWith('../rules/')) return null;
  if (typeOnly && openToTypes.includes(target)) return null;
  const [own, other] = [file, target].map((path) => stages.indexOf(stageOf(path)));
  if (own === -1) return `${file} belongs to no stage of the pipeline`;
  if (other === -1) return `${target} belongs to no stage of the pipeline`;
  return other <= own ? null : `${stages[own]} imports the later stage ${stages[other]}: ${target}`;
}

/** Modules at the root, but the library's index, are chapters of the table of contents. */
function stageOf(path) {
  const [first, inside] = path.split('/');
  return inside === undefined && first !== 'index.ts' ? 'design.ts' : first;
}

function nodeFault(file, specifier) {
  if (!specifier.startsWith('node:')) return null;
  if (nodePlaces.some((place) => file.startsWith(place))) return null;
  return `${specifier} is imported outside ${nodePlaces.join(', ')}`;
}

function report(root) {
  const files = readdirSync(root, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.m?ts$|\.mjs$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)).split(sep).join('/'));
  const faults = files.flatMap((file) =>
    directionFaults(file, readFileSync(join(root, file), 'utf8')).map(
      ({ line, message }) => `generator/${file}:${line}: ${message}`,
    ),
  );
  for (const fault of faults) console.error(fault);
  return faults.length;
}

if (argv[1] === fileURLToPath(import.meta.url)) {
  const root = join(dirname(fileURLToPath(import.meta.url)), '../generator');
  process.exitCode = report(root) === 0 ? 0 : 1;
}
