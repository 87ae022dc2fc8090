import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Deck, Waveforms } from '../../../generator/spice/Deck.ts';

export interface GnucapRun {
  /** Keyed by the deck's vectors; null where the deck was not run to its stop time. */
  readonly waveforms: Waveforms | null;
  /** All that gnucap says besides its banner, the deck's title and the table. */
  readonly complaints: readonly string[];
  readonly output: string;
}

/** Figures that a 5-digit time could not tell apart: gnucap's own table has too few digits by default. */
const DIGITS = 9;
const SUFFIXES: Readonly<Record<string, number>> = {
  T: 1e12,
  G: 1e9,
  Meg: 1e6,
  K: 1e3,
  m: 1e-3,
  u: 1e-6,
  n: 1e-9,
  p: 1e-12,
  f: 1e-15,
};

/**
 * Runs a deck's text unchanged, in batch, with its includes beside it.
 *
 * gnucap executes its input line by line and prints one table; the table's first row shows zeros and the
 * currents of an ideal source from before the start, so it is left out.
 */
export async function runGnucap(deck: Deck, { timeout_s = 60 } = {}): Promise<GnucapRun> {
  const folder = mkdtempSync(join(tmpdir(), 'counterslope-gnucap-'));
  try {
    for (const [name, text] of Object.entries(deck.includes)) writeFileSync(join(folder, name), text);
    writeFileSync(join(folder, 'deck.ckt'), deck.text);
    const output = await batch(folder, timeout_s);
    const lines = linesAfterBanner(output, deck);
    return { waveforms: readTable(deck, lines), complaints: lines.filter(isComplaint), output };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function batch(folder: string, timeout_s: number): Promise<string> {
  return new Promise((resolve, reject) => {
    const child = spawn('gnucap', ['-c', `options numdgt=${DIGITS}`, '-b', 'deck.ckt'], {
      cwd: folder,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    const pieces: string[] = [];
    child.stdout.setEncoding('utf8').on('data', (text: string) => pieces.push(text));
    child.stderr.setEncoding('utf8').on('data', (text: string) => pieces.push(text));
    const limit = setTimeout(() => child.kill('SIGKILL'), 1000 * timeout_s);
    child.on('error', reject);
    child.on('close', () => {
      clearTimeout(limit);
      resolve(pieces.join(''));
    });
  });
}

function linesAfterBanner(output: string, deck: Deck): string[] {
  const lines = output.split('\n').map((line) => line.trimEnd());
  const title = deck.text.split(/\r?\n/, 1)[0]?.trimEnd() ?? '';
  const bannerEnd = lines.findIndex((line) => line.startsWith('default plugins:')) + 1;
  return lines.slice(bannerEnd).filter((line) => line !== '' && line !== title);
}

const isHeading = (line: string) => line.startsWith('#Time');
const isRow = (line: string) => /^[ -][0-9.]/.test(line);
const isComplaint = (line: string) => !isHeading(line) && !isRow(line);

function readTable(deck: Deck, lines: readonly string[]): Waveforms | null {
  const headings = lines.find(isHeading)?.toLowerCase().split(/\s+/) ?? [];
  const rows = lines
    .filter(isRow)
    .slice(1)
    .map((line) => line.trim().split(/\s+/).map(figure));
  const column = (place: number) => Float64Array.from(rows, (row) => row[place] ?? Number.NaN);
  const time_s = column(0);
  const places = deck.vectors.map((name) => headings.indexOf(name.toLowerCase()));
  const whole = rows.length > 0 && (time_s.at(-1) ?? 0) >= deck.stopTime_s * (1 - 1e-6);
  if (!whole || places.includes(-1)) return null;
  return {
    time_s,
    vectors: Object.fromEntries(deck.vectors.map((name, i) => [name, column(places[i] ?? -1)])),
  };
}

/** A figure as gnucap writes it: `367.88u`, `-100.K`, `0.`; NaN for anything else. */
function figure(text: string): number {
  const parts = /^(-?[0-9.]+(?:e[+-]?\d+)?)(T|G|Meg|K|m|u|n|p|f)?$/i.exec(text);
  const suffix = parts?.[2];
  return Number(parts?.[1]) * (suffix === undefined ? 1 : (SUFFIXES[suffix] ?? Number.NaN));
}
