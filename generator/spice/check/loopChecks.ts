import type { ConverterDeck } from '../../emit/deck/converterDeck.ts';
import { cyclePlan } from '../../emit/deck/perturbation.ts';
import type { DeckSet } from '../../emit/deckSet.ts';
import type { Waveforms } from '../Deck.ts';
import { affineCycleMap } from '../measure/affineCycleMap.ts';
import { extremeBetween } from '../measure/extremeBetween.ts';
import { valueAt } from '../measure/valueAt.ts';
import type { Check, CheckedDeck } from './Check.ts';

/** α may be off by this: a hundredth of the time step's granularity and more than what the switches cost. */
const ratioLimit = 0.02;

/** Of the shift: one shifted cycle among those that count spreads them by more than a quarter of it. */
const leastSpread = 0.1;

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

function ratioCheck(converter: ConverterDeck): Check {
  const { point } = converter;
  return {
    quantity: 'cycle ratio',
    at: { inputVoltage_V: point.inputVoltage_V, outputVoltage_V: point.outputVoltage_V },
    predicted: converter.cycleRatio,
    unit: '',
    limit: ratioLimit,
    errorScale: 1,
    measure: (waveforms) => measuredRatio(converter, waveforms),
  };
}

/**
 * The line through successive clock edges' currents, of the cycles whose on-time the comparator ends.
 *
 * The map is affine in these alone. An unstable loop grows until the clock ends its on-times: its α is read
 * from the cycles between.
 */
function measuredRatio(
  { period_s, shift_A, comparatorEnds }: ConverterDeck,
  { time_s, vectors }: Waveforms,
): number {
  const current = vectors['i(l1)']!;
  const edges = Array.from(
    { length: cyclePlan.total - cyclePlan.settled },
    (_, index) => cyclePlan.settled + index,
  );
  const endedOtherwise = edges.filter((edge) => {
    const start = edge * period_s;
    const end = Math.min(start + period_s, time_s.at(-1)!);
    const onTime_s = extremeBetween(time_s, current, start, end).highAt_s - start;
    return onTime_s < comparatorEnds.from_s || onTime_s > comparatorEnds.to_s;
  });
  const shifted = cyclePlan.shiftedEdges.map((edge) => edge - 1);
  const { slope, spread } = affineCycleMap(
    edges.map((edge) => valueAt(time_s, current, edge * period_s)),
    [...shifted, ...endedOtherwise].map((edge) => edge - cyclePlan.settled),
  );
  if (spread < leastSpread * shift_A) throw new RangeError('no cycle shows the shifted current');
  return slope;
}
