import type { Deck } from '../Deck.ts';

/** A deck as an engine gets it, or why no engine gets it. */
export type PreparedDeck =
  | { readonly ok: true; readonly text: string; readonly runTitle: string }
  | { readonly ok: false; readonly reason: string };

/** A file name that stays in its folder and is no option on a command line. */
const BARE_NAME = /^[A-Za-z0-9_][A-Za-z0-9._-]*$/;
/** The names under which the engines' runners keep the deck itself and its result. */
const TAKEN: readonly string[] = ['test.cir', 'out.raw', 'counterslope-run.cir', 'counterslope-run.raw'];
/** What a `.save` line takes as a vector; anything else would end the line and begin a directive. */
const VECTOR_NAME = /^[^\s;$]+$/;

/** Makes the title of each run its own. */
let runs = 0;

/**
 * Adds two lines below the title line: a title of this run's own, which the raw file repeats, and a `.save`
 * of the wanted vectors. Decks carry no `.save`: one of the engines that must run them does not know it.
 *
 * The run's title tells a result from an earlier one: an engine that cannot read a deck keeps the circuit
 * it had before, runs that, and says nothing.
 * A deck may come from a folder that somebody else sent, so what makes an engine run commands of the
 * system is refused here: control blocks, and a first line that turns the deck into a script.
 */
export function prepareDeck(deck: Deck): PreparedDeck {
  const name = Object.keys(deck.includes).find(
    (include) => !BARE_NAME.test(include) || TAKEN.includes(include),
  );
  if (name !== undefined) return { ok: false, reason: `${name} cannot be the name of an included file` };
  const vector = deck.vectors.find((wanted) => !VECTOR_NAME.test(wanted));
  if (vector !== undefined) return { ok: false, reason: `${JSON.stringify(vector)} is no vector name` };
  const scripted = Object.entries({ ...deck.includes, [deck.file]: deck.text }).find(([, text]) =>
    runsCommands(text),
  );
  if (scripted !== undefined)
    return { ok: false, reason: `${scripted[0]} holds engine commands, not a circuit` };
  runs += 1;
  const runTitle = `counterslope run ${runs}`;
  const added = [
    `.title ${runTitle}`,
    ...(deck.vectors.length === 0 ? [] : [`.save ${deck.vectors.join(' ')}`]),
  ];
  return { ok: true, text: belowTheTitle(deck.text, added), runTitle };
}

function runsCommands(text: string): boolean {
  return /^\s*\.(control|exec)\b/im.test(text) || /^\*ng_script/i.test(text);
}

function belowTheTitle(text: string, lines: readonly string[]): string {
  const titleEnd = text.indexOf('\n') + 1;
  return titleEnd === 0 ? text : `${text.slice(0, titleEnd)}${lines.join('\n')}\n${text.slice(titleEnd)}`;
}
