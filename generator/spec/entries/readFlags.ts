import type { Place, Problem } from '../../base/Problem.ts';
import { membersOf, specKey, specKeys } from '../keys/specKeys.ts';
import { displayed, type ValueFault } from '../values/ValueFault.ts';
import { type Entry, problemAt } from './Entry.ts';
import { keyFault } from './keyFaults.ts';

export interface GivenFlag {
  /** `--vin` */
  readonly flag: string;
  readonly value: string;
}

export interface EntryReading {
  readonly entries: readonly Entry[];
  readonly problems: readonly Problem[];
}

/**
 * Flags and `--set KEY=VALUE` as entries; what is named twice is a problem.
 * @throws Error when a flag is not one of the table's: callers pass no others on
 */
export function readFlags(flags: readonly GivenFlag[], sets: readonly string[]): EntryReading {
  const readings = [...flags.map(flagEntry), ...sets.map(setEntry)];
  const problems = readings.filter((reading): reading is Problem => 'code' in reading);
  const entries: Entry[] = [];
  for (const entry of readings.filter((reading): reading is Entry => 'given' in reading)) {
    const earlier = entries.find((other) => other.path === entry.path);
    if (earlier === undefined) entries.push(entry);
    else problems.push(problemAt(entry.path, entry.place, givenTwice(earlier, entry)));
  }
  return { entries, problems };
}

function flagEntry({ flag, value }: GivenFlag): Entry {
  const key = specKeys.find((candidate) => candidate.flag === flag);
  if (key === undefined) throw new Error(`no key of the specification has the flag ${flag}`);
  return entry(key.path, flag, value);
}

function setEntry(text: string): Entry | Problem {
  const cut = text.indexOf('=');
  const name = text.slice(0, cut).trim();
  if (cut < 0 || name === '') return problemAt(null, flagPlace('--set'), setForm(text));
  const path = specKey(name)?.path;
  if (path !== undefined) return entry(path, '--set', text.slice(cut + 1));
  const dot = name.lastIndexOf('.');
  const group =
    membersOf(name.slice(0, Math.max(dot, 0))) === undefined ? '' : name.slice(0, Math.max(dot, 0));
  const fault =
    membersOf(name) === undefined ? keyFault(group, name.slice(group === '' ? 0 : dot + 1), 'dotted') : null;
  return problemAt(name, flagPlace('--set'), fault ?? setGroup(name, text.slice(cut + 1)));
}

function entry(path: string, flag: string, text: string): Entry {
  return { path, place: flagPlace(flag), given: { kind: 'scalar', text } };
}

function flagPlace(flag: string): Place {
  return { path: flag, line: null, column: null };
}

function setForm(text: string): ValueFault {
  return {
    code: 'set-form',
    expected: 'KEY=VALUE',
    received: displayed(text),
    fix: 'write --set "input=8 V to 36 V"',
  };
}

/** A group has no value; its keys are set one by one. */
function setGroup(name: string, text: string): ValueFault {
  const members = membersOf(name)!.map((member) => `${name}.${member}`);
  const example = members.map(specKey).find((key) => key !== undefined)?.example ?? '…';
  const fix = `write --set "${members[0]}=${example}"`;
  return { code: 'wrong-kind', expected: `one of ${members.join(', ')}`, received: displayed(text), fix };
}

function givenTwice(earlier: Entry, entry: Entry): ValueFault {
  const received = `${entry.place.path} after ${earlier.place.path}`;
  return {
    code: 'given-twice',
    expected: 'each key once on the command line',
    received,
    fix: 'drop one of the two',
  };
}
