import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { DeckCheck, Result } from '../emit/resultSchema.ts';
import type { Chart, DataPoint, EdgeLabel, Ink, LegendEntry, Mark } from './chart/Chart.ts';
import { plainNumber, volts } from './figures.ts';
import { bothLaws, inkOf, lawName } from './lawNames.ts';
import { type IndexBand, indexBand, regionSlices } from './regionSlice.ts';

/** A plot whose largest index is above this is drawn in ratios: the edge at ½ would drown. */
const linearUpTo = 3;

/** Damping index over input voltage, adaptive against fixed, with what the simulation measured. */
export function dampingChart(design: SizedDesign, result: Result): Chart {
  const { goal } = design.request.specification;
  const slices = regionSlices(design.region);
  const bands = bothLaws(design).map((law) => ({
    law,
    ink: inkOf(law.law.kind),
    band: slices.flatMap((slice) => indexBand(design, law, slice) ?? []),
  }));
  const largest = Math.max(goal.ceilingIndex, ...bands.flatMap(({ band }) => band.map(({ high }) => high)));
  const isLogarithmic = largest > linearUpTo;
  const least = Math.min(0.5, ...bands.flatMap(({ band }) => band.map(({ low }) => low)));
  return {
    id: 'damping',
    title: 'Damping index over input voltage',
    description: describe(design),
    x: inputAxis(design),
    y: {
      quantity: 'damping index x',
      unit: '',
      low: isLogarithmic ? Math.min(0.35, 0.7 * least) : 0,
      high: isLogarithmic ? largest * 1.15 : Math.ceil(largest * 5 + 0.5) / 5,
      isLogarithmic,
    },
    marks: [
      { kind: 'forbidden', below: 0.5, label: 'not stable: x ≤ ½' },
      ...bands.flatMap(({ band, ink }): Mark[] => bandMarks(band, ink)),
      { kind: 'level', ink: 'goal', y: goal.dampingIndex },
      { kind: 'level', ink: 'ceiling', y: goal.ceilingIndex },
      ...bands.flatMap(({ ink }) => simulatedMarks(result, ink)),
      ...worstNotes(design),
    ],
    edgeLabels: [
      ...bands.map(({ band, ink }) => ({ y: band.at(-1)!.high, ink, text: ink })),
      { y: goal.dampingIndex, ink: 'goal', text: `goal ${plainNumber(goal.dampingIndex)}` },
      { y: goal.ceilingIndex, ink: 'ceiling', text: `ceiling ${plainNumber(goal.ceilingIndex)}` },
    ] satisfies EdgeLabel[],
    legend: [
      ...bands.map(
        ({ law, ink }): LegendEntry => ({
          mark: 'line',
          ink,
          text: `${lawName(law.law.kind)}, smallest and largest x over outputs and corners`,
        }),
      ),
      ...(result.simulation === null ? [] : simulatedLegend(inkOf(design.chosen.law.kind))),
    ],
  };
}

function inputAxis({ region }: SizedDesign) {
  const { low, high } = region.inputVoltage_V;
  const room = high > low ? 0.03 * (high - low) : 0.1 * high;
  return { quantity: 'input voltage Vin', unit: 'V', low: low - room, high: high + room };
}

function bandMarks(band: readonly IndexBand[], ink: Ink): Mark[] {
  const curve = (pick: 'low' | 'high') => band.map((slice): DataPoint => [slice.inputVoltage_V, slice[pick]]);
  const [lower, upper] = [curve('low'), curve('high')];
  return [
    { kind: 'band', ink, upper, lower },
    { kind: 'line', ink, points: upper },
    { kind: 'line', ink, points: lower },
  ];
}

/** Crosses where the closed form puts a nominal unit, circles where its waveform shows it: x = 1/(1 − α). */
function simulatedMarks({ simulation }: Result, ink: Ink): Mark[] {
  const checks = (simulation?.decks ?? []).filter(
    ({ quantity, file }) => quantity === 'cycle ratio' && file.startsWith(`converter-${ink}`),
  );
  const at = (pick: (check: DeckCheck) => number | null) =>
    checks.flatMap((check): DataPoint[] => {
      const ratio = pick(check);
      return ratio === null || ratio >= 1 ? [] : [[check.at.inputVoltage_V, 1 / (1 - ratio)]];
    });
  return [
    { kind: 'crosses', ink, points: at(({ predicted }) => predicted) },
    { kind: 'rings', ink, points: at(({ measured }) => measured) },
  ];
}

function simulatedLegend(ink: Ink): LegendEntry[] {
  return [
    { mark: 'crosses', ink, text: 'nominal unit, predicted' },
    { mark: 'rings', ink, text: 'the same, from the simulated waveform' },
  ];
}

function worstNotes({ chosen }: SizedDesign): Mark[] {
  const { min, max } = chosen.extremes;
  const ink = inkOf(chosen.law.kind);
  const at = ({ at: point, dampingIndex }: typeof min): DataPoint => [point.inputVoltage_V, dampingIndex];
  return [
    { kind: 'note', ink, at: at(min), side: 'below', text: `least ${plainNumber(min.dampingIndex)}` },
    { kind: 'note', ink, at: at(max), side: 'above', text: `greatest ${plainNumber(max.dampingIndex)}` },
  ];
}

function describe(design: SizedDesign): string {
  const sentences = bothLaws(design).map(({ law, extremes: { min, max } }) => {
    const least = `${plainNumber(min.dampingIndex)} at ${volts(min.at.inputVoltage_V)}`;
    const most = `${plainNumber(max.dampingIndex)} at ${volts(max.at.inputVoltage_V)}`;
    return `With the ${lawName(law.kind)} the damping index lies between ${least} and ${most}.`;
  });
  return `${sentences.join(' ')} Below one half the loop is not stable; the goal is ${plainNumber(design.request.specification.goal.dampingIndex)}.`;
}
