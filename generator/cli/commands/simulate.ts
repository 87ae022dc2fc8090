import type { Result } from '../../emit/resultSchema.ts';
import { jsonDocument } from '../../emit/text/jsonDocument.ts';
import type { Command } from '../commandLine/Command.ts';
import type { Invocation } from '../commandLine/Invocation.ts';
import { type ExitCode, exitCodes } from '../exitCodes.ts';
import { readStoredDesign } from '../input/readStoredDesign.ts';
import { readTimeout } from '../input/readTimeout.ts';
import type { Session } from '../Session.ts';
import { conclude, going, type Step } from '../Step.ts';
import { simulationView } from '../view/simulation.ts';
import { engineOf, simulate } from '../work/simulation.ts';

export const simulateCommand: Command = {
  name: 'simulate',
  synopsis: 'DIR',
  summary: 'Run the decks of a design folder again.',
  details:
    'Runs the decks of a folder that design wrote, as they are on disk now, and compares with what the design in ' +
    'its result.json predicts. Writes nothing; only finishes what an interrupted run left. With --engine none ' +
    'it does that alone, and tells which files were edited.',
  words: { least: 1, most: 1 },
  flags: ['engine', 'timeout', 'json'],
  readsSpecification: false,
  examples: [
    { task: 'Check a folder after editing a deck', line: 'counterslope simulate ramp' },
    { task: 'See what another engine says', line: 'counterslope simulate ramp --engine installed' },
    { task: 'Finish what an interrupted run left', line: 'counterslope simulate ramp --engine none' },
  ],
  async run(invocation, session) {
    return conclude(await simulateAgain(invocation, session), session);
  },
};

async function simulateAgain(invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const [directory = ''] = invocation.positionals;
  const timeout = readTimeout(invocation);
  if (!timeout.ok) return timeout;
  const stored = await readStoredDesign(directory, session);
  if (!stored.ok) return stored;
  const { design, decks, edited, result } = stored.value;
  const request = {
    design,
    engine: engineOf(invocation),
    timeout_s: timeout.value,
    stored: { texts: decks, edited },
  };
  const simulated = await simulate(request, session);
  if (!simulated.ok) return simulated;

  const simulation = simulated.value?.simulation ?? null;
  const { json, paint, result: print } = session.console;
  const now: Result = { ...result, simulation };
  print(json ? jsonDocument(now) : simulationView(now, { directory, paint }));
  return going(simulation?.passed === false ? exitCodes.no : exitCodes.good);
}
