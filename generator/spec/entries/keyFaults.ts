import { isPrototypeKey } from '../keys/isPrototypeKey.ts';
import { membersOf, reservedKeys, specKey } from '../keys/specKeys.ts';
import { type KeyNotation, suggestKey } from '../keys/suggestKey.ts';
import { displayed, type ValueFault } from '../values/ValueFault.ts';

/**
 * What is wrong with a key by its name alone, or null.
 * @param group dotted path of the group it stands in, `''` for the top
 */
export function keyFault(group: string, name: string, notation: KeyNotation): ValueFault | null {
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
  const code = /^[\d.]+ ?[A-Za-z%]*$/.test(name) ? 'decimal-comma' : 'unknown-key';
  return { code, expected: where, received, fix: suggestKey(group, name, notation) };
}

/** A group that was given as one value, or a value that was given as a group. */
export function kindFault(path: string, received: string): ValueFault {
  const members = membersOf(path);
  const key = specKey(path);
  const name = path.split('.').at(-1);
  if (members === undefined) {
    const isText = key?.form.kind === 'text';
    const expected = isText ? 'text' : `one value, such as ${key?.example}`;
    return {
      code: 'wrong-kind',
      expected,
      received,
      fix: isText ? 'put the text in quotes' : `write ${name}: ${key?.example}`,
    };
  }
  const member = members.find((candidate) => specKey(`${path}.${candidate}`) !== undefined) ?? members[0]!;
  const value = key === undefined ? '' : `one value, such as ${key.example}, or `;
  const map = `{ ${member}: ${specKey(`${path}.${member}`)?.example ?? '…'} }`;
  const expected = `${value}a map with keys of ${path}: ${members.join(', ')}`;
  return { code: 'wrong-kind', expected, received, fix: `write ${name}: ${map}` };
}
