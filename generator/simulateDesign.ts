import type { SizedDesign } from './circuit/SizedDesign.ts';
import { deckSet } from './emit/deckSet.ts';
import { loopChecks } from './spice/check/loopChecks.ts';
import { rampChecks } from './spice/check/rampChecks.ts';
import { type SimulationOptions, type SimulationRun, simulateDecks } from './spice/check/simulateDecks.ts';
import type { SpiceEngine } from './spice/Deck.ts';

/**
 * Runs every deck of a design and holds it against the sizing.
 * @param texts deck texts to run instead of the design's own, by file name: an edited set
 */
export function simulateDesign(
  sized: SizedDesign,
  engine: SpiceEngine,
  options: SimulationOptions & { readonly texts?: ReadonlyMap<string, string> },
): Promise<SimulationRun> {
  const own = deckSet(sized);
  const textOf = (file: string, text: string) => options.texts?.get(file) ?? text;
  const includes = { 'ramp.cir': textOf('ramp.cir', own.ramp) };
  const checked = [rampChecks(sized, own), ...loopChecks(own)].map(({ deck, checks }) => ({
    deck: { ...deck, text: textOf(deck.file, deck.text), includes },
    checks,
  }));
  return simulateDecks(checked, engine, options);
}
