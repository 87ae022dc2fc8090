import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { checkPoints } from './deck/checkPoints.ts';
import { type ConverterDeck, converterDeck } from './deck/converterDeck.ts';
import { rampNetlist } from './deck/rampNetlist.ts';
import { type RampTestDeck, rampTestDeck } from './deck/rampTestDeck.ts';
import { trackSource } from './deck/trackSource.ts';

/** Every netlist of a design, by file name, with what each should show. */
export interface DeckSet {
  readonly ramp: string;
  readonly rampTest: RampTestDeck;
  readonly converters: ReadonlyMap<string, ConverterDeck>;
}

/** A block fed from a reference carries a little more than its own voltage before it runs out of headroom. */
const referenceReach = 1.1;

export function deckSet(design: SizedDesign): DeckSet {
  return {
    ramp: rampNetlist(design),
    rampTest: rampTestDeck(design),
    converters: new Map([...converters(design, 'adaptive'), ...converters(design, 'fixed')]),
  };
}

function converters(design: SizedDesign, kind: 'adaptive' | 'fixed'): [string, ConverterDeck][] {
  const isFixed = design.chosen.law.kind === 'fixed';
  const sized = isFixed === (kind === 'fixed') ? design.chosen : design.alternative;
  const { track_V } = trackSource(design, kind, sized.realisedGain);
  const most_V = design.demand.track_V.high * (design.demand.tracks === 'reference' ? referenceReach : 1);
  const fits = (inputVoltage_V: number) => track_V(inputVoltage_V) <= most_V;
  return checkPoints(design, sized, fits).map((point, index) => [
    index === 0 ? `converter-${kind}.cir` : `converter-${kind}-${index + 1}.cir`,
    converterDeck(design, kind, sized, point),
  ]);
}
