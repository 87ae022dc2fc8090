import { nearest } from '../../base/nearest.ts';
import type { Problem } from '../../base/Problem.ts';
import { type Flag, takesValue } from './Flag.ts';
import { usageProblem } from './usageProblem.ts';

/** What the words of a command line are, before any is looked into. */
export interface Tokens {
  readonly words: readonly string[];
  /** In the order typed; value null for a flag that takes none. */
  readonly given: readonly { readonly flag: Flag; readonly value: string | null }[];
  readonly problems: readonly Problem[];
}

/**
 * Sorts the words of a command line into flags with their values, and the rest.
 *
 * Every flag with a value takes exactly the next word, whatever it begins with: `--vin "-12 V"`. Only a word
 * that is itself a flag cannot follow, since then the value was most likely forgotten; `--out=--json` can
 * still say it.
 */
export function takeTokens(argv: readonly string[], flags: readonly Flag[]): Tokens {
  const words: string[] = [];
  const given: { flag: Flag; value: string | null }[] = [];
  const problems: Problem[] = [];
  for (let at = 0; at < argv.length; at++) {
    const token = argv[at]!;
    if (token === '--') {
      words.push(...argv.slice(at + 1));
      break;
    }
    if (token === '-' || !token.startsWith('-')) {
      words.push(token);
      continue;
    }
    const { flag, typed, attached } = recognise(token, flags);
    if (flag === null) {
      problems.push(unknownFlag(typed, flags));
    } else if (!takesValue(flag)) {
      given.push({ flag, value: null });
      if (attached !== null) problems.push(valueNotTaken(typed, attached));
    } else {
      const value = attached ?? argv[++at];
      const isForgotten = value === undefined || (attached === null && isFlag(value, flags));
      if (isForgotten) problems.push(valueMissing(typed, flag, value));
      else given.push({ flag, value });
    }
  }
  return { words, given, problems: [...problems, ...repeated(given)] };
}

interface Recognised {
  readonly flag: Flag | null;
  /** The flag's own part of the token. */
  readonly typed: string;
  /** The value after `=`, or null. */
  readonly attached: string | null;
}

function recognise(token: string, flags: readonly Flag[]): Recognised {
  const equals = token.indexOf('=');
  const typed = equals < 0 ? token : token.slice(0, equals);
  const flag = flags.find(({ name, short }) => typed === `--${name}` || typed === `-${short}`) ?? null;
  if (flag === null && !token.startsWith('--')) return recogniseJoined(token, flags);
  return { flag, typed, attached: equals < 0 ? null : token.slice(equals + 1) };
}

/** `-oDIR` */
function recogniseJoined(token: string, flags: readonly Flag[]): Recognised {
  const typed = token.slice(0, 2);
  const flag = flags.find((candidate) => takesValue(candidate) && typed === `-${candidate.short}`) ?? null;
  if (flag === null) return { flag, typed: token, attached: null };
  return { flag, typed, attached: token.slice(2) };
}

function isFlag(token: string, flags: readonly Flag[]): boolean {
  return flags.some(({ name, short }) => token === `--${name}` || token === `-${short}`);
}

function repeated(given: Tokens['given']): readonly Problem[] {
  const seen = new Map<Flag, number>();
  for (const { flag } of given) seen.set(flag, (seen.get(flag) ?? 0) + 1);
  return [...seen].flatMap(([flag, times]) =>
    times === 1 || flag.repeatable ? [] : [givenAgain(flag, times)],
  );
}

function unknownFlag(typed: string, flags: readonly Flag[]): Problem {
  const name = typed.replace(/^-+/, '');
  const names = flags.map((flag) => flag.name);
  // A single letter is near to any other; as it stands it may lack its second dash.
  const near = name.length > 1 ? nearest(name, names) : (names.find((known) => known === name) ?? null);
  return usageProblem(typed, {
    code: 'unknown-flag',
    expected: 'a known flag',
    received: typed,
    fix: near === null ? 'see counterslope --help' : `did you mean --${near}?`,
  });
}

function valueMissing(typed: string, flag: Flag, next: string | undefined): Problem {
  const name = flag.placeholder ?? 'VALUE';
  return usageProblem(typed, {
    code: 'value-missing',
    expected: name === 'VALUE' ? 'a value after the flag' : `a value (${name}) after the flag`,
    received: next === undefined ? 'nothing' : `the flag ${next}`,
    fix:
      next === undefined ? `write ${typed} ${name}` : `write ${typed} ${name}, or ${typed}=${next} if meant`,
  });
}

function valueNotTaken(typed: string, value: string): Problem {
  return usageProblem(typed, {
    code: 'value-not-taken',
    expected: 'no value',
    received: value === '' ? 'an empty one' : value,
    fix: `write ${typed} alone`,
  });
}

function givenAgain({ name }: Flag, times: number): Problem {
  return usageProblem(`--${name}`, {
    code: 'flag-repeated',
    expected: 'the flag once',
    received: times === 2 ? 'it twice' : `it ${times} times`,
    fix: 'keep the one that you mean',
  });
}
