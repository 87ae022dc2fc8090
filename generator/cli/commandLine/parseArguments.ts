import type { Tokens } from './takeTokens.ts';

/** Flag values as the parser gives them: a text, several, or true. */
export interface ParsedArguments {
  readonly words: readonly string[];
  readonly values: ReadonlyMap<string, readonly string[]>;
  readonly switches: ReadonlySet<string>;
}

/** In front of every value, so that yargs takes quotes around it for the user's own and keeps them. */
const guard = '=';

/**
 * Hands sorted tokens to yargs as `--flag=value`, the one form in which it never guesses what belongs together.
 *
 * Loaded only here: the start of every other path stays quick.
 */
export async function parseArguments({ words, given }: Tokens): Promise<ParsedArguments> {
  const { default: yargs } = await import('yargs');
  const parser = yargs([]).locale('en').help(false).version(false).exitProcess(false).parserConfiguration({
    'dot-notation': false,
    'greedy-arrays': false,
    'camel-case-expansion': false,
    'boolean-negation': false,
    'parse-numbers': false,
    'parse-positional-numbers': false,
  });
  for (const { flag, value } of given) {
    if (value === null) parser.boolean(flag.name);
    else parser.string(flag.name).array(flag.name);
  }
  const line = given.map(({ flag, value }) =>
    value === null ? `--${flag.name}` : `--${flag.name}=${guard}${value}`,
  );
  const parsed = (await parser.parseAsync([...line, '--', ...words])) as Record<string, unknown>;
  return collected(parsed, given);
}

function collected(parsed: Readonly<Record<string, unknown>>, given: Tokens['given']): ParsedArguments {
  const values = new Map<string, readonly string[]>();
  const switches = new Set<string>();
  for (const { flag, value } of given) {
    const found = parsed[flag.name];
    if (value === null) switches.add(flag.name);
    else
      values.set(
        flag.name,
        (found as string[]).map((text) => text.slice(guard.length)),
      );
  }
  return { words: (parsed._ as unknown[]).map(String), values, switches };
}
