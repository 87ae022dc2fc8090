import { afterAll, beforeAll, expect, it } from 'vitest';
import { rampFigures, senseAttenuation } from '../../generator/circuit/rampFigures.ts';
import type { Deck } from '../../generator/spice/Deck.ts';
import { slopeBetween } from '../../generator/spice/measure/slopeBetween.ts';
import { valueAt } from '../../generator/spice/measure/valueAt.ts';
import {
  type Bench,
  type DesignDecks,
  decksOf,
  type EngineName,
  mainJob,
  openBench,
} from './support/designDecks.ts';
import { describeWith, GNUCAP, NGSPICE } from './support/require.ts';

const period = 2e-6;
const periods = 14;
const input = 24;

/** A user's own deck: other names, a supply behind a resistor, a triangle for the sensed current, no include. */
function userDeck(block: string): Deck {
  const vectors = ['v(probe)', 'v(cs)', 'i(vdd)'];
  const text = [
    'my own converter',
    block,
    'Vbus bus 0 24',
    'Vdd dd 0 5',
    'Rdd dd rail 1',
    'Vosc osc 0 PULSE(5 0 0 10n 10n 1.78u 2u)',
    'Vtri tri 0 PULSE(0.1 0.3 0 0.9u 1.08u 10n 2u)',
    'Xramp bus rail osc tri cs probe ramp_generator',
    'Rprobe probe 0 1e9',
    `.print tran v(probe) v(cs) i(Vdd)`,
    `.tran 5n ${periods * 2}u 0 5n uic`,
    '.end',
    '',
  ].join('\n');
  return { file: 'user.cir', text, includes: {}, vectors, stopTime_s: periods * period };
}

describeWith([NGSPICE, GNUCAP], "the block pasted into a user's own deck", () => {
  let bench: Bench;
  let decks: DesignDecks;
  beforeAll(async () => {
    [bench, decks] = await Promise.all([openBench(), decksOf(mainJob)]);
  });
  afterAll(() => bench?.end());

  const engines: readonly EngineName[] = ['embedded', 'ngspice', 'gnucap'];
  it.each(engines)('ramps, sums and draws what the sizing says, in %s', async (name) => {
    const { waveforms, complaints } = await bench.engines[name](userDeck(decks.set.ramp));
    expect(complaints).toEqual([]);
    const { time_s, vectors } = waveforms!;
    const figures = rampFigures(decks.design, input);
    const start = (periods - 2) * period;
    const [from, to] = [start + 0.2e-6, start + 0.8e-6];
    const slope = slopeBetween(time_s, vectors['v(probe)']!, from, to);
    expect(Math.abs(slope / figures.capacitorSlope_V_per_s - 1)).toBeLessThan(0.01);

    // The sensed triangle rises 0.2 V in 0.9 µs; the network lets its share through and adds the ramp's.
    const summed = figures.comparatorSlope_V_per_s + senseAttenuation(decks.design) * (0.2 / 0.9e-6);
    expect(Math.abs(slopeBetween(time_s, vectors['v(cs)']!, from, to) / summed - 1)).toBeLessThan(0.01);

    // Both sides of the mirror, and nothing else, load the supply while the ramp rises.
    const drawn = -valueAt(time_s, vectors['i(vdd)']!, start + 0.6e-6);
    expect(Math.abs(drawn / (2 * figures.chargingCurrent_A) - 1)).toBeLessThan(0.02);
  });

  it('the charging current is the same in all three', async () => {
    const currents: number[] = [];
    for (const name of engines) {
      const { waveforms } = await bench.engines[name](userDeck(decks.set.ramp));
      const { time_s, vectors } = waveforms!;
      currents.push(-valueAt(time_s, vectors['i(vdd)']!, (periods - 1.7) * period));
    }
    expect(Math.max(...currents) / Math.min(...currents) - 1).toBeLessThan(0.01);
  });
});
