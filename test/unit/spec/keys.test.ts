import { expect, test } from 'vitest';
import { membersOf, publicName, specKey, specKeys } from '../../../generator/spec/keys/specKeys.ts';
import { suggestKey } from '../../../generator/spec/keys/suggestKey.ts';

test.each([
  ['', 'frequencie', 'write frequency'],
  ['', 'Input', 'write input'],
  ['', 'inductence', 'write inductance'],
  ['', 'law', 'write law under ramp'],
  ['', 'ramp.law', 'write law under ramp'],
  ['', 'dampingq', 'write dampingQ under goal'],
  ['', 'vin', 'write input'],
  ['', 'esr', 'write seriesResistance under outputCapacitor'],
  ['', 'drop', 'write drop under rectifier'],
  ['ramp', 'lwa', 'write law under ramp'],
  ['ramp', 'serie', 'write series under ramp'],
  ['ramp', 'senseGain', 'write senseGain'],
  ['rectifier', 'voltage', 'remove it; known here: drop'],
])('in %j, %s: %s', (group, name, fix) => {
  expect(suggestKey(group, name, 'nested')).toBe(fix);
});

test('on the command line the whole path is written', () => {
  expect(suggestKey('', 'law', 'dotted')).toBe('write ramp.law');
});

test('every key has a doc sentence, and sits in a group that knows it', () => {
  for (const { path, doc } of specKeys) {
    expect(doc).toMatch(/^[A-Z].*\.$/);
    const cut = path.lastIndexOf('.');
    expect(membersOf(path.slice(0, Math.max(cut, 0)))).toContain(path.slice(cut + 1));
  }
});

test('inductance is short for its value', () => {
  expect(specKey('inductance')).toBe(specKey('inductance.value'));
  expect(publicName('inductance.value')).toBe('inductance');
});

test('no path and no flag is listed twice', () => {
  const paths = specKeys.map(({ path }) => path);
  const flags = specKeys.flatMap(({ flag }) => flag ?? []);
  expect(new Set(paths).size).toBe(paths.length);
  expect(new Set(flags).size).toBe(flags.length);
});
