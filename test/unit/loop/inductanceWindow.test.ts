import { describe, expect, it } from 'vitest';
import type { Problem } from '../../../generator/base/Problem.ts';
import { windowDocument } from '../../../generator/emit/windowDocument.ts';
import { windowSchema } from '../../../generator/emit/windowSchema.ts';
import { window } from '../../../generator/window.ts';
import { type Keys, requestOf } from '../../support/request.ts';

const chip: Keys = {
  input: '6 V to 36 V',
  output: '5 V',
  frequency: '500 kHz',
  senseGain: '50 mOhm ± 5 %',
  'controller.internalRamp': '45 mV/us ± 20 %',
};

async function rowsOf(keys: Keys) {
  const outcome = window(await requestOf(keys));
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return windowSchema.parse(windowDocument(outcome.value)).rows;
}

async function problemsOf(keys: Keys): Promise<readonly Problem[]> {
  const outcome = window(await requestOf(keys));
  return outcome.ok ? [] : outcome.problems;
}

const goal = 0.5 + 1 / Math.PI;
const ceiling = 1.5;

describe("the window of a chip's own ramp", () => {
  it('has its ends where goal and ceiling are met by the worst units, on paper', async () => {
    const [row] = await rowsOf(chip);
    // x = (Vin − Vout + L·Se/Ri)/Vin; the goal binds at the lowest input, the ceiling there too.
    const least = ((goal * 6 - 1) * 0.05 * 1.05) / (45e3 * 0.8);
    const largest = ((ceiling * 6 - 1) * 0.05 * 0.95) / (45e3 * 1.2);
    expect(row!.inductance_H![0]).toBeCloseTo(least, 12);
    expect(row!.inductance_H![1]).toBeCloseTo(largest, 12);
    expect(row!.bound.least).toMatchObject({ limit: 'goal', inputVoltage_V: 6, outputVoltage_V: 5 });
    expect(row!.bound.largest).toMatchObject({ limit: 'ceiling', inputVoltage_V: 6 });
    expect(row!.bound.least!.dutyRatio).toBeCloseTo(5 / 6, 12);
  });

  it('is where x stays between goal and ceiling for every unit and input, by brute force', async () => {
    const keys = {
      ...chip,
      output: '2 V to 9 V',
      'rectifier.drop': '0.4 V ± 0.1 V',
      'goal.ceiling': 2,
      'controller.internalRamp': '200 mV/us ± 10 %',
    };
    for (const row of await rowsOf(keys)) {
      const [least, largest] = row.inductance_H!;
      const fits = (inductance: number) => {
        for (let input = 6; input <= 36; input += 0.05)
          for (const drop of [0.3, 0.4, 0.5])
            for (const [slope, gain] of [
              [180e3, 0.05 * 1.05],
              [220e3, 0.05 * 0.95],
            ] as const) {
              const duty = (row.outputVoltage_V! + drop) / (input + drop);
              if (duty > 0.9) continue;
              const index = 1 - duty + (inductance * slope) / gain / (input + drop);
              if (index < goal || index > 2) return false;
            }
        return true;
      };
      expect([fits(least * 1.001), fits(least * 0.98)]).toEqual([true, false]);
      expect([fits(largest! * 0.999), fits(largest! * 1.02)]).toEqual([true, false]);
    }
  });

  it('has a row for each output of a list, the ends and middle of a range, and both ends of frequency', async () => {
    const rows = await rowsOf({ ...chip, output: ['3.3 V', '5 V to 9 V'], frequency: '500 kHz ± 10 %' });
    expect(rows.map(({ outputVoltage_V, frequency_Hz }) => [outputVoltage_V, frequency_Hz])).toEqual(
      [3.3, 5, 7, 9].flatMap((output) => [
        [output, 450e3],
        [output, 550e3],
      ]),
    );
  });

  it('does not depend on the frequency, unless the ramp follows it or the on-time is cut', async () => {
    const keys = { ...chip, frequency: '250 kHz to 750 kHz' };
    const [slow, fast] = await rowsOf(keys);
    expect(fast!.inductance_H).toEqual(slow!.inductance_H);
    const [slower, faster] = await rowsOf({ ...keys, 'ramp.follows': 'frequency' });
    expect(slower!.inductance_H![0] / faster!.inductance_H![0]).toBeCloseTo(3, 12);
    expect(slower!.inductance_H![0]).toBeCloseTo(2 * slow!.inductance_H![0], 12);
    const cut = await rowsOf({ ...keys, output: '1.5 V', minimumOnTime: '80 ns' });
    expect(cut[0]!.bound.least).not.toBeNull();
  });

  it('without an output holds for every one: the highest duty asks, every duty may not be too much', async () => {
    const { output: _, ...unknown } = chip;
    const [row] = await rowsOf({ ...unknown, 'goal.ceiling': 20 });
    expect(row!.outputVoltage_V).toBeNull();
    expect(row!.inductance_H![0]).toBeCloseTo(((goal - 0.1) * 36 * 0.0525) / 36e3, 12);
    // Least swing and no duty: x = 1 + L·Se/(Ri·Vin).
    expect(row!.inductance_H![1]).toBeCloseTo(((20 - 1) * 6 * 0.0475) / 54e3, 12);
  });

  it('is null where the spread leaves nothing, and tells what asks and what forbids', async () => {
    const [row] = await rowsOf({ ...chip, 'controller.internalRamp': '45 mV/us ± 60 %' });
    expect(row!.inductance_H).toBeNull();
    expect(row!.bound.least!.inductance_H!).toBeGreaterThan(row!.bound.largest!.inductance_H!);
  });

  it('begins at nothing where no ramp is needed', async () => {
    const [row] = await rowsOf({ ...chip, input: '24 V to 36 V', output: '3.3 V' });
    expect(row!.inductance_H![0]).toBe(0);
    expect(row!.bound.least).toBeNull();
  });

  it("counts a transformer's magnetizing current", async () => {
    const forward = {
      converter: 'forward',
      input: '36 V to 60 V',
      output: '5 V',
      turnsRatio: 4,
      frequency: '250 kHz',
      senseGain: '50 mOhm',
      'controller.internalRamp': '40 mV/us',
    };
    const [bare] = await rowsOf(forward);
    const [free] = await rowsOf({ ...forward, magnetizingInductance: '1 mH' });
    // (Vin/n·goal − up)/(Se/Ri + n·Vin/Lm) at 40 V, duty ½.
    expect(bare!.inductance_H![0]).toBeCloseTo((goal * 10 - 5) / 800e3, 12);
    expect(free!.inductance_H![0]).toBeCloseTo((goal * 10 - 5) / (800e3 + 4 * 40 * 1e3), 12);
  });
});

describe('the window of a law with its gain', () => {
  const designed: Keys = {
    input: '6 V to 36 V',
    output: '5 V',
    frequency: '500 kHz',
    senseGain: '50 mOhm',
    inductance: '10 uH',
  };

  it('gives the inductance back that the gain was the least for', async () => {
    const least = goal - 1 / 6;
    const [row] = await rowsOf({
      ...designed,
      'ramp.law': 'vin',
      'ramp.gain': least,
      'goal.ceiling': 2,
    });
    expect(row!.inductance_H![0]).toBeCloseTo(10e-6, 12);
    // x = D′ + k·L/10 µH at 36 V.
    expect(row!.inductance_H![1]).toBeCloseTo(((2 - 31 / 36) / least) * 10e-6, 12);
    expect(row!.bound.largest).toMatchObject({ inputVoltage_V: 36 });
  });

  it('adds to the internal ramp', async () => {
    const keys = { ...designed, 'ramp.law': 'fixed', 'ramp.gain': 2 };
    const [alone] = await rowsOf(keys);
    const [both] = await rowsOf({ ...keys, 'controller.internalRamp': '10 mV/us' });
    // 2 V over 10 µH is 0.2 A/µs, and 10 mV/µs over 50 mΩ as much again.
    expect(both!.inductance_H![0] / alone!.inductance_H![0]).toBeCloseTo(0.5, 12);
  });

  it('has no largest where the law never acts', async () => {
    const keys = { ...designed, input: '24 V to 36 V', output: '3.3 V', 'ramp.law': 'constant-q' };
    const [row] = await rowsOf({ ...keys, 'ramp.gain': 0.82 });
    expect(row!.inductance_H).toEqual([0, null]);
  });

  it('has none where the law stops acting short of the goal', async () => {
    const [row] = await rowsOf({ ...designed, 'ramp.law': 'constant-q', 'ramp.gain': 0.7 });
    expect(row!.inductance_H).toBeNull();
    expect(row!.bound.least!.inductance_H).toBeNull();
  });
});

describe('without a ramp', () => {
  it('names both ways to give one', async () => {
    const [problem] = await problemsOf({ input: '6 V to 36 V', frequency: '500 kHz' });
    expect(problem).toMatchObject({ code: 'ramp-missing', received: 'neither' });
    expect(problem!.expected).toContain('controller.internalRamp');
    expect(problem!.expected).toContain('ramp.gain');
  });

  it('asks for the inductance that a gain refers to', async () => {
    const [problem] = await problemsOf({ input: '6 V to 36 V', frequency: '500 kHz', 'ramp.gain': 0.7 });
    expect(problem).toMatchObject({ code: 'ramp-missing', key: 'inductance' });
  });
});
