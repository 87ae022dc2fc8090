import { rampFigures } from '../../circuit/rampFigures.ts';
import type { SizedDesign } from '../../circuit/SizedDesign.ts';
import { type ClockTiming, clockTiming } from '../../emit/deck/deckTiming.ts';
import { stepsPerPeriod } from '../../emit/deck/rampTestDeck.ts';
import type { DeckSet } from '../../emit/deckSet.ts';
import type { Waveforms } from '../Deck.ts';
import { slopeBetween } from '../measure/slopeBetween.ts';
import { valueAt } from '../measure/valueAt.ts';
import type { Check, CheckedDeck } from './Check.ts';

/** Slope and amplitude may be off by this; the closed form leaves out the Early effect and finite gains. */
const slopeLimit = 0.02;
/** Residual against the amplitude. */
const residualLimit = 0.01;
/** Stretch of the rise over which the slope is taken: clear of clock edges and the buffer's lag. */
const stretch = { from: 0.2, to: 0.95 };

/** Share of the rise over which its end is taken for straight. */
const straightEnd = 0.02;

/** Slope, amplitude and residual of the ramp at lowest, middle and highest input. */
export function rampChecks(design: SizedDesign, decks: DeckSet): CheckedDeck {
  const { rampTest } = decks;
  return {
    deck: {
      file: 'ramp-test.cir',
      text: rampTest.text,
      includes: { 'ramp.cir': decks.ramp },
      vectors: ['v(ramp)', 'v(sense)'],
      stopTime_s: rampTest.stop_s,
    },
    checks: rampTest.levels.flatMap((level) => levelChecks(design, level)),
  };
}

function levelChecks(
  design: SizedDesign,
  { inputVoltage_V, measureFrom_s }: DeckSet['rampTest']['levels'][number],
): Check[] {
  const { demand } = design;
  const track_V = demand.tracks === 'input' ? inputVoltage_V : demand.track_V.high;
  const figures = rampFigures(design, track_V);
  const timing = clockTiming(design);
  const from = measureFrom_s + stretch.from * timing.rise_s;
  const to = measureFrom_s + stretch.to * timing.rise_s;
  const riseEnd = measureFrom_s + timing.rise_s - timing.edge_s;
  const resetEnd = measureFrom_s + timing.period_s - timing.edge_s;
  const at = { inputVoltage_V, outputVoltage_V: null };
  const slope = { at, unit: 'V/s', limit: slopeLimit };
  return [
    {
      ...slope,
      quantity: 'capacitor slope',
      predicted: figures.capacitorSlope_V_per_s,
      errorScale: figures.capacitorSlope_V_per_s,
      measure: ({ time_s, vectors }) => slopeBetween(time_s, vectors['v(ramp)']!, from, to),
    },
    {
      ...slope,
      quantity: 'comparator slope',
      predicted: figures.comparatorSlope_V_per_s,
      errorScale: figures.comparatorSlope_V_per_s,
      measure: ({ time_s, vectors }) => slopeBetween(time_s, vectors['v(sense)']!, from, to),
    },
    {
      at,
      quantity: 'amplitude',
      unit: 'V',
      limit: slopeLimit,
      predicted: figures.amplitude_V,
      errorScale: figures.amplitude_V,
      measure: (waveforms) => peakAt(riseEnd, timing, waveforms),
    },
    {
      at,
      quantity: 'residual',
      unit: 'V',
      limit: residualLimit,
      predicted: figures.residual_V,
      errorScale: figures.amplitude_V,
      measure: ({ time_s, vectors }) => valueAt(time_s, vectors['v(ramp)']!, resetEnd),
    },
  ];
}

/**
 * The ramp when the clock begins to reset it, carried on from the time step before.
 *
 * An engine that prints at even steps only shows nothing between the last one of the rise and the first one
 * of the reset.
 */
function peakAt(riseEnd: number, { period_s, rise_s }: ClockTiming, { time_s, vectors }: Waveforms): number {
  const ramp = vectors['v(ramp)']!;
  const last = riseEnd - period_s / stepsPerPeriod;
  const slope = slopeBetween(time_s, ramp, last - straightEnd * rise_s, last);
  return valueAt(time_s, ramp, last) + slope * (riseEnd - last);
}
