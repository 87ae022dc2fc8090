import { rampFigures } from '../circuit/rampFigures.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { clockTiming } from '../emit/deck/deckTiming.ts';
import { type RampTestDeck, rampTestDeck } from '../emit/deck/rampTestDeck.ts';
import { roundTo6Digits } from '../emit/text/roundTo6Digits.ts';
import type { Waveforms } from '../spice/Deck.ts';
import { valueAt } from '../spice/measure/valueAt.ts';
import type { Chart, DataPoint, EdgeLabel, Mark } from './chart/Chart.ts';
import { figure, volts } from './figures.ts';
import { inkOf } from './lawNames.ts';

/** Points of a drawn waveform over one period. */
const samples = 200;
/** Circles over one rise. */
const circles = 12;

/** One input voltage of the test: the straight line that was predicted and the waveform that came. */
interface Trace {
  readonly inputVoltage_V: number;
  readonly predicted: readonly DataPoint[];
  readonly simulated: readonly DataPoint[];
  readonly rings: readonly DataPoint[];
  /** Simulated less predicted over the rise [V]. */
  readonly deviation: readonly DataPoint[];
  readonly amplitude_V: number;
}

/** The ramp of the last period at each input, against the prediction; none without a simulation. */
export function rampCharts(design: SizedDesign, waveforms: Waveforms | undefined): readonly Chart[] {
  if (waveforms === undefined) return [];
  const traces = rampTestDeck(design).levels.map((level) => traceOf(design, waveforms, level));
  return [overlay(design, traces), deviations(design, traces)];
}

function traceOf(
  design: SizedDesign,
  { time_s, vectors }: Waveforms,
  { inputVoltage_V, measureFrom_s }: RampTestDeck['levels'][number],
): Trace {
  const { demand } = design;
  const { period_s, rise_s, edge_s } = clockTiming(design);
  const figures = rampFigures(design, demand.tracks === 'input' ? inputVoltage_V : demand.track_V.high);
  const top_s = rise_s - edge_s;
  const line = (t: number) => figures.amplitude_V - figures.capacitorSlope_V_per_s * (top_s - t);
  const from_s = Math.max(edge_s, top_s - figures.amplitude_V / figures.capacitorSlope_V_per_s);
  const sample = (t: number) => roundTo6Digits(valueAt(time_s, vectors['v(ramp)']!, measureFrom_s + t));
  const over = (from: number, to: number, count: number, value: (t: number) => number) =>
    Array.from({ length: count + 1 }, (_, index): DataPoint => {
      const t = from + ((to - from) * index) / count;
      return [t, value(t)];
    });
  return {
    inputVoltage_V,
    amplitude_V: figures.amplitude_V,
    predicted: over(from_s, top_s, 1, line),
    simulated: over(0, period_s * (1 - 1e-6), samples, sample),
    rings: over(0.04 * top_s, top_s, circles, sample),
    deviation: over(0.02 * top_s, top_s, samples / 2, (t) => roundTo6Digits(sample(t) - line(t))),
  };
}

function overlay(design: SizedDesign, traces: readonly Trace[]): Chart {
  const ink = inkOf(design.chosen.law.kind);
  const largest = Math.max(...traces.map(({ amplitude_V }) => amplitude_V));
  return {
    id: 'ramp',
    title: 'Voltage of the timing capacitor, simulated over predicted',
    description: `One clock period at ${levels(traces)}. The ramp reaches ${traces.map(({ amplitude_V }) => figure(amplitude_V, 'V')).join(', ')} at maximum duty and is reset in the rest of the period.`,
    x: { quantity: 'time in the period', unit: 's', low: 0, high: clockTiming(design).period_s },
    y: { quantity: 'capacitor voltage', unit: 'V', low: 0, high: 1.12 * largest },
    marks: traces.flatMap(({ predicted, simulated, rings }): Mark[] => [
      { kind: 'line', ink: 'simulated', points: simulated },
      { kind: 'line', ink, points: predicted },
      { kind: 'rings', ink, points: rings },
    ]),
    edgeLabels: distinctLevels(traces).map(
      ({ amplitude_V, names }): EdgeLabel => ({ y: amplitude_V, ink, text: names }),
    ),
    legend: [
      { mark: 'line', ink, text: 'predicted from the part values' },
      { mark: 'rings', ink, text: 'simulated' },
      { mark: 'line', ink: 'simulated', text: 'simulated over the whole period' },
    ],
  };
}

/** A ramp that does not move is named once. */
function distinctLevels(traces: readonly Trace[]): { amplitude_V: number; names: string }[] {
  const isSame = traces.every(({ amplitude_V }) => amplitude_V === traces[0]!.amplitude_V);
  if (isSame) return [{ amplitude_V: traces[0]!.amplitude_V, names: 'at every input' }];
  return traces.map(({ amplitude_V, inputVoltage_V }) => ({
    amplitude_V,
    names: `Vin ${volts(inputVoltage_V)}`,
  }));
}

function deviations(design: SizedDesign, traces: readonly Trace[]): Chart {
  const ink = inkOf(design.chosen.law.kind);
  const share = traces.map((trace) =>
    trace.deviation.map(([t, v]): DataPoint => [t, (100 * v) / trace.amplitude_V]),
  );
  const reach = Math.max(2.5, ...share.flat().map(([, v]) => 1.2 * Math.abs(v)));
  return {
    id: 'deviation',
    title: 'Simulated less predicted ramp, share of its amplitude',
    description: `The difference over the rise at ${levels(traces)}; 2 % is the limit for slope and amplitude.`,
    x: { quantity: 'time in the period', unit: 's', low: 0, high: clockTiming(design).period_s },
    y: { quantity: 'difference', unit: '%', low: -reach, high: reach },
    marks: [
      { kind: 'level', ink: 'goal', y: 2 },
      { kind: 'level', ink: 'goal', y: -2 },
      { kind: 'level', ink: 'plain', y: 0 },
      ...share.map((points): Mark => ({ kind: 'line', ink, points })),
    ],
    edgeLabels: [
      ...share.map(
        (points, index): EdgeLabel => ({
          y: points.at(-1)![1],
          ink,
          text: volts(traces[index]!.inputVoltage_V),
        }),
      ),
      { y: 2, ink: 'goal', text: 'limit +2 %' },
      { y: -2, ink: 'goal', text: 'limit −2 %' },
    ],
    legend: [{ mark: 'line', ink, text: 'simulated less predicted' }],
  };
}

function levels(traces: readonly Trace[]): string {
  return traces.map(({ inputVoltage_V }) => volts(inputVoltage_V)).join(', ');
}
