import type { DeckCheck, Simulation } from '../../emit/resultSchema.ts';
import { roundTo6Digits } from '../../emit/text/roundTo6Digits.ts';
import type { RunOutcome, SpiceEngine, Waveforms } from '../Deck.ts';
import type { Check, CheckedDeck } from './Check.ts';

export interface SimulationProgress {
  readonly done: number;
  readonly total: number;
  readonly file: string;
}

export interface SimulationOptions {
  /** For each deck [s]. */
  readonly timeout_s: number;
  readonly onProgress?: (progress: SimulationProgress) => void;
}

export interface SimulationRun {
  readonly simulation: Simulation;
  /** By file; a deck that did not run to its end has none. */
  readonly waveforms: ReadonlyMap<string, Waveforms>;
  /** Why decks did not run to their end, by file. */
  readonly failures: ReadonlyMap<string, string>;
}

/** Runs every deck and holds what it shows against what was predicted; a run that fails fails its checks. */
export async function simulateDecks(
  decks: readonly CheckedDeck[],
  engine: SpiceEngine,
  { timeout_s, onProgress }: SimulationOptions,
): Promise<SimulationRun> {
  const waveforms = new Map<string, Waveforms>();
  const failures = new Map<string, string>();
  const checks: DeckCheck[] = [];
  for (const [done, { deck, checks: wanted }] of decks.entries()) {
    onProgress?.({ done, total: decks.length, file: deck.file });
    const outcome = await engine.run(deck, { timeout_s });
    if (outcome.ok) waveforms.set(deck.file, outcome.waveforms);
    else failures.set(deck.file, outcome.reason);
    checks.push(...wanted.map((check) => checkedFigure(deck.file, check, outcome)));
  }
  onProgress?.({ done: decks.length, total: decks.length, file: '' });
  const simulation = {
    engine: engine.kind,
    version: engine.version,
    passed: checks.every(({ passed }) => passed),
    decks: checks,
  };
  return { simulation, waveforms, failures };
}

function checkedFigure(file: string, check: Check, outcome: RunOutcome): DeckCheck {
  const measured = outcome.ok ? measuredFigure(check, outcome.waveforms) : null;
  const error = measured === null ? null : (measured - check.predicted) / check.errorScale;
  return {
    file,
    quantity: check.quantity,
    at: check.at,
    predicted: roundTo6Digits(check.predicted),
    measured: measured === null ? null : roundTo6Digits(measured),
    unit: check.unit,
    errorRatio: error === null ? null : roundTo6Digits(error),
    limit: check.limit,
    passed: error !== null && Math.abs(error) <= check.limit,
  };
}

/** A waveform from which the figure cannot be read shows nothing, so that the check fails. */
function measuredFigure(check: Check, waveforms: Waveforms): number | null {
  try {
    const measured = check.measure(waveforms);
    return Number.isFinite(measured) ? measured : null;
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}
