import { nearest } from '../../base/nearest.ts';
import { jsonDocument } from '../../emit/text/jsonDocument.ts';
import type { Command } from '../commandLine/Command.ts';
import { usageProblem } from '../commandLine/usageProblem.ts';
import { exitCodes } from '../exitCodes.ts';
import { conclude, ending } from '../Step.ts';

const documents = ['spec', 'result'];

export const schemaCommand: Command = {
  name: 'schema',
  synopsis: 'spec|result',
  summary: 'Print the JSON Schema of the specification or the result.',
  details:
    'Prints a JSON Schema (2020-12): of the specification, for an editor; of result.json, for a program.',
  words: { least: 1, most: 1 },
  flags: ['json'],
  readsSpecification: false,
  examples: [
    { task: 'Let an editor complete the keys', line: 'counterslope schema spec > counterslope-spec.json' },
    { task: 'Check a result in a program', line: 'counterslope schema result > result-schema.json' },
  ],
  async run({ positionals }, session) {
    const [name = ''] = positionals;
    if (!documents.includes(name)) return conclude(ending(exitCodes.refused, unknownDocument(name)), session);
    const { specificationSchema, resultSchema } = session.stages;
    session.console.result(jsonDocument(await (name === 'spec' ? specificationSchema() : resultSchema())));
    return exitCodes.good;
  },
};

function unknownDocument(name: string) {
  const near = nearest(name, documents);
  return usageProblem(name, {
    code: 'not-a-choice',
    expected: 'spec or result',
    received: name === '' ? 'an empty word' : name,
    fix: near === null ? 'give one of these' : `did you mean ${near}?`,
  });
}
