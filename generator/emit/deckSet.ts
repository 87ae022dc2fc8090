import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { type ConverterDeck, converterDeck } from './deck/converterDeck.ts';
import { converterPlan } from './deck/converterPlan.ts';
import { rampNetlist } from './deck/rampNetlist.ts';
import { type RampTestDeck, rampTestDeck } from './deck/rampTestDeck.ts';

/** Every netlist of a design, by file name, with what each should show. */
export interface DeckSet {
  readonly ramp: string;
  readonly rampTest: RampTestDeck;
  readonly converters: ReadonlyMap<string, ConverterDeck>;
}

export function deckSet(design: SizedDesign): DeckSet {
  return {
    ramp: rampNetlist(design),
    rampTest: rampTestDeck(design),
    converters: new Map(
      converterPlan(design).map(({ file, kind, sized, point }) => [
        file,
        converterDeck(design, kind, sized, point),
      ]),
    ),
  };
}
