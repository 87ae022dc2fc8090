import { isPrototypeKey } from '../keys/isPrototypeKey.ts';
import { membersOf, reservedKeys, specKey } from '../keys/specKeys.ts';
import { suggestKey } from '../keys/suggestKey.ts';
import { displayed, type ValueFault } from '../values/ValueFault.ts';

/**
 * What is wrong with a key by its name alone, or null.
 * @param group dotted path of the group it stands in, `''` for the top
 */
export function keyFault(group: string, name: string): ValueFault | null {
  const path = group === '' ? name : `${group}.${name}`;
  const where = group === '' ? 'a key of the specification' : `a key of ${group}`;
  const received = displayed(name);
  if (name.split('.').some(isPrototypeKey)) {
    return {
      code: 'prototype-key',
      expected: where,
      received,
      fix: 'remove it: no specification has such a key',
    };
  }
  const reserved = reservedKeys.find((key) => path === key || path.startsWith(`${key}.`));
  if (reserved !== undefined) {
    const fix = `remove ${reserved}: the key is known, what it asks for is not yet available`;
    return { code: 'not-yet-available', expected: 'a key that is available', received, fix };
  }
  if (!name.includes('.') && (specKey(path) !== undefined || membersOf(path) !== undefined)) return null;
  return { code: 'unknown-key', expected: where, received, fix: suggestKey(group, name) };
}

/** A group that was given as one value, or a value that was given as a group. */
export function kindFault(path: string, received: string): ValueFault {
  const members = membersOf(path);
  const example = specKey(path)?.example;
  const forms = [
    example === undefined ? null : `a value such as ${example}`,
    members === undefined ? null : `a map of ${members.join(', ')}`,
  ];
  const fix =
    example === undefined
      ? `write ${members![0]} under ${path}: ${specKey(`${path}.${members![0]}`)?.example ?? '…'}`
      : `write ${path.split('.').at(-1)}: ${example}`;
  return { code: 'wrong-kind', expected: forms.filter((form) => form !== null).join(', or '), received, fix };
}
