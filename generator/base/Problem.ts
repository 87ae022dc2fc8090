/** Where a problem was found: a place in a file, or a flag. */
export interface Place {
  /** File name as the user gave it, `-` for standard input, or the flag (`--vin`). */
  readonly path: string;
  /** One-based; null for a flag. */
  readonly line: number | null;
  /** One-based; null for a flag. */
  readonly column: number | null;
}

export type Severity = 'error' | 'warning' | 'note';

/** One thing that is wrong, as data: rendered in one place, the command line. */
export interface Problem {
  /** Short, stable, kebab-case: `unknown-key`, `unit-missing`, `no-circuit` … */
  readonly code: string;
  readonly severity: Severity;
  /** The key (`input`, `ramp.gain`) and where it stands, or null where a problem has no place. */
  readonly key: string | null;
  readonly place: Place | null;
  readonly expected: string;
  readonly received: string;
  readonly fix: string;
}

/** A result, or every problem that stood in its way. */
export type Outcome<T> =
  | { readonly ok: true; readonly value: T; readonly warnings: readonly Problem[] }
  | { readonly ok: false; readonly problems: readonly Problem[] };

export function success<T>(value: T, warnings: readonly Problem[] = []): Outcome<T> {
  return { ok: true, value, warnings };
}

export function failure<T>(problems: readonly Problem[]): Outcome<T> {
  return { ok: false, problems };
}
