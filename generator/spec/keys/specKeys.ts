import { controllerKeys } from './controllerKeys.ts';
import { powerStageKeys } from './powerStageKeys.ts';
import { rampKeys } from './rampKeys.ts';
import type { SpecKey } from './SpecKey.ts';
import { sheetKeys } from './sheetKeys.ts';

/** Every key of the specification, in the order in which it is written. */
export const specKeys: readonly SpecKey[] = [...powerStageKeys, ...controllerKeys, ...rampKeys, ...sheetKeys];

/** Known, and not there yet. */
export const reservedKeys: readonly string[] = [
  'process',
  'trim',
  'tolerances',
  'temperature',
  'network',
  'comparatorNoise',
  'waivers',
  'sweep',
  'mains',
  'feedback',
];

/** Groups that may also be given as one value: `inductance: 10 uH` is `inductance: { value: 10 uH }`. */
const shorthands: ReadonlyMap<string, string> = new Map([['inductance', 'inductance.value']]);

const byPath: ReadonlyMap<string, SpecKey> = new Map(specKeys.map((key) => [key.path, key]));

const groups: ReadonlyMap<string, readonly string[]> = groupMembers();

function groupMembers(): Map<string, string[]> {
  const members = new Map<string, string[]>([['', []]]);
  for (const { path } of specKeys) {
    const names = path.split('.');
    names.forEach((name, depth) => {
      const group = names.slice(0, depth).join('.');
      const known = members.get(group) ?? [];
      if (!known.includes(name)) members.set(group, [...known, name]);
    });
  }
  return members;
}

export function specKey(path: string): SpecKey | undefined {
  return byPath.get(path) ?? byPath.get(shorthands.get(path) ?? '');
}

/** Names of the keys in a group, `''` for the top; undefined where there is no such group. */
export function membersOf(group: string): readonly string[] | undefined {
  return groups.get(group);
}

/** The key as users name it: the shorthand where there is one. */
export function publicName(path: string): string {
  for (const [short, long] of shorthands) if (long === path) return short;
  return path;
}

export interface SpecFlag {
  /** `--vin` */
  readonly flag: string;
  readonly key: string;
  readonly doc: string;
  readonly example: string;
}

/** The keys that have a flag of their own, in the table's order. */
export const specFlags: readonly SpecFlag[] = specKeys
  .filter((key) => key.flag !== undefined)
  .map(({ flag, path, doc, example }) => ({ flag: flag!, key: publicName(path), doc, example }));
