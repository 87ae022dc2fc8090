import { readFileSync } from 'node:fs';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { expect, test } from 'vitest';
import { parse } from 'yaml';
import { specificationSchema } from '../../../generator/spec/specificationSchema.ts';
import { starterSpecification } from '../../../generator/spec/starterSpecification.ts';

const validate = new Ajv2020({ strict: true, allowUnionTypes: true }).compile(specificationSchema());
const valid = (text: string) => validate(parse(text));

test('it accepts a specification that uses every key', () => {
  expect(valid(readFileSync(new URL('./every-key.yaml', import.meta.url), 'utf8'))).toBe(true);
});

test('it accepts the starter specification', () => {
  expect(valid(starterSpecification())).toBe(true);
});

test.each([
  'inductance: { ripple: 20 % to 40 %, of: 3 A }',
  'output: [3.3 V, 5 V to 12 V]',
  'maximumDuty: 0.9',
  'controller:',
  'controller: { limitSeesRamp: true }',
])('it accepts %s', (line) => {
  expect(valid(`input: 8 V\nfrequency: 1 MHz\n${line}`)).toBe(true);
});

test.each([
  'input: 8\nfrequency: 1 MHz',
  'input: 8 V',
  'input: 8 V\nfrequency: 1 MHz\nfoo: 1',
  'input: 8 V\nfrequency: 1 MHz\nramp: { law: vinn }',
  'input: 8 V\nfrequency: 1 MHz\nramp: { lwa: vin }',
  'input: 8 V\nfrequency: 1 MHz\nload: [1 A]',
  'input: 8 V\nfrequency: 1 MHz\ndate: tomorrow',
  'input: 8 V\nfrequency: 1 MHz\nprocess: x',
])('it refuses %j', (text) => {
  expect(valid(text)).toBe(false);
});
