import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Check, CheckedDeck } from '../../generator/spice/check/Check.ts';
import type { Waveforms } from '../../generator/spice/Deck.ts';
import { extremeBetween } from '../../generator/spice/measure/extremeBetween.ts';
import { slopeBetween } from '../../generator/spice/measure/slopeBetween.ts';
import type { Keys } from '../support/request.ts';
import {
  type Bench,
  type DesignDecks,
  decksOf,
  type EngineName,
  mainJob,
  openBench,
} from './support/designDecks.ts';
import { describeWith, GNUCAP, NGSPICE } from './support/require.ts';

/**
 * gnucap takes about three seconds for each deck. So it gets the ramp by itself and the worst point of both
 * laws of every case, and every deck of the first case only; the two ngspice run all of them.
 */
const cases: Readonly<Record<string, Keys>> = {
  'every duty possible, 8 V to 36 V at 500 kHz': mainJob,
  '3 V to 5.5 V at 2 MHz': { input: '3 V to 5.5 V', inductance: '1 uH', frequency: '2 MHz' },
  '9 V to 60 V at 150 kHz with drop, losses and load': {
    input: '9 V to 60 V',
    output: '0.8 V to 30 V',
    inductance: '47 uH ± 20 %',
    frequency: '150 kHz ± 10 %',
    senseGain: '50 mOhm ± 5 %',
    load: '0.3 A to 3 A',
    'rectifier.drop': '0.4 V',
    'losses.switch': '40 mOhm',
    'losses.winding': '25 mOhm',
    'losses.rectifier': '20 mOhm',
  },
  'a fixed ramp, 6 V to 36 V to 5 V': {
    input: '6 V to 36 V',
    output: '5 V',
    inductance: '10 uH',
    frequency: '500 kHz',
    'ramp.law': 'fixed',
  },
};

const engineNames: readonly EngineName[] = ['embedded', 'ngspice', 'gnucap'];
const inEveryEngine = ['ramp-test.cir', 'converter-adaptive.cir', 'converter-fixed.cir'];

/** How far two engines may be apart, as a share of the check's own scale (α: the plain difference). */
const agreement = {
  'capacitor slope': 0.01,
  'comparator slope': 0.01,
  amplitude: 0.01,
  residual: 0.01,
  'cycle ratio': 0.02,
} as Readonly<Record<string, number>>;

describeWith([NGSPICE, GNUCAP], 'emitted decks in three engines', () => {
  let bench: Bench;
  beforeAll(async () => {
    bench = await openBench();
  });
  afterAll(() => bench?.end());

  describe.each(Object.entries(cases))('%s', (title, keys) => {
    let decks: DesignDecks;
    beforeAll(async () => {
      decks = await decksOf({ title, ...keys });
    });

    it('every deck runs unchanged without complaints, and the figures agree', {
      timeout: 240_000,
    }, async () => {
      for (const { deck, checks } of decks.checked) {
        const everywhere = keys === mainJob || inEveryEngine.includes(deck.file);
        const waveforms = await runIn(everywhere ? engineNames : ['embedded', 'ngspice'], deck);
        for (const check of checks) expectAgreement(check, waveforms, deck.file);
        if (deck.file.startsWith('converter')) expectSameCurrents(decks, deck.file, waveforms);
      }
    });
  });

  async function runIn(names: readonly EngineName[], deck: CheckedDeck['deck']) {
    const runs: [EngineName, Waveforms][] = [];
    for (const name of names) {
      const { waveforms, complaints } = await bench.engines[name](deck);
      expect(complaints, `${deck.file} in ${name}`).toEqual([]);
      expect(waveforms, `${deck.file} in ${name}`).not.toBeNull();
      runs.push([name, waveforms!]);
    }
    return runs;
  }
});

function expectAgreement(check: Check, runs: readonly [EngineName, Waveforms][], file: string) {
  const measured = runs.map(([name, waveforms]) => ({ name, value: check.measure(waveforms) }));
  for (const { name, value } of measured) {
    const error = Math.abs(value - check.predicted) / check.errorScale;
    expect(error, `${check.quantity} of ${file} in ${name} against the sizing`).toBeLessThanOrEqual(
      check.limit,
    );
  }
  const values = measured.map(({ value }) => value / check.errorScale);
  const apart = Math.max(...values) - Math.min(...values);
  expect(apart, `${check.quantity} of ${file} between engines`).toBeLessThanOrEqual(
    agreement[check.quantity]!,
  );
}

/** Ripple and up-slope in the last cycles, long after the perturbation. */
function expectSameCurrents({ set }: DesignDecks, file: string, runs: readonly [EngineName, Waveforms][]) {
  const { stop_s, period_s, point } = set.converters.get(file)!;
  const onTime_s = point.duty * period_s;
  const start = stop_s - 2 * period_s;
  const figures = runs.map(([, { time_s, vectors }]) => {
    const current = vectors['i(l1)']!;
    const { low, high } = extremeBetween(time_s, current, start, stop_s - period_s);
    return {
      ripple: high - low,
      upSlope: slopeBetween(time_s, current, start + 0.2 * onTime_s, start + 0.8 * onTime_s),
    };
  });
  expect(spreadOf(figures.map(({ ripple }) => ripple)), `ripple of ${file}`).toBeLessThanOrEqual(0.01);
  expect(spreadOf(figures.map(({ upSlope }) => upSlope)), `slope of ${file}`).toBeLessThanOrEqual(0.01);
}

function spreadOf(values: readonly number[]): number {
  return Math.max(...values) / Math.min(...values) - 1;
}
