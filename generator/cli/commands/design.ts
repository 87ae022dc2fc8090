import type { Result } from '../../emit/resultSchema.ts';
import type { Command } from '../commandLine/Command.ts';
import { givenValue, givenValues, type Invocation } from '../commandLine/Invocation.ts';
import { type ExitCode, exitCodes } from '../exitCodes.ts';
import { readRequest } from '../input/readRequest.ts';
import { readRules } from '../input/readRules.ts';
import { readTimeout } from '../input/readTimeout.ts';
import type { Session } from '../Session.ts';
import { conclude, ending, endingOf, going, type Step } from '../Step.ts';
import { askFolder, writeSet } from '../work/folder.ts';
import { engineOf, type Simulated, simulate } from '../work/simulation.ts';

export const designCommand: Command = {
  name: 'design',
  synopsis: '[SPEC|-]',
  summary: 'Size, build and check a ramp generator.',
  details:
    'Sizes the slope, builds the circuit from standard parts, and checks it in SPICE. SPEC is a YAML file, - is ' +
    'standard input; flags override its keys, or stand alone. Without --out nothing is written.',
  words: { least: 0, most: 1 },
  flags: [
    ...['out', 'force', 'engine', 'timeout', 'rules', 'json'],
    ...['sarif', 'samples', 'seed', 'samples-csv', 'watch'],
  ],
  readsSpecification: true,
  examples: [
    {
      task: 'Design from three figures, and keep the files',
      line: 'counterslope design --vin "8 V to 36 V" --l 10uH --fs 500kHz --out ramp',
    },
    { task: 'Design from a specification', line: 'counterslope design rail.yaml --out ramp' },
    { task: 'Try another output without writing', line: 'counterslope design rail.yaml --vout "3.3 V"' },
    { task: 'Set a key that has no flag', line: 'counterslope design rail.yaml --set minimumOnTime=80ns' },
    { task: 'Sizing only, for a program', line: 'counterslope design rail.yaml --engine none --json' },
    { task: 'Check with your own ngspice', line: 'counterslope design rail.yaml --engine installed' },
  ],
  async run(invocation, session) {
    return conclude(await designAndShow(invocation, session), session);
  },
};

async function designAndShow(invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const request = await readRequest(invocation, session);
  const rules = await readRules(givenValues(invocation, 'rules'), session);
  const timeout = readTimeout(invocation);
  const folder = await askFolder(invocation, session);
  const end = endingOf([request, rules, timeout, folder]);
  if (end !== null || !request.ok || !rules.ok || !timeout.ok) return end!;

  const { stages, console } = session;
  const sized = await stages.design(request.value);
  if (!sized.ok) return ending(exitOf(sized.problems), ...sized.problems);
  console.remarks(sized.warnings);
  const design = sized.value;
  const simulated = await simulate(
    { design, engine: engineOf(invocation), timeout_s: timeout.value },
    session,
  );
  if (!simulated.ok) return simulated;

  const { evaluateRules } = await import('../../rules/evaluateRules.ts');
  const outcomes = evaluateRules(rules.value, await stages.ruleQuantities(design));
  const result = await stages.result(design, outcomes, simulated.value?.simulation ?? null);
  const written = await writeFiles(design, result, simulated.value, invocation, session);
  if (!written.ok) return written;
  await show(design, result, invocation, session);
  return going(verdict(result));
}

/** A sound specification for which there is no circuit is no fault of the user's. */
function exitOf(problems: readonly { readonly code: string }[]): ExitCode {
  return problems.every(({ code }) => code === 'no-circuit') ? exitCodes.no : exitCodes.refused;
}

async function writeFiles(
  design: unknown,
  result: Result,
  simulated: Simulated | null,
  invocation: Invocation,
  session: Session,
): Promise<Step<unknown>> {
  if (givenValue(invocation, 'out') === null) return going(null);
  session.console.progress('writing the files');
  const files = await session.stages.files(design, result, simulated?.waveforms ?? null);
  return writeSet(files, invocation, session);
}

async function show(
  design: unknown,
  result: Result,
  invocation: Invocation,
  session: Session,
): Promise<void> {
  const { json, paint, result: print } = session.console;
  if (json) {
    const { jsonDocument } = await import('../../emit/text/jsonDocument.ts');
    return print(jsonDocument(result));
  }
  const { designView } = await import('../view/design.ts');
  const alternative = await session.stages.alternative(design);
  print(designView(result, { alternative, directory: givenValue(invocation, 'out'), paint }));
}

function verdict({ rules, simulation }: Result): ExitCode {
  const isRefusedByRule = rules.some(({ severity, passed }) => severity === 'error' && !passed);
  return isRefusedByRule || simulation?.passed === false ? exitCodes.no : exitCodes.good;
}
