import { nearest } from '../../base/nearest.ts';
import { type Reading, read, refuse } from '../values/ValueFault.ts';

/** One of several words, to the letter. */
export function readChoice(text: string, choices: readonly string[]): Reading<string> {
  const word = text.trim();
  if (choices.includes(word)) return read(word);
  const expected = `one of ${choices.join(', ')}`;
  return refuse('unknown-choice', expected, word, `write ${nearest(word, choices) ?? choices[0]}`);
}

/** YAML 1.2 reads `yes` as a word and `true` as a truth; people mean the same by both. */
export function readYesNo(text: string): Reading<boolean> {
  const word = text.trim().toLowerCase();
  if (word === 'yes' || word === 'true') return read(true);
  if (word === 'no' || word === 'false') return read(false);
  return refuse('unknown-choice', 'yes or no', text, 'write yes or no');
}
