/** What is wrong with one value, before it is known where it stands. */
export interface ValueFault {
  /** Stable, kebab-case: `unit-missing`, `decimal-comma`, `range-reversed` … */
  readonly code: string;
  readonly expected: string;
  readonly received: string;
  readonly fix: string;
}

/** A value read from text, or the first thing that is wrong with it. */
export type Reading<T> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly fault: ValueFault };

export function read<T>(value: T): Reading<T> {
  return { ok: true, value };
}

export function refuse(code: string, expected: string, received: string, fix: string): Reading<never> {
  return { ok: false, fault: { code, expected, received: displayed(received), fix } };
}

const longestShown = 80;
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what must not reach a terminal
const unprintable = /[\u0000-\u001f\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069\ud800-\udfff]/gu;

/** The user's own words, short enough and harmless to a terminal. */
export function displayed(text: string): string {
  if (text.trim() === '') return 'nothing';
  const short = text.length > longestShown ? `${text.slice(0, longestShown)}…` : text;
  return short.replace(
    unprintable,
    (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}
