import type { SizedDesign } from '../../../generator/circuit/SizedDesign.ts';
import { type DeckSet, deckSet } from '../../../generator/emit/deckSet.ts';
import type { Check, CheckedDeck } from '../../../generator/spice/check/Check.ts';
import { loopChecks } from '../../../generator/spice/check/loopChecks.ts';
import { rampChecks } from '../../../generator/spice/check/rampChecks.ts';
import type { Waveforms } from '../../../generator/spice/Deck.ts';
import { openEmbeddedEngine } from '../../../generator/spice/engine/embedded.ts';
import { openInstalledEngine } from '../../../generator/spice/engine/installed.ts';
import { designOf, type Keys } from '../../support/request.ts';
import { type GnucapRun, runGnucap } from './gnucap.ts';

/** A design with its decks as they are written, and what is read from each. */
export interface DesignDecks {
  readonly design: SizedDesign;
  readonly set: DeckSet;
  readonly checked: readonly CheckedDeck[];
}

export async function decksOf(keys: Keys): Promise<DesignDecks> {
  const design = await designOf(keys);
  const set = deckSet(design);
  return { design, set, checked: [rampChecks(design, set), ...loopChecks(set)] };
}

/** The specification of the main job. */
export const mainJob: Keys = { input: '8 V to 36 V', inductance: '10 uH', frequency: '500 kHz' };

/** What one engine made of a deck: waveforms, and everything that it complained of. */
export interface Taken {
  readonly waveforms: Waveforms | null;
  readonly complaints: readonly string[];
}

/** Runs a deck's text as it stands, one engine after the other. */
export interface Bench {
  readonly engines: Readonly<Record<EngineName, (deck: CheckedDeck['deck']) => Promise<Taken>>>;
  end(): Promise<void>;
}

export type EngineName = 'embedded' | 'ngspice' | 'gnucap';

const timeout_s = 60;

export async function openBench(): Promise<Bench> {
  const [embedded, installed] = await Promise.all([
    openEmbeddedEngine(),
    openInstalledEngine({ env: process.env }),
  ]);
  if (!embedded.ok) throw new Error(embedded.reason);
  if (!installed.ok) throw new Error(installed.reason);
  const taken = (run: Awaited<ReturnType<typeof embedded.engine.run>>): Taken =>
    run.ok ? { waveforms: run.waveforms, complaints: [] } : { waveforms: null, complaints: [run.reason] };
  return {
    engines: {
      embedded: async (deck) => taken(await embedded.engine.run(deck, { timeout_s })),
      ngspice: async (deck) => taken(await installed.engine.run(deck, { timeout_s })),
      gnucap: (deck): Promise<GnucapRun> => runGnucap(deck, { timeout_s }),
    },
    end: () => embedded.engine.end(),
  };
}

export function checkOf(checked: readonly CheckedDeck[], quantity: string): Check {
  const check = checked.flatMap(({ checks }) => checks).find((one) => one.quantity === quantity);
  if (check === undefined) throw new Error(`no check of the ${quantity}`);
  return check;
}
