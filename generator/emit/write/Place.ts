import { createHash } from 'node:crypto';
import { basename, dirname, join } from 'node:path';
import type { FileSystem } from './FileSystem.ts';

/**
 * A design folder and the siblings that exist only while its set is replaced.
 *
 * Siblings, for only within one folder is a rename sure to stay on one disk, and so to be atomic.
 * Their names follow from the folder's alone, so the next command finds them whoever left them.
 */
export interface Place {
  readonly fs: FileSystem;
  /** As the user gave it, for messages. */
  readonly shown: string;
  /** Absolute, links in its parents resolved. */
  readonly folder: string;
  readonly parent: string;
  /** The new set while it is written, and until it takes the folder's name. */
  readonly fresh: string;
  /** Stands while `fresh` is whole and the exchange is not over. */
  readonly journal: string;
  /** The folder before, until everything of the user's has left it. */
  readonly old: string;
  /** What is left of the folder before: only replaced files of ours. */
  readonly discard: string;
  readonly lock: string;
}

/** Most disks end names at 255 bytes; the longest ending of ours takes 22. */
const LONGEST_STEM_BYTES = 230;

export function placeAt(folder: string, shown: string, fs: FileSystem): Place {
  const parent = dirname(folder);
  const sibling = (purpose: string) => join(parent, `.${stemOf(basename(folder))}.counterslope-${purpose}`);
  return {
    fs,
    shown,
    folder,
    parent,
    fresh: sibling('new'),
    journal: sibling('journal'),
    old: sibling('old'),
    discard: sibling('discard'),
    lock: sibling('lock'),
  };
}

function stemOf(name: string): string {
  if (Buffer.byteLength(name) <= LONGEST_STEM_BYTES) return name;
  return createHash('sha256').update(name).digest('hex');
}
