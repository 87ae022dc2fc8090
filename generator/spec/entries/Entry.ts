import type { Place, Problem } from '../../base/Problem.ts';
import { publicName } from '../keys/specKeys.ts';
import type { ValueFault } from '../values/ValueFault.ts';

/** What stands behind a key, before it is read. */
export type Given =
  | { readonly kind: 'scalar'; readonly text: string }
  | { readonly kind: 'list'; readonly items: readonly { readonly text: string; readonly place: Place }[] }
  | { readonly kind: 'empty' };

/** A known key with what was given for it, from a document or a flag. */
export interface Entry {
  /** Path in the table of keys. */
  readonly path: string;
  /** Where the value stands. */
  readonly place: Place;
  readonly given: Given;
}

export function problemAt(path: string | null, place: Place | null, fault: ValueFault): Problem {
  return { severity: 'error', key: path === null ? null : publicName(path), place, ...fault };
}
