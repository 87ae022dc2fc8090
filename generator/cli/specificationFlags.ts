import type { SpecKey } from '../spec/keys/SpecKey.ts';
import { specKeys } from '../spec/keys/specKeys.ts';
import type { Flag } from './commandLine/Flag.ts';

/** The keys of the specification that have a flag of their own. */
export const specificationFlags: readonly Flag[] = specKeys.flatMap((key) =>
  key.flag === undefined ? [] : [flagOf(key, key.flag)],
);

function flagOf({ doc, example }: SpecKey, flag: string): Flag {
  return {
    name: flag.replace(/^--/, ''),
    short: null,
    placeholder: 'VALUE',
    meaning: `${doc.replace(/\.$/, '')} (${example}).`,
    repeatable: false,
    choices: null,
    group: 'specification',
    later: false,
  };
}
