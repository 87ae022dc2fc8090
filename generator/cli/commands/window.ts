import type { ReadSpecification } from '../../spec/readSpecification.ts';
import type { Command } from '../commandLine/Command.ts';
import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import { type ExitCode, exitCodes } from '../exitCodes.ts';
import { readRequest } from '../input/readRequest.ts';
import type { Session } from '../Session.ts';
import { conclude, going, type Step, stepOf } from '../Step.ts';
import { addToSet } from '../work/folder.ts';

export const windowCommand: Command = {
  name: 'window',
  synopsis: '[SPEC|-]',
  summary: 'Tell which inductances fit a given ramp.',
  details:
    'For a ramp that is there already, such as that of a finished chip: the least and the largest inductance for ' +
    'which the damping index stays between goal and ceiling over the whole input range, for each output voltage and ' +
    'frequency, as a table for a data sheet. The ramp is controller.internalRamp with its spread, or ramp.gain with ' +
    'the inductance that it refers to, or both. --out adds window.csv and window.json to the set in DIR.',
  words: { least: 0, most: 1 },
  flags: ['out', 'force', 'json'],
  readsSpecification: true,
  examples: [
    {
      task: "Which inductors suit a chip's own ramp",
      line: 'counterslope window chip.yaml --set "controller.internalRamp=45 mV/us"',
    },
    { task: 'Keep the table with a design', line: 'counterslope window rail.yaml --out ramp' },
  ],
  async run(invocation, session) {
    return conclude(await windowAndShow(invocation, session), session);
  },
};

async function windowAndShow(invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const request = await readRequest(invocation, session);
  if (!request.ok) return request;
  const found = stepOf(await session.stages.window(request.value), session);
  if (!found.ok) return found;
  if (givenValue(invocation, 'out') !== null) {
    session.console.progress('writing the files');
    const written = await addToSet(await session.stages.windowFiles(found.value), invocation, session);
    if (!written.ok) return written;
  }
  await show(found.value, request.value, invocation, session);
  return going(exitCodes.good);
}

async function show(
  found: unknown,
  { specification }: ReadSpecification,
  invocation: Invocation,
  { console, stages }: Session,
): Promise<void> {
  const document = await stages.windowDocument(found);
  if (console.json) {
    const { jsonDocument } = await import('../../emit/text/jsonDocument.ts');
    return console.result(jsonDocument(document));
  }
  const { windowView } = await import('../view/window.ts');
  const directory = givenValue(invocation, 'out');
  console.result(windowView(document, { specification, directory, paint: console.paint }));
}
