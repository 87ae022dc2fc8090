import type { Flag } from './Flag.ts';

type Given = Pick<Flag, 'name' | 'meaning'> & Partial<Flag>;

function flag(given: Given): Flag {
  const usual = { short: null, placeholder: null, repeatable: false, choices: null, later: false } as const;
  return { ...usual, group: 'work', ...given };
}

/** Every flag that is no key of the specification; a new one is one line here. */
export const ownFlags: readonly Flag[] = [
  flag({
    name: 'set',
    group: 'specification',
    placeholder: 'KEY=VALUE',
    repeatable: true,
    meaning: 'Any key of the specification; may be repeated.',
  }),
  flag({ name: 'out', short: 'o', placeholder: 'DIR', meaning: 'Write the set of files to this folder.' }),
  flag({ name: 'force', meaning: 'Replace files edited by hand, each kept as NAME.bak.' }),
  flag({
    name: 'engine',
    placeholder: 'NAME',
    choices: ['embedded', 'installed', 'none'],
    meaning: 'SPICE: embedded (usual), installed (ngspice), or none.',
  }),
  flag({ name: 'timeout', placeholder: 'SECONDS', meaning: 'Limit for each SPICE run (120).' }),
  flag({
    name: 'rules',
    placeholder: 'FILE',
    repeatable: true,
    meaning: 'Add a rule deck of your own; may be repeated.',
  }),
  flag({ name: 'sarif', placeholder: 'FILE', meaning: 'Write the rule outcomes as SARIF.', later: true }),
  flag({ name: 'samples', placeholder: 'N', meaning: 'Size of the tolerance sample.', later: true }),
  flag({ name: 'seed', placeholder: 'N', meaning: 'Seed of the tolerance sample.', later: true }),
  flag({ name: 'samples-csv', placeholder: 'FILE', meaning: 'Write every sample.', later: true }),
  flag({ name: 'watch', meaning: 'Run again whenever the specification changes.', later: true }),
  flag({ name: 'json', group: 'output', meaning: 'Print JSON to stdout, problems too.' }),
  flag({ name: 'quiet', group: 'output', meaning: 'No progress, notes or warnings on stderr.' }),
  flag({
    name: 'color',
    group: 'output',
    placeholder: 'WHEN',
    choices: ['auto', 'always', 'never'],
    meaning: 'auto (a terminal only), always, never; NO_COLOR is heeded.',
  }),
  flag({ name: 'no-color', group: 'output', meaning: 'The same as --color never.' }),
  flag({ name: 'help', short: 'h', group: 'output', meaning: 'Show this help.' }),
  flag({ name: 'version', group: 'output', meaning: 'Show the version.' }),
];
