import type { Problem } from '../../base/Problem.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { givenValue, givenValues, type Invocation } from '../commandLine/Invocation.ts';
import { usageProblem } from '../commandLine/usageProblem.ts';
import { exitCodes } from '../exitCodes.ts';
import type { Session } from '../Session.ts';
import type { SpecificationSource } from '../Stages.ts';
import { ending, going, type Step, stepOf } from '../Step.ts';
import { specificationFlags } from '../specificationFlags.ts';
import { readInput, specificationFile } from './readInput.ts';
import { sourceDate } from './sourceDate.ts';

/** The specification from a file, from standard input, or from flags alone. */
export async function readRequest(
  invocation: Invocation,
  session: Session,
): Promise<Step<ReadSpecification>> {
  const [path] = invocation.positionals;
  const flags = flagsGiven(invocation);
  const sets = givenValues(invocation, 'set');
  if (path === undefined && flags.length === 0 && sets.length === 0) {
    return ending(exitCodes.refused, nothingGiven());
  }
  const document = path === undefined ? going(null) : await readDocument(path, session);
  if (!document.ok) return document;
  const outcome = await session.stages.readSpecification({ document: document.value, flags, sets });
  const request = stepOf(outcome, session);
  return request.ok ? dated(request.value, session) : request;
}

function flagsGiven(invocation: Invocation): SpecificationSource['flags'] {
  return specificationFlags.flatMap(({ name }) => {
    const value = givenValue(invocation, name);
    return value === null ? [] : [{ flag: `--${name}`, value }];
  });
}

async function readDocument(path: string, session: Session): Promise<Step<SpecificationSource['document']>> {
  if (path === '-' && session.surroundings.stdin.isTTY === true) {
    session.console.message('reading the specification from this terminal; end it with Ctrl-D');
  }
  const bytes = await readInput(path, specificationFile, session);
  if (!bytes.ok) return bytes;
  const text = stepOf(await session.stages.decodeDocument(bytes.value, path), session);
  return text.ok ? going({ name: path, text: text.value }) : text;
}

/** The sheet's date, where the specification has none and the build environment pins one. */
function dated(request: ReadSpecification, { surroundings }: Session): Step<ReadSpecification> {
  if (request.specification.date !== '') return going(request);
  const date = sourceDate(surroundings.env.SOURCE_DATE_EPOCH);
  if (!date.ok) return date;
  return going({ ...request, specification: { ...request.specification, date: date.value } });
}

function nothingGiven(): Problem {
  return usageProblem('design', {
    code: 'specification-missing',
    expected: 'a specification: a file, - for standard input, or flags such as --vin',
    received: 'none',
    fix: 'counterslope init rail.yaml writes one to start from',
  });
}
