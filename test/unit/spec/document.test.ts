import { describe, expect, test } from 'vitest';
import { nestsTooDeep } from '../../../generator/spec/document/nestsTooDeep.ts';
import { accepted, least, refused } from './reading.ts';

const codesOf = async (text: string) => (await refused({ text })).map(({ code }) => code);

describe('a document', () => {
  test('may begin with a byte-order mark and have lines that end in CR LF', async () => {
    const { place } = await accepted({ text: `\ufeff${least}output: 5 V\n`.replaceAll('\n', '\r\n') });
    expect(place('input')).toEqual({ path: 'rail.yaml', line: 1, column: 8 });
    expect(place('output')).toEqual({ path: 'rail.yaml', line: 3, column: 9 });
  });

  test('may be JSON', async () => {
    const text =
      '{\n\t"input": "8 V",\n\t"frequency": "1 MHz",\n\t"turnsRatio": 4,\n\t"converter": "flyback"\n}';
    const { specification, place } = await accepted({ text });
    expect(specification.turnsRatio.nominal).toBe(4);
    expect(place('frequency')).toEqual({ path: 'rail.yaml', line: 3, column: 15 });
  });

  test('may repeat a value by an alias', async () => {
    const { specification } = await accepted({
      text: 'input: &rail 12 V\nfrequency: 1 MHz\nramp: { supply: *rail }',
    });
    expect(specification.ramp.supply_V.nominal).toBe(12);
  });

  test('may hold groups with nothing in them', async () => {
    expect((await accepted({ text: `${least}controller:\nramp: {}\n` })).specification.controller).toBeNull();
  });

  test.each([
    ['', 'empty-document'],
    ['# only a comment\n', 'empty-document'],
    ['null', 'empty-document'],
    ['- input: 8 V', 'wrong-kind'],
    ['8 V to 36 V', 'wrong-kind'],
    [`${least}---\n${least}`, 'several-documents'],
    ['input: 8 V\n\tfrequency: 1 MHz', 'yaml-syntax'],
    ['input: "8 V', 'yaml-syntax'],
    ['title: a: b', 'yaml-syntax'],
    ['title: @rail', 'yaml-syntax'],
    ['input: *rail', 'alias-unknown'],
  ])('%j is refused: %s', async (text, code) => {
    const problems = await refused({ text });
    expect(problems[0]).toMatchObject({ code, place: { path: 'rail.yaml' } });
    expect(problems.every((problem) => problem.code !== 'key-missing')).toBe(true);
  });

  test('a syntax error is named with its line and column', async () => {
    expect((await refused({ text: 'input: 8 V\n\tfrequency: 1 MHz' }))[0]?.place).toEqual({
      path: 'rail.yaml',
      line: 2,
      column: 1,
    });
  });

  test.each([
    [`${least}input: 9 V`, 'duplicate-key'],
    [`${least}ramp: { law: vin, law: fixed }`, 'duplicate-key'],
    [`${least}__proto__: { polluted: yes }`, 'prototype-key'],
    [`${least}constructor: 1`, 'prototype-key'],
    [`${least}ramp: { toString: 1 }`, 'prototype-key'],
    [`${least}? [a, b]\n: 1`, 'key-form'],
    [`${least}<<: { load: 3 A }`, 'unknown-key'],
    [`${least}title: { text: rail }`, 'wrong-kind'],
    [`${least}title: {{rail}}`, 'wrong-kind'],
    [`${least}load: [1 A, 2 A]`, 'wrong-kind'],
    [`${least}ramp: vin`, 'wrong-kind'],
    [`${least}sheet: [a]`, 'wrong-kind'],
    [`${least}output: [[5 V]]`, 'wrong-kind'],
    [`${least}output: []`, 'value-missing'],
    [`${least}load:`, 'value-missing'],
    [`${least}load: ~`, 'value-missing'],
    [`${least}load: !ampere 3 A`, 'yaml-syntax'],
    [`${least}rectifier: { drop: 0.4 V, 7 uH }`, 'decimal-comma'],
  ])('%j: %s', async (text, code) => {
    expect(await codesOf(text)).toEqual([code]);
  });

  test.each([
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
  ])('%s is known, and refused by name as not yet available', async (key) => {
    const problems = await refused({ text: `${least}${key}: { a: [1, 2] }` });
    expect(problems).toMatchObject([
      { code: 'not-yet-available', key, received: key, place: { line: 3, column: 1 } },
    ]);
    expect(problems[0]?.fix).toContain('not yet available');
  });

  test('reading one leaves the prototype of objects as it was', async () => {
    await refused({ text: `${least}__proto__: { polluted: yes }`, sets: ['__proto__.polluted=yes'] });
    expect(({} as Record<string, unknown>).polluted).toBeUndefined();
  });
});

describe('what would cost time or memory', () => {
  test('aliases of aliases are refused before they expand', async () => {
    const level = (name: string, of: string) => `${name}: &${name} [${Array(9).fill(of).join(', ')}]\n`;
    const text = level('a', 'x') + level('b', '*a') + level('c', '*b') + level('d', '*c') + level('e', '*d');
    expect(await codesOf(text)).toEqual(['alias-expansion']);
  });

  test('more than a hundred aliases are refused', async () => {
    const text = `a: &a x\nb: [${Array(101).fill('*a').join(', ')}]`;
    expect(await codesOf(text)).toEqual(['alias-expansion']);
  });

  test('an alias of what holds it ends', async () => {
    expect(await codesOf(`${least}ramp: &ramp { law: vin, series: *ramp }`)).not.toEqual([]);
  });

  test.each([
    ['brackets', '['.repeat(500_000)],
    ['braces', '{a: '.repeat(100_000)],
    ['lists in lists', '- '.repeat(100_000)],
  ])('%s nested without end are refused before the parser sees them', async (_, text) => {
    expect(nestsTooDeep(text)).toBe(true);
    expect(await codesOf(text)).toEqual(['nesting']);
  });

  test('brackets that close, and dashes that end with their line, do not nest', () => {
    expect(nestsTooDeep('[{}] '.repeat(5000))).toBe(false);
    expect(nestsTooDeep('- a: 1\n'.repeat(5000))).toBe(false);
  });

  test('of a thousand unknown keys the first hundred are named', async () => {
    const text = Array.from({ length: 1000 }, (_, index) => `unheard${index}: 1`).join('\n');
    const codes = await codesOf(text);
    expect(codes).toHaveLength(101);
    expect(codes.at(-1)).toBe('too-many-problems');
  });

  test('more than 1 MB is refused, also where characters are fewer than bytes', async () => {
    expect(await codesOf(`# ${'x'.repeat(1_048_576)}`)).toEqual(['document-too-large']);
    expect(await codesOf(`# ${'µ'.repeat(600_000)}`)).toEqual(['document-too-large']);
    expect(await codesOf(`${least}# ${'x'.repeat(1_000_000)}`)).toEqual([]);
  });
});
