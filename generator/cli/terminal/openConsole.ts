import type { Problem } from '../../base/Problem.ts';
import type { Manners } from '../commandLine/readCommandLine.ts';
import { printable } from '../problems/printable.ts';
import { problemsDocument } from '../problems/problemsDocument.ts';
import { problemText } from '../problems/problemText.ts';
import type { Surroundings } from '../Surroundings.ts';
import { type Paint, paintFor } from './paint.ts';

/** The one way in which commands speak: results to stdout, the rest to stderr. */
export interface Console {
  readonly json: boolean;
  /** For views on stdout. */
  readonly paint: Paint;
  result(text: string): void;
  /** Problems that end the command: prose, and with `--json` the document on stdout. */
  problems(problems: readonly Problem[]): void;
  /** Warnings and notes on the way. */
  remarks(problems: readonly Problem[]): void;
  /** One line of what was done. */
  message(text: string): void;
  /** Replaces the one progress line; without a terminal nothing is seen. */
  progress(text: string): void;
  /** Leaves no progress line behind. */
  close(): void;
}

const eraseLine = '\r\u001b[2K';
const widest = 79;

export function openConsole(
  { stdout, stderr, env }: Pick<Surroundings, 'stdout' | 'stderr' | 'env'>,
  { json, quiet, color }: Manners,
): Console {
  const paint = paintFor(stderr, color, env);
  const showsProgress = stderr.isTTY === true && !quiet;
  let inProgress = false;
  const say = (text: string) => {
    stderr.write(inProgress ? `${eraseLine}${text}` : text);
    inProgress = false;
  };
  return {
    json,
    paint: paintFor(stdout, color, env),
    result(text) {
      if (inProgress) say('');
      stdout.write(text);
    },
    problems(problems) {
      say(problems.map((problem) => problemText(problem, paint)).join(''));
      if (json) stdout.write(problemsDocument(problems));
    },
    remarks(problems) {
      if (!quiet && problems.length > 0) say(problems.map((problem) => problemText(problem, paint)).join(''));
    },
    message(text) {
      if (!quiet) say(`${printable(text)}\n`);
    },
    progress(text) {
      if (!showsProgress) return;
      stderr.write(`${eraseLine}${[...text].slice(0, widest).join('')}`);
      inProgress = true;
    },
    close() {
      if (inProgress) say('');
    },
  };
}
