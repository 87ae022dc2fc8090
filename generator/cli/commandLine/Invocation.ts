/** A command line that has been understood. */
export interface Invocation {
  readonly command: string;
  readonly positionals: readonly string[];
  /** Values by flag name, in the order given; a flag that was not given is absent. */
  readonly values: ReadonlyMap<string, readonly string[]>;
  /** Flags given that take no value. */
  readonly switches: ReadonlySet<string>;
}

export function givenValue({ values }: Invocation, flag: string): string | null {
  return values.get(flag)?.[0] ?? null;
}

export function givenValues({ values }: Invocation, flag: string): readonly string[] {
  return values.get(flag) ?? [];
}
