import { describe, expect, it } from 'vitest';
import { specificationText } from '../../../generator/report/specificationText.ts';
import { specKeys } from '../../../generator/spec/keys/specKeys.ts';
import { readSpecification } from '../../../generator/spec/readSpecification.ts';
import { hostileTitles } from '../emit/text/hostileTitles.ts';
import { oneOutput, unknownOutput } from './sampleDesign.ts';

const everything = `title: auxiliary rail
converter: buck
input: 8 V ± 0.5 V to 36 V
output: [3.3 V ± 2 %, 5 V to 12 V]
inductance: { value: 10 uH +10 % -20 %, atPeakLimit: 7 uH }
frequency: 480 kHz to 520 kHz ± 3 %
maximumDuty: 85 %
load: 0.3 A to 3 A
rectifier: { drop: 0.4 V ± 50 mV }
losses: { switch: 40 mOhm, winding: 25 mOhm ± 10 %, rectifier: 20 mOhm }
minimumOnTime: 60 ns
senseGain: 50 mOhm ± 5 %
outputCapacitor: { capacitance: 100 uF ± 20 %, seriesResistance: 5 mOhm }
controller:
  internalRamp: 45 mV/us ± 20 %
  senseLimit: 250 mV ± 5 %
  limitSeesRamp: yes
  blankingTime: 40 ns
  comparatorDelay: 30 ns
  oscillator: { valley: 1.2 V, peak: 2.8 V ± 5 % }
  pinCurrent: 40 uA ± 20 %
goal: { dampingQ: 0.9, ceiling: 1.4, signalFloor: 15 mV }
ramp:
  law: vin
  gain: 0.75
  build: board-opamp
  injection: sense
  series: { resistor: E24, capacitor: E6 }
  supply: 5 V ± 4 %
  capacitance: 470 pF
  follows: nothing
  reset: clock
sheet: { owner: Works, number: CS-7, revision: B, author: N. N., approver: M. M., issued: 2026-11-30 }
date: 2026-12-01
`;

async function read(text: string) {
  const outcome = await readSpecification({ document: { name: '-', text }, flags: [], sets: [] });
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems, null, 1));
  return outcome.value;
}

describe('the specification as the page gives it back', () => {
  it.each([unknownOutput, oneOutput, everything])('reads to the very same figures: %s', async (text) => {
    const request = await read(text);
    const again = await read(specificationText(request));
    expect(again.specification).toEqual(request.specification);
  });

  it.each(hostileTitles)('carries any title: %j', async (title) => {
    const outcome = await readSpecification({
      document: { name: '-', text: `${unknownOutput}title: ${JSON.stringify(title)}\n` },
      flags: [],
      sets: [],
    });
    // What no specification may hold (a control character, a lone half of a pair) was refused before.
    if (!outcome.ok) return expect(outcome.problems[0]!.key).toBe('title');
    const again = await read(specificationText(outcome.value));
    expect(again.specification).toEqual(outcome.value.specification);
  });

  it('leaves out what was assumed', async () => {
    expect(JSON.parse(specificationText(await read(unknownOutput)))).toEqual({
      input: '8 V to 36 V',
      inductance: { value: '10 µH' },
      frequency: '500 kHz',
    });
  });

  it('knows every key that a buck can be given', async () => {
    const written = specificationText(await read(everything));
    const paths = (value: object, at = ''): string[] =>
      Object.entries(value).flatMap(([name, inner]) =>
        typeof inner === 'object' && !Array.isArray(inner) ? paths(inner, `${at}${name}.`) : `${at}${name}`,
      );
    const missing = specKeys
      .filter(({ converters }) => converters === undefined || converters.includes('buck'))
      .map(({ path }) => path)
      .filter((path) => !paths(JSON.parse(written)).includes(path));
    // A ripple cannot stand beside a value; a Q is written as the index that it means.
    expect(missing).toEqual(['inductance.ripple', 'inductance.of', 'goal.dampingQ']);
  });
});
