import type { Problem } from '../../base/Problem.ts';
import type { Simulation } from '../../emit/resultSchema.ts';
import type { SpiceEngine } from '../../spice/Deck.ts';
import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import { exitCodes } from '../exitCodes.ts';
import { unlessInterrupted } from '../interruption.ts';
import type { Session } from '../Session.ts';
import { ending, going, interrupted, type Step } from '../Step.ts';

export interface Simulated {
  readonly simulation: Simulation;
  readonly waveforms: unknown;
}

export type EngineChoice = 'embedded' | 'installed' | 'none';

export function engineOf(invocation: Invocation): EngineChoice {
  return (givenValue(invocation, 'engine') ?? 'embedded') as EngineChoice;
}

export interface SimulationRequest {
  readonly design: unknown;
  readonly engine: EngineChoice;
  readonly timeout_s: number;
  /** Deck texts from disk, or the design's own. */
  readonly texts?: ReadonlyMap<string, string>;
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
  if (!opening.ok)
    return ending(exitCodes.machine, engineFailed(request.engine, 'engine-missing', opening.reason));
  return runDecks(request, opening.engine, session);
}

async function runDecks(
  { design, engine: kind, timeout_s, texts }: SimulationRequest,
  engine: SpiceEngine,
  session: Session,
): Promise<Step<Simulated>> {
  const { stages, console, surroundings } = session;
  try {
    const running = stages.simulate(design, engine, {
      timeout_s,
      onProgress: ({ done, total, file }) => console.progress(`simulating ${file} (${done} of ${total})`),
      ...(texts === undefined ? {} : { texts }),
    });
    const outcome = await unlessInterrupted(running, surroundings.signal);
    if (outcome === 'interrupted') return interrupted(session);
    if (outcome.ok) return going(outcome);
    return ending(exitCodes.machine, engineFailed(kind, 'engine-failed', outcome.reason));
  } finally {
    await engine.end();
  }
}

function engineFailed(kind: EngineChoice, code: string, reason: string): Problem {
  return {
    code,
    severity: 'error',
    key: null,
    place: { path: '--engine', line: null, column: null },
    expected: `the ${kind} engine to run every deck to its end`,
    received: reason,
    fix: `choose another engine, or --engine none to go without the simulation`,
  };
}
