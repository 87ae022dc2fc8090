import { expect, test } from 'vitest';
import type { Problem } from '../../generator/base/Problem.ts';
import { decodeDocument } from '../../generator/spec/decodeDocument.ts';
import { readSpecification } from '../../generator/spec/readSpecification.ts';

const least = 'input: 8 V to 36 V\nfrequency: 500 kHz\n';

/** One value in the place of another, for every kind of bad value. */
const values: readonly (readonly [key: string, ...texts: string[]])[] = [
  [
    'input',
    '8',
    '8 to 36',
    '8..36',
    '8 V..36 V',
    '8 V to 36',
    '8-36 V',
    '8 V to 12 V to 36 V',
    '36 V to 8 V',
  ],
  [
    'input',
    '4,7 V',
    '1,000 V',
    "1'000 V",
    '1 000 V',
    '1_000 V',
    '"1.000,5 V"',
    'NaN V',
    '.inf',
    '1e999 V',
    '.nan',
  ],
  [
    'input',
    '0 V',
    '-12 V',
    '1 MV',
    '20 kV',
    '8 v',
    '8 uH',
    '8 volts',
    'eight volts',
    '{ from: 8 V }',
    '[8 V]',
    '',
  ],
  ['input', '12 V ± 100 %', '12 V ± 12 V', '12 V ± 5', '12 V ± 5 A', '12 V +10 %', '12 V - 10 %', '12 V ± x'],
  ['output', '-5 V', '5', '[3.3 V, 5]', '[]', '[[5 V]]', '5 V..12 V', '0 V'],
  [
    'inductance',
    '10',
    '10 kH',
    '10 MH',
    '10 UH',
    '10 uh',
    '4u7',
    '{ value: 10 }',
    '{ ripple: 30 %, of: 3 }',
    '{}[]',
  ],
  [
    'inductance',
    '{ ripple: 30 % }',
    '{ of: 3 A }',
    '{ value: 7 uH, atPeakLimit: 10 uH }',
    '{ value: 4,7 uH }',
  ],
  ['frequency', '500', '500 KHZ', '500 kHZ', '500 mHz', '2 mHz', '500 000 Hz', '50 Hz', '5 s'],
  ['maximumDuty', '0', '0 %', '90', '110 %', '-0.5', '90 % ± 1 %', '50 % to 90 %', '0,9', 'most'],
  ['load', '3 a', '0 A', '3,5 A', '3', '3 A to 1 A'],
  ['rectifier', '0.4 V', '{ drop: -0.4 V }', '{ voltage: 0.4 V }'],
  [
    'losses',
    '{ switch: 40 MOhm }',
    '{ switch: 4n7 }',
    '{ switch: 4.7k }',
    '{ switch: 4R7 Ohm }',
    '{ diode: 4R7 }',
  ],
  ['minimumOnTime', '60', '60 nS', '-60 ns', '2 s'],
  ['senseGain', '50 MOhm', '50', '50 mV', 'mV/A', '50 mV/a'],
  ['turnsRatio', '4 V', '0', '1:4', '4 %'],
  [
    'outputCapacitor',
    '100 uF',
    '{ capacitance: 4N7 }',
    '{ capacitance: 4n7F }',
    '{ seriesResistance: 5 mOhm }',
  ],
  [
    'controller',
    '{ internalRamp: 45 mV }',
    '{ limitSeesRamp: maybe }',
    '{ oscillator: { valley: 3 V, peak: 2 V } }',
  ],
  [
    'goal',
    '{ dampingQ: 1, dampingIndex: 0.9 }',
    '{ dampingIndex: 0.5 }',
    '{ dampingQ: 0 }',
    '{ signalFloor: 20 }',
  ],
  ['ramp', '{ law: Vin }', '{ build: breadboard }', '{ gain: 23 V }', '{ series: { resistor: e96 } }', 'vin'],
  ['ramp', '{ supply: 5 }', '{ capacitance: 470 PF }', '{ capacitance: 470pf }'],
  ['title', '"a\\x07b"', '{{ x }}', '[a]'],
  ['date', '2026-02-30', '1.12.2026'],
];

const keys = [
  'frequencie: 5 V',
  'Output: 5 V',
  'vin: 5 V',
  'law: vin',
  'ramp.law: vin',
  'colour: red',
  'ramp: { lwa: vin }',
  '__proto__: 1',
  'constructor: 1',
  'sheet: { prototype: 1 }',
  '<<: 1',
  '? [a]\n: 1',
  'input: 9 V',
  'ramp: { law: vin, law: fixed }',
  ...['process', 'trim', 'tolerances', 'temperature', 'network'].map((key) => `${key}: 1`),
  ...['comparatorNoise', 'waivers', 'sweep', 'mains', 'feedback'].map((key) => `${key}: 1`),
];

const documents = [
  '',
  '# nothing\n',
  '- 8 V\n',
  'input\n',
  'title: rail\n',
  `${least}---\n${least}`,
  'input: 8 V\n\tfrequency: 1 MHz\n',
  'input: "8 V\n',
  'title: a: b\n',
  'title: @rail\n',
  'load: !ampere 3 A\n',
  'input: *rail\n',
  `a: &a [x, x]\nb: [${Array(101).fill('*a').join(', ')}]\n`,
  '['.repeat(2000),
];

const commandLines: readonly (readonly [flags: Readonly<Record<string, string>>, ...sets: string[]])[] = [
  [{}],
  [{ '--vin': '8' }],
  [{ '--vin': '8 V', '--fs': '1 MHz', '--q': '1', '--index': '0.9' }],
  [{ '--vin': '8 V', '--fs': '1 MHz', '--vout': '-12 V' }],
  [
    { '--vin': '8 V', '--fs': '1 MHz' },
    'input=9 V',
    'output',
    '=5 V',
    'outpt=5 V',
    'ramp=vin',
    'goal.dampingq=1',
  ],
  [
    { '--vin': '8 V', '--fs': '1 MHz' },
    '__proto__.x=1',
    'mains.voltage=230 V',
    'load=',
    'rectifier.drop=0,4 V',
  ],
];

function lines(title: string, problems: readonly Problem[]): string {
  const found = problems.map(({ code, key, place, expected, received, fix }) => {
    const at =
      place === null ? '' : [place.path, place.line, place.column].filter((part) => part !== null).join(':');
    return `  ${at} ${code} ${key ?? ''}\n    received ${received}\n    expected ${expected}\n    fix      ${fix}`;
  });
  const shown = title.length > 120 ? `${title.slice(0, 120)}…` : title;
  return [JSON.stringify(shown), ...found].join('\n');
}

async function messages(
  text: string | null,
  flags: Readonly<Record<string, string>> = {},
  sets: string[] = [],
) {
  const outcome = await readSpecification({
    document: text === null ? null : { name: 'rail.yaml', text },
    flags: Object.entries(flags).map(([flag, value]) => ({ flag, value })),
    sets,
  });
  expect(outcome.ok, text ?? JSON.stringify([flags, sets])).toBe(false);
  return outcome.ok ? [] : outcome.problems;
}

test('every kind of bad input has its message, and the message stays as it is', async () => {
  const sections: string[] = [];
  for (const [key, ...texts] of values) {
    for (const text of texts) {
      const rest = least.replace(new RegExp(`^${key}:.*\n`, 'm'), '');
      sections.push(lines(`${key}: ${text}`, await messages(`${key}: ${text}\n${rest}`)));
    }
  }
  for (const line of keys) sections.push(lines(line, await messages(`${least}${line}\n`)));
  for (const text of documents) sections.push(lines(text, await messages(text)));
  for (const [flags, ...sets] of commandLines) {
    sections.push(lines(JSON.stringify([flags, sets]), await messages(null, flags, sets)));
  }
  const undecoded = decodeDocument(new Uint8Array([0x61, 0x3a, 0x20, 0xb5]), 'rail.yaml');
  const oversized = decodeDocument(new Uint8Array(1_048_577), 'rail.yaml');
  sections.push(lines('bytes that are not UTF-8', undecoded.ok ? [] : undecoded.problems));
  sections.push(lines('more than 1 MB', oversized.ok ? [] : oversized.problems));
  await expect(`${sections.join('\n\n')}\n`).toMatchFileSnapshot('./spec-messages.txt');
});
