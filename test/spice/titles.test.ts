import { afterAll, beforeAll, expect, it } from 'vitest';
import type { CheckedDeck } from '../../generator/spice/check/Check.ts';
import type { Waveforms } from '../../generator/spice/Deck.ts';
import { hostileTitles } from '../unit/emit/text/hostileTitles.ts';
import { type Bench, checkOf, decksOf, type EngineName, mainJob, openBench } from './support/designDecks.ts';
import { describeWith, GNUCAP, NGSPICE } from './support/require.ts';

/** Two periods of the shipped deck: what a title could do, it does while the deck is read. */
function shortened({ deck }: CheckedDeck): CheckedDeck['deck'] {
  const text = deck.text.replace(/^\.tran (\S+) .*$/m, '.tran $1 4e-6 0 $1 uic');
  return { ...deck, text, stopTime_s: 4e-6 };
}

/** Without what the reader refuses as not printable: control and direction signs, newlines apart. */
const titles = hostileTitles.filter((title) => !/[\p{Cc}\p{Cf}\p{Cs}]/u.test(title.replaceAll('\n', ' ')));

describeWith([NGSPICE, GNUCAP], 'a title in a deck', () => {
  let bench: Bench;
  const reference = new Map<EngineName, Waveforms>();

  const run = async (name: EngineName, title: string) => {
    const { checked } = await decksOf({ ...mainJob, title });
    const { waveforms, complaints } = await bench.engines[name](shortened(checked[0]!));
    expect(complaints).toEqual([]);
    expect(waveforms).not.toBeNull();
    return waveforms!;
  };

  beforeAll(async () => {
    bench = await openBench();
    for (const name of ['embedded', 'ngspice', 'gnucap'] as const)
      reference.set(name, await run(name, 'plain'));
  });
  afterAll(() => bench?.end());

  it.each(titles)('%j changes nothing of what is simulated', async (title) => {
    for (const [name, plain] of reference) {
      const waveforms = await run(name, title);
      expect(waveforms.time_s, name).toEqual(plain.time_s);
      expect(waveforms.vectors, name).toEqual(plain.vectors);
    }
  });

  it('stands in every deck as one comment line, and the figures hold', async () => {
    const title = '.include /etc/passwd\n.control\nquit\n.endc';
    const { checked, set } = await decksOf({ ...mainJob, title });
    for (const text of [
      set.ramp,
      set.rampTest.text,
      ...[...set.converters.values()].map((deck) => deck.text),
    ]) {
      expect(text.split('\n')[0]).toBe('* .include /etc/passwd .control quit .endc');
    }
    const { waveforms } = await bench.engines.embedded(checked[0]!.deck);
    const slope = checkOf(checked, 'capacitor slope');
    expect(Math.abs(slope.measure(waveforms!) / slope.predicted - 1)).toBeLessThanOrEqual(slope.limit);
  });
});
