import { nearest } from '../../base/nearest.ts';
import { membersOf, publicName, specFlags, specKeys } from './specKeys.ts';

export type KeyNotation = 'nested' | 'dotted';

/**
 * How to mend a key that is not known in its group (`''` for the top).
 * @param form how the user names keys: nested in a document, dotted on the command line
 */
export function suggestKey(group: string, name: string, form: KeyNotation): string {
  const asWritten = form === 'dotted' ? dotted : nested;
  if (/^[\d.]+ ?[A-Za-z%]*$/.test(name))
    return 'inside { } a comma parts keys: write numbers with a decimal point';
  if (name === '<<') return 'YAML 1.2 merges no keys: write them out';
  const elsewhere = exactElsewhere(name);
  const siblings = membersOf(group) ?? [];
  const sibling = nearest(name, siblings);
  if (elsewhere !== null && sibling?.toLowerCase() !== name.toLowerCase()) return asWritten(elsewhere);
  if (sibling !== null) return asWritten(group === '' ? sibling : `${group}.${sibling}`);
  const far = nearestElsewhere(name);
  return far === null ? `remove it; known here: ${siblings.join(', ')}` : asWritten(far);
}

/** The same name at another level, a dotted path in one word, or the name of a flag. */
function exactElsewhere(name: string): string | null {
  const lower = name.toLowerCase();
  const path = specKeys.find((key) => key.path.toLowerCase() === lower || lastName(key.path) === lower)?.path;
  const flag = specFlags.find(({ flag }) => flag === `--${lower}`)?.key;
  return (path !== undefined ? publicName(path) : flag) ?? null;
}

function nearestElsewhere(name: string): string | null {
  const paths = specKeys.map((key) => key.path);
  const whole = nearest(name, paths);
  if (whole !== null) return publicName(whole);
  const last = nearest(
    name,
    paths.map((path) => path.split('.').at(-1)!),
  );
  return last === null ? null : publicName(paths.find((path) => path.split('.').at(-1) === last)!);
}

function lastName(path: string): string {
  return path.split('.').at(-1)!.toLowerCase();
}

function dotted(path: string): string {
  return `write ${path}`;
}

/** `write frequency`, `write law under ramp` */
function nested(path: string): string {
  const at = path.lastIndexOf('.');
  return at < 0 ? `write ${path}` : `write ${path.slice(at + 1)} under ${path.slice(0, at)}`;
}
