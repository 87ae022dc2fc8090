/** One flag, as the parser and the help know it. */
export interface Flag {
  /** Without the dashes. */
  readonly name: string;
  readonly short: string | null;
  /** What stands for the value in the help; null: the flag takes none. */
  readonly placeholder: string | null;
  /** One line of help. */
  readonly meaning: string;
  readonly repeatable: boolean;
  /** The only values that it takes, or null. */
  readonly choices: readonly string[] | null;
  readonly group: 'specification' | 'work' | 'output';
  /** Known, and refused by name: a later version has it. */
  readonly later: boolean;
}

export function takesValue(flag: Flag): boolean {
  return flag.placeholder !== null;
}

/** `-o, --out DIR` */
export function flagForm({ name, short, placeholder }: Flag): string {
  const long = placeholder === null ? `--${name}` : `--${name} ${placeholder}`;
  return short === null ? long : `-${short}, ${long}`;
}
