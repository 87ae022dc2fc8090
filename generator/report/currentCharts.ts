import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { type ConverterDeck, converterDeck } from '../emit/deck/converterDeck.ts';
import { converterPlan } from '../emit/deck/converterPlan.ts';
import { cyclePlan } from '../emit/deck/perturbation.ts';
import { roundTo6Digits } from '../emit/text/roundTo6Digits.ts';
import type { Waveforms } from '../spice/Deck.ts';
import { affineCycleMap } from '../spice/measure/affineCycleMap.ts';
import { valueAt } from '../spice/measure/valueAt.ts';
import type { Chart, DataPoint } from './chart/Chart.ts';
import { plainNumber, volts } from './figures.ts';
import { inkOf } from './lawNames.ts';

/** Points of the drawn current in each cycle. */
const samplesPerCycle = 60;
const [shifted, shiftedAgain] = cyclePlan.shiftedEdges;
/** Drawn from two clock edges before the shift to the next one. */
const first = shifted! - 3;
const last = shiftedAgain! - 1;

/** What the current does after it was shifted, at the worst operating point of the law that is built. */
interface Decay {
  readonly deck: ConverterDeck;
  readonly current: readonly DataPoint[];
  readonly edges: readonly DataPoint[];
  readonly steady_A: number;
  readonly shift_A: number;
}

/** Name of the deck at that point. */
export function worstDeck({ chosen }: SizedDesign): string {
  return `converter-${inkOf(chosen.law.kind)}.cir`;
}

/** The inductor current and the decay of its perturbation; none where that deck did not run. */
export function currentCharts(design: SizedDesign, waveforms: Waveforms | undefined): readonly Chart[] {
  const planned = converterPlan(design).find(({ file }) => file === worstDeck(design));
  if (waveforms === undefined || planned === undefined) return [];
  const deck = converterDeck(design, planned.kind, planned.sized, planned.point);
  const decay = decayOf(deck, waveforms);
  return decay === null ? [] : [currentChart(design, decay), decayChart(design, decay)];
}

function decayOf(deck: ConverterDeck, { time_s, vectors }: Waveforms): Decay | null {
  const current = (cycle: number) =>
    roundTo6Digits(valueAt(time_s, vectors['i(l1)']!, cycle * deck.period_s));
  const edges = range(first, last).map((edge): DataPoint => [edge - shifted!, current(edge)]);
  const skip = shifted! - 1 - first;
  const samples = edges.map(([, value]) => value);
  const { slope, intercept } = affineCycleMap(samples, [skip]);
  const steady_A = intercept / (1 - slope);
  if (!Number.isFinite(steady_A)) return null;
  return {
    deck,
    edges,
    steady_A,
    shift_A: samples[skip + 1]! - steady_A,
    current: range(first * samplesPerCycle, last * samplesPerCycle).map((sample): DataPoint => {
      const cycle = sample / samplesPerCycle;
      return [cycle - shifted!, current(cycle)];
    }),
  };
}

function range(from: number, to: number): number[] {
  return Array.from({ length: to - from + 1 }, (_, index) => from + index);
}

function place({ point }: ConverterDeck): string {
  return `${volts(point.inputVoltage_V)} in, ${volts(point.outputVoltage_V)} out`;
}

function currentChart(design: SizedDesign, { deck, current, edges }: Decay): Chart {
  const values = current.map(([, value]) => value);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const room = 0.12 * (high - low);
  const ink = inkOf(design.chosen.law.kind);
  return {
    id: 'current',
    title: `Inductor current at ${place(deck)}, shifted once`,
    description: `Simulated current over ${last - first} clock cycles; before edge 0 a voltage pulse shifts it, and from edge to edge the shift is multiplied by ${plainNumber(deck.cycleRatio)}.`,
    x: {
      quantity: 'clock edges since the shift',
      unit: '',
      low: first - shifted!,
      high: last - shifted!,
      step: 1,
    },
    y: { quantity: 'inductor current', unit: 'A', low: low - room, high: high + room },
    marks: [
      { kind: 'line', ink: 'simulated', points: current },
      { kind: 'rings', ink, points: edges },
    ],
    edgeLabels: [{ y: edges.at(-1)![1], ink, text: 'clock edges' }],
    legend: [
      { mark: 'line', ink: 'simulated', text: 'simulated current' },
      { mark: 'rings', ink, text: 'its value at each clock edge' },
    ],
  };
}

function decayChart(design: SizedDesign, { deck, edges, steady_A, shift_A }: Decay): Chart {
  const ink = inkOf(design.chosen.law.kind);
  const after = edges.filter(([edge]) => edge >= 0);
  const measured = after.map(
    ([edge, value]): DataPoint => [edge, roundTo6Digits((value - steady_A) / shift_A)],
  );
  const predicted = after.map(([edge]): DataPoint => [edge, deck.cycleRatio ** edge]);
  const deepest = Math.min(0, ...measured.map(([, value]) => value), ...predicted.map(([, value]) => value));
  return {
    id: 'decay',
    title: 'What is left of the shift at each clock edge',
    description: `Measured shares ${measured
      .slice(0, 4)
      .map(([, share]) => plainNumber(share))
      .join(', ')} against predicted ${predicted
      .slice(0, 4)
      .map(([, share]) => plainNumber(share))
      .join(', ')}.`,
    x: {
      quantity: 'clock edges since the shift',
      unit: '',
      low: -0.3,
      high: after.at(-1)![0] + 0.3,
      step: 1,
    },
    y: { quantity: 'share of the shift', unit: '', low: Math.min(-0.25, 1.3 * deepest), high: 1.1 },
    marks: [
      { kind: 'level', ink: 'plain', y: 0 },
      { kind: 'line', ink, points: predicted },
      { kind: 'crosses', ink, points: predicted },
      { kind: 'rings', ink, points: measured },
    ],
    edgeLabels: [{ y: 0, ink, text: `α = ${plainNumber(deck.cycleRatio)}` }],
    legend: [
      { mark: 'crosses', ink, text: 'predicted, αⁿ' },
      { mark: 'rings', ink, text: 'simulated' },
    ],
  };
}
