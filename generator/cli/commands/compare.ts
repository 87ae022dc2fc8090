import type { ReadSpecification } from '../../spec/readSpecification.ts';
import type { Command } from '../commandLine/Command.ts';
import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import { type ExitCode, exitCodes } from '../exitCodes.ts';
import { readRequest } from '../input/readRequest.ts';
import type { Session } from '../Session.ts';
import { conclude, going, type Step, stepOf } from '../Step.ts';
import { addToSet } from '../work/folder.ts';

export const compareCommand: Command = {
  name: 'compare',
  synopsis: '[SPEC|-]',
  summary: 'Compare a fixed ramp with adaptive ones.',
  details:
    'Holds a fixed ramp against ramps that follow the input, the output or both, each at the least gain that ' +
    'meets the goal over the whole region, and says which to build, and when adapting buys nothing. Needs no ' +
    'inductance: without one it gives ratios. --out adds comparison.html and comparison.json to the set in DIR.',
  words: { least: 0, most: 1 },
  flags: ['out', 'force', 'json'],
  readsSpecification: true,
  examples: [
    { task: 'See whether a ramp needs to adapt', line: 'counterslope compare rail.yaml' },
    {
      task: 'Before the inductor is known',
      line: 'counterslope compare --vin "8 V to 36 V" --vout "1 V to 24 V" --fs 500kHz',
    },
    { task: 'Keep the comparison with a design', line: 'counterslope compare rail.yaml --out ramp' },
  ],
  async run(invocation, session) {
    return conclude(await compareAndShow(invocation, session), session);
  },
};

async function compareAndShow(invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const request = await readRequest(invocation, session);
  if (!request.ok) return request;
  const compared = stepOf(await session.stages.compare(request.value), session);
  if (!compared.ok) return compared;
  const written = await writeFiles(compared.value, invocation, session);
  if (!written.ok) return written;
  await show(compared.value, request.value, invocation, session);
  return going(exitCodes.good);
}

async function writeFiles(
  compared: unknown,
  invocation: Invocation,
  session: Session,
): Promise<Step<unknown>> {
  if (givenValue(invocation, 'out') === null) return going(null);
  session.console.progress('writing the files');
  return addToSet(await session.stages.comparisonFiles(compared), invocation, session);
}

async function show(
  compared: unknown,
  { specification }: ReadSpecification,
  invocation: Invocation,
  { console, stages }: Session,
): Promise<void> {
  const document = await stages.comparison(compared);
  if (console.json) {
    const { jsonDocument } = await import('../../emit/text/jsonDocument.ts');
    return console.result(jsonDocument(document));
  }
  const { comparisonView } = await import('../view/comparison.ts');
  const { title } = specification;
  const directory = givenValue(invocation, 'out');
  console.result(comparisonView(document, { title, directory, paint: console.paint }));
}
