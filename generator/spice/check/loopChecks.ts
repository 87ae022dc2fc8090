import type { ConverterDeck } from '../../emit/deck/converterDeck.ts';
import { cyclePlan } from '../../emit/deck/perturbation.ts';
import type { DeckSet } from '../../emit/deckSet.ts';
import { affineCycleMap } from '../measure/affineCycleMap.ts';
import { valueAt } from '../measure/valueAt.ts';
import type { CheckedDeck } from './Check.ts';

/** α may be off by this: a hundredth of the time step's granularity and more than what the switches cost. */
const ratioLimit = 0.02;

/** α of the inner loop from how the inductor current goes from one clock edge to the next. */
export function loopChecks(decks: DeckSet): CheckedDeck[] {
  return [...decks.converters].map(([file, converter]) => ({
    deck: {
      file,
      text: converter.text,
      includes: { 'ramp.cir': decks.ramp },
      vectors: ['i(l1)', 'v(ramp)', 'v(sense)'],
      stopTime_s: converter.stop_s,
    },
    checks: [ratioCheck(converter)],
  }));
}

function ratioCheck({ point, period_s, cycleRatio }: ConverterDeck) {
  const edges = Array.from(
    { length: cyclePlan.total - cyclePlan.settled },
    (_, index) => cyclePlan.settled + index,
  );
  const shifted = cyclePlan.shiftedEdges.map((edge) => edge - 1 - cyclePlan.settled);
  return {
    quantity: 'cycle ratio',
    at: { inputVoltage_V: point.inputVoltage_V, outputVoltage_V: point.outputVoltage_V },
    predicted: cycleRatio,
    unit: '',
    limit: ratioLimit,
    errorScale: 1,
    measure: ({ time_s, vectors }: Parameters<CheckedDeck['checks'][number]['measure']>[0]) =>
      affineCycleMap(
        edges.map((edge) => valueAt(time_s, vectors['i(l1)']!, edge * period_s)),
        shifted,
      ).slope,
  };
}
