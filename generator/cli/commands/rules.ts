import { nearest } from '../../base/nearest.ts';
import { jsonDocument } from '../../emit/text/jsonDocument.ts';
import type { Command } from '../commandLine/Command.ts';
import { givenValues, type Invocation } from '../commandLine/Invocation.ts';
import { usageProblem } from '../commandLine/usageProblem.ts';
import { type ExitCode, exitCodes } from '../exitCodes.ts';
import { decodeText } from '../input/decodeText.ts';
import { readInput, ruleDeckFile } from '../input/readInput.ts';
import { readRules } from '../input/readRules.ts';
import type { Session } from '../Session.ts';
import { conclude, ending, going, type Step, stepOf } from '../Step.ts';

export const rulesCommand: Command = {
  name: 'rules',
  synopsis: '[list | explain ID | test FILE]',
  summary: 'List, explain or test the rules that designs are held to.',
  details:
    'Lists the rules, explains one with its reason and source, or tests a deck of your own against its examples. ' +
    'A rule of --rules extends the shipped deck, or replaces the rule of the same id.',
  words: { least: 0, most: 2 },
  flags: ['rules', 'json'],
  readsSpecification: false,
  examples: [
    { task: 'See what a design is held to', line: 'counterslope rules list' },
    { task: 'Learn why a rule failed', line: 'counterslope rules explain ramp-headroom' },
    { task: 'Try a deck of your own', line: 'counterslope rules test house.xml' },
  ],
  async run(invocation, session) {
    return conclude(await runAction(invocation, session), session);
  },
};

type Action = (word: string, invocation: Invocation, session: Session) => Promise<Step<ExitCode>>;

/** What each action takes besides its name. */
const actions: Readonly<Record<string, { readonly takes: string | null; readonly run: Action }>> = {
  list: { takes: null, run: list },
  explain: { takes: 'ID', run: explain },
  test: { takes: 'FILE', run: test },
};

async function runAction(invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const [name = 'list', word] = invocation.positionals;
  const action = Object.hasOwn(actions, name) ? actions[name] : undefined;
  if (action === undefined) return ending(exitCodes.refused, unknownAction(name));
  if ((word === undefined) !== (action.takes === null)) {
    return ending(exitCodes.refused, wrongWord(name, action.takes, word));
  }
  return action.run(word ?? '', invocation, session);
}

async function list(_word: string, invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const rules = await readRules(givenValues(invocation, 'rules'), session);
  if (!rules.ok) return rules;
  const { listRules } = await import('../../rules/describeRules.ts');
  const { ruleListView } = await import('../view/rules.ts');
  const summaries = listRules(rules.value);
  const { json, result } = session.console;
  result(json ? jsonDocument({ schema: 'counterslope/rules/1', rules: summaries }) : ruleListView(summaries));
  return going(exitCodes.good);
}

async function explain(id: string, invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const rules = await readRules(givenValues(invocation, 'rules'), session);
  if (!rules.ok) return rules;
  const { explainRule } = await import('../../rules/describeRules.ts');
  const { ruleView } = await import('../view/rules.ts');
  const explained = stepOf(explainRule(rules.value, id), session);
  if (!explained.ok) return explained;
  const { json, result } = session.console;
  result(
    json ? jsonDocument({ schema: 'counterslope/rule/1', rule: explained.value }) : ruleView(explained.value),
  );
  return going(exitCodes.good);
}

async function test(path: string, invocation: Invocation, session: Session): Promise<Step<ExitCode>> {
  const base = await readRules(givenValues(invocation, 'rules'), session);
  if (!base.ok) return base;
  const bytes = await readInput(path, ruleDeckFile, session);
  if (!bytes.ok) return bytes;
  const text = decodeText(bytes.value, path);
  if (!text.ok) return text;
  const { testRuleDeck } = await import('../../rules/testRuleDeck.ts');
  const tested = stepOf(await testRuleDeck(text.value, path, base.value), session);
  if (!tested.ok) return tested;
  const { deckTestView } = await import('../view/rules.ts');
  const { json, result } = session.console;
  result(
    json ? jsonDocument({ schema: 'counterslope/rule-test/1', ...tested.value }) : deckTestView(tested.value),
  );
  return going(exitCodes.good);
}

function unknownAction(name: string) {
  const near = nearest(name, Object.keys(actions));
  return usageProblem('rules', {
    code: 'unknown-action',
    expected: 'list, explain ID or test FILE',
    received: name === '' ? 'an empty word' : name,
    fix: near === null ? 'see counterslope rules --help' : `did you mean rules ${near}?`,
  });
}

function wrongWord(name: string, takes: string | null, word: string | undefined) {
  return usageProblem(`rules ${name}`, {
    code: takes === null ? 'word-unexpected' : 'word-missing',
    expected: takes ?? 'nothing more',
    received: word ?? 'nothing',
    fix: `write counterslope rules ${name}${takes === null ? '' : ` ${takes}`}`,
  });
}
