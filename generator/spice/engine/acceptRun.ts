import type { Deck, RunOutcome } from '../Deck.ts';
import { complaintsIn } from './complaints.ts';
import { readRawFile } from './rawFile.ts';

/** What an engine left behind after a run. */
export interface FinishedRun {
  /** The title that the raw file of this very run bears. */
  readonly runTitle: string;
  /** Null where no raw file was written. */
  readonly raw: Uint8Array | null;
  readonly standardError: string;
  /** All that the engine said, for the reader of a failure. */
  readonly log: string;
  /** How the engine itself came to grief, null where it ended well. */
  readonly problem: string | null;
}

const TIME_TOLERANCE_RATIO = 1e-6;
const COMPLAINTS_SHOWN = 3;

/**
 * Turns a finished run into waveforms, or says why it does not count.
 *
 * Engines end many failed runs as if they had succeeded, so a run counts only if the engine did not
 * complain, every wanted vector is there, all values are finite, and time reaches the stop time.
 */
export function acceptRun(deck: Deck, run: FinishedRun): RunOutcome {
  const failed = (reason: string): RunOutcome => ({ ok: false, reason, log: run.log });
  const complaints = complaintsIn(run.standardError);
  const objections = [
    ...(run.problem === null ? [] : [run.problem]),
    ...(complaints.length === 0 ? [] : [`the engine complained: ${shorten(complaints)}`]),
  ];
  if (objections.length > 0) return failed(objections.join('; '));

  const file = run.raw === null ? null : readRawFile(run.raw);
  if (file === null) return failed('the engine delivered no waveforms');
  if (file.title !== run.runTitle) return failed('the engine did not take the deck and ran an earlier one');
  const column = (name: string) => file.columns[file.names.indexOf(name.toLowerCase())];
  const time_s = column('time');
  if (time_s === undefined) return failed('the engine ran no transient analysis');

  const vectors: Record<string, Float64Array> = {};
  for (const name of deck.vectors) {
    const values = column(name);
    if (values === undefined) return failed(`the run delivered no vector ${name}`);
    vectors[name] = values;
  }
  const reached_s = time_s.at(-1) ?? 0;
  if (!(reached_s >= deck.stopTime_s * (1 - TIME_TOLERANCE_RATIO))) {
    return failed(`the run ended at ${reached_s} s, not at ${deck.stopTime_s} s`);
  }
  for (const [name, values] of [['time', time_s] as const, ...Object.entries(vectors)]) {
    const bad = values.findIndex((value) => !Number.isFinite(value));
    if (bad >= 0) return failed(`${name} is not finite at ${time_s[bad]} s`);
  }
  return { ok: true, waveforms: { time_s, vectors } };
}

function shorten(complaints: readonly string[]): string {
  const shown = complaints.slice(0, COMPLAINTS_SHOWN).map((line) => line.trim());
  const rest = complaints.length - shown.length;
  return rest > 0 ? `${shown.join('; ')} (and ${rest} more)` : shown.join('; ');
}
