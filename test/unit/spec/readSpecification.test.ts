import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { exactly, spanOf } from '../../../generator/base/Quantity.ts';
import { specFlags, specKeys } from '../../../generator/spec/keys/specKeys.ts';
import { accepted, least, refused } from './reading.ts';

const everyKey = readFileSync(new URL('./every-key.yaml', import.meta.url), 'utf8');

describe('a specification that uses every key', () => {
  test('is read whole, in SI', async () => {
    const { specification } = await accepted({ text: everyKey });
    expect(specification).toMatchObject({
      title: 'greenhouse valve controller, auxiliary rail',
      converter: 'buck',
      input_V: spanOf(exactly(8), exactly(36)),
      output_V: [spanOf(exactly(5))],
      inductance: {
        kind: 'value',
        value_H: spanOf({ nominal: 10e-6, low: 8e-6, high: 12e-6 }),
        atPeakLimit_H: exactly(7e-6),
      },
      frequency_Hz: spanOf({ nominal: 500e3, low: 450e3, high: 550e3 }),
      maximumDutyRatio: 0.9,
      load_A: spanOf(exactly(0.3), exactly(3)),
      rectifierDrop_V: exactly(0.4),
      losses: { switch_ohm: exactly(0.04), winding_ohm: exactly(0.025), rectifier_ohm: exactly(0.02) },
      minimumOnTime_s: exactly(60e-9),
      senseGain_V_per_A: { nominal: 0.05, low: 0.0475, high: 0.0525 },
      outputCapacitor: {
        capacitance_F: spanOf({ nominal: 100e-6, low: 80e-6, high: 120e-6 }),
        seriesResistance_ohm: spanOf(exactly(5e-3)),
      },
      controller: {
        internalRamp_V_per_s: { nominal: 45e3, low: 36e3, high: 54e3 },
        senseLimit_V: { nominal: 0.25, low: 0.2375, high: 0.2625 },
        limitSeesRamp: false,
        blankingTime_s: exactly(40e-9),
        comparatorDelay_s: exactly(30e-9),
        oscillator: { valley_V: exactly(1.2), peak_V: { nominal: 2.8, low: 2.66, high: 2.94 } },
        pinCurrent_A: { nominal: 40e-6, low: 32e-6, high: 48e-6 },
      },
      goal: { ceilingIndex: 1.5, signalFloor_V: 0.02 },
      ramp: {
        law: 'vin',
        gain: 0.75,
        build: 'board-opamp',
        injection: 'sense',
        series: { resistor: 'E96', capacitor: 'E12' },
        supply_V: { nominal: 5, low: 4.75, high: 5.25 },
        capacitance_F: exactly(470e-12),
        follows: 'nothing',
        reset: 'clock',
      },
      sheet: { owner: 'valve group', number: 'R-12', revision: 'B', author: '', approver: '', issued: '' },
      date: '2026-12-01',
    });
  });

  test('assumes nothing but that values without a tolerance are exact', async () => {
    const { assumptions } = await accepted({ text: everyKey });
    expect(new Set(assumptions.map(({ reason }) => reason))).toEqual(
      new Set(['given without a tolerance: taken as exact']),
    );
  });

  test('knows where each was given', async () => {
    const { place } = await accepted({ text: everyKey });
    expect(place('input')).toEqual({ path: 'rail.yaml', line: 3, column: 8 });
    expect(place('inductance')).toMatchObject({ line: 5 });
    expect(place('ramp.law')?.line).toBe(place('ramp')?.line);
    expect(place('turnsRatio')).toBeNull();
  });
});

describe('flags', () => {
  test('alone are enough', async () => {
    const flags = { '--vin': '8 V to 36 V', '--l': '10uH', '--fs': '500kHz' };
    const { specification, place } = await accepted({ flags });
    expect(specification.input_V).toEqual(spanOf(exactly(8), exactly(36)));
    expect(specification.output_V).toBeNull();
    expect(place('input')).toEqual({ path: '--vin', line: null, column: null });
  });

  test('override the document, and so does --set', async () => {
    const { specification, place } = await accepted({
      text: everyKey,
      flags: { '--vin': '12 V' },
      sets: ['ramp.series.resistor=E24', 'title=a=b', 'frequency = 1 MHz'],
    });
    expect(specification.input_V).toEqual(spanOf(exactly(12)));
    expect(specification.ramp.series.resistor).toBe('E24');
    expect(specification.title).toBe('a=b');
    expect(specification.frequency_Hz).toEqual(spanOf(exactly(1e6)));
    expect(place('title')?.path).toBe('--set');
  });

  test('--index puts a Q of the document out of force, and --q an index', async () => {
    const index = await accepted({ text: everyKey, flags: { '--index': '0.9' } });
    expect(index.specification.goal.dampingIndex).toBe(0.9);
    const q = await accepted({ text: `${least}goal: { dampingIndex: 0.9 }`, flags: { '--q': '0.5' } });
    expect(q.specification.goal.dampingIndex).toBeCloseTo(0.5 + 2 / Math.PI, 12);
  });

  test('--l puts a ripple and what saturation leaves out of force', async () => {
    const ripple = `${least}inductance: { ripple: 20 % to 40 %, of: 3 A }`;
    const { specification } = await accepted({ text: ripple, flags: { '--l': '4.7 uH' } });
    expect(specification.inductance).toEqual({
      kind: 'value',
      value_H: spanOf(exactly(4.7e-6)),
      atPeakLimit_H: null,
    });
    const saturating = await accepted({ text: everyKey, flags: { '--l': '4.7 uH' } });
    expect(saturating.specification.inductance).toMatchObject({ atPeakLimit_H: null });
  });

  test('give a list as one text, in brackets or not', async () => {
    for (const list of ['3.3 V, 5 V', '[3.3 V, 5 V]', '[3.3V,5V]']) {
      const { specification } = await accepted({ text: least, flags: { '--vout': list } });
      expect(specification.output_V).toEqual([spanOf(exactly(3.3)), spanOf(exactly(5))]);
    }
  });

  test('that name one key twice are refused', async () => {
    const problems = await refused({ text: least, flags: { '--vin': '5 V' }, sets: ['input=6 V'] });
    expect(problems.map(({ code }) => code)).toEqual(['given-twice']);
  });

  test('--q and --index together are refused', async () => {
    const problems = await refused({ text: least, flags: { '--q': '1', '--index': '0.9' } });
    expect(problems).toMatchObject([
      { code: 'keys-exclude', place: { path: '--index', line: null, column: null } },
    ]);
  });

  test.each([
    ['nothing', 'set-form'],
    ['=5 V', 'set-form'],
    ['outpt=5 V', 'unknown-key'],
    ['ramp=vin', 'wrong-kind'],
    ['ramp.lwa=vin', 'unknown-key'],
    ['__proto__.polluted=1', 'prototype-key'],
    ['mains.voltage=230 V', 'not-yet-available'],
    ['output=', 'value-missing'],
  ])('--set %s is refused: %s', async (set, code) => {
    const problems = await refused({ text: least, sets: [set] });
    expect(problems).toMatchObject([{ code, place: { path: '--set', line: null, column: null } }]);
  });

  test('are those of the contract, each with the key it sets', () => {
    expect(specFlags.map(({ flag, key }) => `${flag} ${key}`).sort()).toEqual(
      [
        '--converter converter',
        '--vin input',
        '--vout output',
        '--l inductance',
        '--fs frequency',
        '--dmax maximumDuty',
        '--ri senseGain',
        '--load load',
        '--drop rectifier.drop',
        '--turns turnsRatio',
        '--lm magnetizingInductance',
        '--cout outputCapacitor.capacitance',
        '--esr outputCapacitor.seriesResistance',
        '--q goal.dampingQ',
        '--index goal.dampingIndex',
        '--law ramp.law',
        '--gain ramp.gain',
        '--build ramp.build',
        '--injection ramp.injection',
        '--supply ramp.supply',
      ].sort(),
    );
  });

  test('each reads the example of its own row', async () => {
    for (const { flag, key, example } of specFlags) {
      const goalOrNot = flag === '--esr' ? ['outputCapacitor.capacitance=10 uF'] : [];
      const sets =
        key === 'input'
          ? ['frequency=1 MHz']
          : key === 'frequency'
            ? ['input=8 V']
            : ['input=8 V', 'frequency=1 MHz'];
      const { place } = await accepted({ flags: { [flag]: example }, sets: [...sets, ...goalOrNot] });
      expect(place(key)?.path).toBe(flag);
    }
  });
});

describe('each form of a key', () => {
  test('output: value, range, list of both, or not known', async () => {
    const read = async (line: string) => (await accepted({ text: `${least}${line}` })).specification.output_V;
    expect(await read('output: 5 V')).toEqual([spanOf(exactly(5))]);
    expect(await read('output: 3.3 V to 5 V')).toEqual([spanOf(exactly(3.3), exactly(5))]);
    expect(await read('output: [3.3 V, 5 V to 6 V]')).toEqual([
      spanOf(exactly(3.3)),
      spanOf(exactly(5), exactly(6)),
    ]);
    expect(await read('')).toBeNull();
  });

  test('inductance: ripple of a current', async () => {
    const { specification } = await accepted({
      text: `${least}inductance: { ripple: 20 % to 40 %, of: 3 A ± 10 % }`,
    });
    expect(specification.inductance).toEqual({
      kind: 'ripple',
      rippleRatio: spanOf(exactly(0.2), exactly(0.4)),
      of_A: { nominal: 3, low: 2.7, high: 3.3 },
    });
  });

  test.each(['buck-boost', 'cuk'])('a negative output of a %s is its magnitude', async (converter) => {
    const { specification } = await accepted({ text: `${least}converter: ${converter}\noutput: -12 V` });
    expect(specification.output_V).toEqual([spanOf(exactly(12))]);
  });

  test.each(['buck', 'boost', 'sepic', 'flyback', 'forward'])(
    'a %s has no negative output',
    async (converter) => {
      const problems = await refused({ text: `${least}converter: ${converter}\noutput: -12 V` });
      expect(problems.map(({ code }) => code)).toEqual(['negative']);
    },
  );

  test('an output is not blamed for a converter that cannot be read', async () => {
    const problems = await refused({ text: `${least}converter: buckboost\noutput: -12 V` });
    expect(problems.map(({ key }) => key)).toEqual(['converter']);
  });

  test('the gain of the fixed law may be a voltage, that of no other', async () => {
    const fixed = await accepted({ text: `${least}ramp: { law: fixed, gain: 23.6 V }` });
    expect(fixed.specification.ramp.gain).toBe(23.6);
    const vin = await refused({ text: `${least}ramp: { law: vin, gain: 23.6 V }` });
    expect(vin.map(({ code }) => code)).toEqual(['wrong-dimension']);
  });

  test('yes and true, no and false are the same', async () => {
    for (const [word, truth] of [
      ['yes', true],
      ['true', true],
      ['no', false],
      ['False', false],
    ] as const) {
      const text = `${least}controller: { senseLimit: 250 mV ± 5 %, limitSeesRamp: ${word} }`;
      expect((await accepted({ text })).specification.controller?.limitSeesRamp).toBe(truth);
    }
  });

  test.each([0, '110 %', '1.01'])('a maximum duty of %s is refused', async (duty) => {
    const problems = await refused({ text: `${least}maximumDuty: ${duty}` });
    expect(problems).toMatchObject([{ key: 'maximumDuty', place: { line: 3, column: 14 } }]);
  });

  test('a maximum duty of 1 is not', async () => {
    expect((await accepted({ text: `${least}maximumDuty: 1` })).specification.maximumDutyRatio).toBe(1);
  });

  test('a damping index of ½ is the edge of instability, and no goal', async () => {
    const problems = await refused({ text: `${least}goal: { dampingIndex: 0.5 }` });
    expect(problems[0]?.fix).toContain('instability');
  });
});

describe('text', () => {
  const hostile = [
    '.control',
    '{{title}}',
    '<script>alert(1)</script>',
    '=1+1',
    '"quoted"',
    '温室バルブ',
    "it's",
    '.include /x',
  ];

  test.each(hostile)('a title %j stays as it is', async (title) => {
    const { specification } = await accepted({ text: `${least}title: ${JSON.stringify(title)}` });
    expect(specification.title).toBe(title);
    expect((await accepted({ text: least, sets: [`title=${title}`] })).specification.title).toBe(title);
  });

  test('newlines become spaces', async () => {
    const { specification } = await accepted({ text: `${least}title: "first\\r\\nsecond\\nthird"` });
    expect(specification.title).toBe('first second third');
    const block = await accepted({ text: `${least}title: |\n  first\n  second\n` });
    expect(block.specification.title).toBe('first second');
  });

  test('numbers, dates and nothing are text where text is meant', async () => {
    const { specification } = await accepted({
      text: `${least}title: 007\nsheet: { number: 1e3, revision: , owner: true }`,
    });
    expect(specification.title).toBe('007');
    expect(specification.sheet).toMatchObject({ number: '1e3', revision: '', owner: 'true' });
  });

  test.each(['\\x07', '\\t', '\\x1b', '\\x7f', '\\x9b', '\\u202e', '\\0'])(
    'a control character %s is refused',
    async (control) => {
      const problems = await refused({
        text: `${least}title: "a${control}b"\nsheet: { owner: "a${control}b" }`,
      });
      expect(problems.map(({ code, key }) => [code, key])).toEqual([
        ['control-character', 'title'],
        ['control-character', 'sheet.owner'],
      ]);
    },
  );

  test.each(['2026-02-29', '2026-13-01', '2026-1-1', '01.12.2026', 'today'])(
    '%s is no date',
    async (date) => {
      expect((await refused({ text: `${least}date: ${date}` })).map(({ code }) => code)).toEqual([
        'date-form',
      ]);
    },
  );

  test('29 February of a leap year is one', async () => {
    expect((await accepted({ text: `${least}date: 2028-02-29` })).specification.date).toBe('2028-02-29');
  });
});

describe('keys together', () => {
  test.each([
    ['goal: { dampingQ: 1, dampingIndex: 0.9 }', 'keys-exclude', 'goal.dampingIndex'],
    ['inductance: { value: 10 uH, ripple: 30 %, of: 3 A }', 'keys-exclude', 'inductance.ripple'],
    ['inductance: { ripple: 30 %, of: 3 A, atPeakLimit: 7 uH }', 'keys-exclude', 'inductance.ripple'],
    ['inductance: { ripple: 30 % }', 'key-missing', 'inductance.ripple'],
    ['inductance: { of: 3 A }', 'key-missing', 'inductance.of'],
    ['inductance: { atPeakLimit: 7 uH }', 'key-missing', 'inductance.atPeakLimit'],
    ['inductance: { value: 7 uH, atPeakLimit: 10 uH }', 'order', 'inductance.atPeakLimit'],
    ['outputCapacitor: { seriesResistance: 5 mOhm }', 'key-missing', 'outputCapacitor.seriesResistance'],
    ['controller: { oscillator: { valley: 1 V } }', 'key-missing', 'controller.oscillator.valley'],
    ['controller: { oscillator: { valley: 3 V, peak: 2 V } }', 'order', 'controller.oscillator.peak'],
  ])('%s: %s', async (line, code, key) => {
    expect(
      (await refused({ text: `${least}${line}` })).map((problem) => [problem.code, problem.key]),
    ).toEqual([[code, key]]);
  });

  test('a key that the converter has no use for is a warning, and has no effect', async () => {
    const { specification, warnings } = await accepted({ text: `${least}turnsRatio: 4\nstage: two-switch` });
    expect(warnings.map(({ code, severity, key }) => [code, severity, key])).toEqual([
      ['key-without-effect', 'warning', 'turnsRatio'],
      ['key-without-effect', 'warning', 'stage'],
    ]);
    expect(specification).toMatchObject({ turnsRatio: exactly(1), stage: null });
  });

  test('every choice of every key is read: what a later stage cannot do is for that stage to say', async () => {
    for (const { path, form } of specKeys) {
      if (form.kind !== 'choice') continue;
      for (const choice of form.choices) {
        const { place } = await accepted({ text: least, sets: [`${path}=${choice}`] });
        expect(place(path)).not.toBeNull();
      }
    }
  });
});

test('all problems are reported at once, as they stand in the document, flags last', async () => {
  const text = 'input: 8\nfrequencie: 500 kHz\nramp:\n  law: vinn\nload: 3,5 A\nprocess: x\n';
  const problems = await refused({ text, flags: { '--ri': '50 MOhm' }, sets: ['foo=1'] });
  expect(problems.map(({ code, place }) => [code, place?.path, place?.line, place?.column])).toEqual([
    ['key-missing', 'rail.yaml', 1, 1],
    ['unit-missing', 'rail.yaml', 1, 8],
    ['unknown-key', 'rail.yaml', 2, 1],
    ['unknown-choice', 'rail.yaml', 4, 8],
    ['decimal-comma', 'rail.yaml', 5, 7],
    ['not-yet-available', 'rail.yaml', 6, 1],
    ['unknown-key', '--set', null, null],
    ['unit-case', '--ri', null, null],
  ]);
});

test('what is missing is named with its key and its flag', async () => {
  const problems = await refused({});
  expect(problems.map(({ key, place }) => [key, place?.path])).toEqual([
    ['input', '--vin'],
    ['frequency', '--fs'],
  ]);
  expect((await refused({ text: 'input: 8 V' }))[0]?.fix).toContain('--fs');
});
