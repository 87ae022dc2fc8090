import type { Problem } from '../../base/Problem.ts';

/**
 * How work on a design folder ended; the kinds differ by exit code.
 *
 * `refused`: the user must decide something first, nothing was written (2). `machine`: disk, rights, another
 * run at work; nothing half-written (3). `interrupted`: the signal came before the new set was in place;
 * temporary files are removed (130, 143).
 */
export type FolderOutcome<T> =
  | { readonly kind: 'done'; readonly value: T; readonly notes: readonly Problem[] }
  | { readonly kind: 'refused'; readonly problems: readonly Problem[] }
  | { readonly kind: 'machine'; readonly problems: readonly Problem[] }
  | { readonly kind: 'interrupted' };

export function done<T>(value: T, notes: readonly Problem[] = []): FolderOutcome<T> {
  return { kind: 'done', value, notes };
}

export function refused(...problems: readonly Problem[]): FolderOutcome<never> {
  return { kind: 'refused', problems };
}

/** A problem of the folder, or of a file in it, under the name by which the user called it. */
export function folderProblem(
  path: string,
  code: string,
  words: { readonly expected: string; readonly received: string; readonly fix: string },
  severity: Problem['severity'] = 'error',
): Problem {
  return { code, severity, key: null, place: { path, line: null, column: null }, ...words };
}
