import type { Problem, Severity } from '../../base/Problem.ts';
import type { SpiceEngine } from '../../spice/Deck.ts';
import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import { exitCodes } from '../exitCodes.ts';
import { unlessInterrupted } from '../interruption.ts';
import type { Session } from '../Session.ts';
import type { SimulationRun } from '../Stages.ts';
import { ending, going, interrupted, type Step } from '../Step.ts';

export type Simulated = SimulationRun<unknown>;

export type EngineChoice = 'embedded' | 'installed' | 'none';

export function engineOf(invocation: Invocation): EngineChoice {
  return (givenValue(invocation, 'engine') ?? 'embedded') as EngineChoice;
}

export interface SimulationRequest {
  readonly design: unknown;
  readonly engine: EngineChoice;
  readonly timeout_s: number;
  /** Deck texts from disk, and which of them are no longer the design's own. */
  readonly stored?: { readonly texts: ReadonlyMap<string, string>; readonly edited: readonly string[] };
}

/** Runs the decks of a design in the chosen engine; null with `--engine none`. */
export async function simulate(
  request: SimulationRequest,
  session: Session,
): Promise<Step<Simulated | null>> {
  if (request.engine === 'none') return going(null);
  session.console.progress(`starting the ${request.engine} engine`);
  const { signal, env } = session.surroundings;
  const opened = session.stages.openEngine(request.engine, env);
  const opening = await unlessInterrupted(opened, signal);
  if (opening === 'interrupted') {
    // An engine that opens after all must not keep the process alive.
    void opened.then((late) => (late.ok ? late.engine.end() : undefined));
    return interrupted(session);
  }
  if (!opening.ok) return ending(exitCodes.machine, engineMissing(request.engine, opening.reason));
  return runDecks(request, opening.engine, session);
}

async function runDecks(
  { design, timeout_s, stored }: SimulationRequest,
  engine: SpiceEngine,
  session: Session,
): Promise<Step<Simulated>> {
  const { stages, console, surroundings } = session;
  try {
    const running = stages.simulate(design, engine, {
      timeout_s,
      onProgress: ({ done, total, file }) =>
        console.progress(`simulating ${file} (${done} of ${total} done)`),
      ...(stored === undefined ? {} : { texts: stored.texts }),
    });
    const run = await unlessInterrupted(running, surroundings.signal);
    return run === 'interrupted' ? interrupted(session) : judged(run, stored?.edited ?? [], session);
  } finally {
    await engine.end();
  }
}

/**
 * A deck of the design's own that does not run to its end is the engine's failure; one that somebody edited
 * fails by itself, and its figures say no.
 */
function judged(run: Simulated, edited: readonly string[], session: Session): Step<Simulated> {
  const problems = [...run.failures].map(([file, reason]) => {
    // Every deck includes the ramp's.
    const isEdited = edited.includes(file) || edited.includes('ramp.cir');
    return deckFailed(file, reason, isEdited ? 'warning' : 'error');
  });
  const errors = problems.filter(({ severity }) => severity === 'error');
  if (errors.length > 0) return ending(exitCodes.machine, ...errors);
  session.console.remarks(problems);
  return going(run);
}

function deckFailed(file: string, reason: string, severity: Severity): Problem {
  return {
    code: 'deck-failed',
    severity,
    key: null,
    place: { path: file, line: null, column: null },
    expected: 'a run to the end',
    received: reason,
    fix:
      severity === 'error'
        ? 'allow more with --timeout, try another --engine, or --engine none to go without the simulation'
        : 'the deck was edited by hand: look at what was changed',
  };
}

function engineMissing(kind: EngineChoice, reason: string): Problem {
  return {
    code: 'engine-missing',
    severity: 'error',
    key: null,
    place: { path: '--engine', line: null, column: null },
    expected: `the ${kind} engine`,
    received: reason,
    fix: 'choose another engine, or --engine none to go without the simulation',
  };
}
