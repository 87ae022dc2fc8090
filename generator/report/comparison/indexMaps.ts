import { dampingIndex } from '../../law/innerLoop.ts';
import { ownRamp_V } from '../../law/leastGain.ts';
import type { Comparison } from '../../loop/Comparison.ts';
import type { ComparedLaw } from '../../loop/compareLaws.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import type { Chart, DataPoint, LegendEntry, Mark } from '../chart/Chart.ts';
import { plainNumber, volts } from '../figures.ts';
import { capital } from '../lawComparison.ts';
import { gainText, lawName } from '../lawNames.ts';
import { type Column, conditionsOf, inputsOf, leastLosses, regionColumns } from './regionColumns.ts';

/** Values at which the tint changes, the same on every map: about a third of a decade in five. */
const levels = [0.9, 1, 1.25, 1.5, 2, 3, 4, 6, 8, 12] as const;
/** Columns and rows of a map. */
const grid = { steps: 56, rows: 40 } as const;

/** Greatest damping index of any unit at a point. */
export function greatestIndex({ region, corners }: Comparison, { law, required }: ComparedLaw) {
  return (at: RegionPoint) =>
    dampingIndex(
      at.up_V,
      at.swing_V,
      corners.at(at).lambda.high * law.ramp_V(required.gain, at) + ownRamp_V(region, corners, at).high,
    );
}

/** One map for each law, on one scale; none where the output is one known voltage, or several. */
export function indexMaps(comparison: Comparison): readonly Chart[] {
  const { region, laws, request } = comparison;
  const { output_V } = request.specification;
  const span = output_V?.[0];
  const isPlane = output_V === null || (output_V.length === 1 && span!.from.nominal < span!.to.nominal);
  const { low, high } = region.inputVoltage_V;
  if (!isPlane || !(high > low)) return [];
  const columns = regionColumns(region, leastLosses(conditionsOf(region)), {
    inputs: inputsOf(region, grid.steps),
    rows: grid.rows,
  });
  return laws.map((law) => indexMap(comparison, law, columns));
}

function indexMap(comparison: Comparison, law: ComparedLaw, columns: readonly Column[]): Chart {
  const { region } = comparison;
  const index = greatestIndex(comparison, law);
  const valued = columns.map((column) => ({ ...column, values: column.points.map(index) }));
  const outputs = columns.flatMap(({ points }) => [points[0]!, points.at(-1)!]).map((p) => p.outputVoltage_V);
  const { low, high } = region.inputVoltage_V;
  const foot = Math.max(0, Math.min(...outputs));
  const { max } = law.extremes;
  return {
    id: `map-${law.law.kind}`,
    title: `${capital(lawName(law.law.kind))}, ${gainText(law, law.required.gain)}: x up to ${plainNumber(max.dampingIndex)}`,
    description: `Greatest damping index of any unit over input and output voltage: from ${plainNumber(law.extremes.min.dampingIndex)} to ${plainNumber(max.dampingIndex)} at ${volts(max.at.inputVoltage_V)} in, ${volts(Math.max(0, max.at.outputVoltage_V))} out.`,
    x: { quantity: 'input voltage Vin', unit: 'V', low, high },
    y: { quantity: 'output voltage Vout', unit: 'V', low: foot, high: Math.max(...outputs) },
    marks: [
      { kind: 'outside', label: 'out of reach', at: null },
      { kind: 'tint', step: 0, outline: outline(columns.map(wholeColumn)) },
      ...levels.flatMap((level, step) => tints(valued, level, step + 1)),
      ...levels.flatMap((level) => contours(valued, level)),
    ],
    edgeLabels: [],
    legend: [],
  };
}

interface ValuedColumn extends Column {
  readonly values: readonly number[];
}

/** Part of a column in which something holds. */
interface Stretch {
  readonly inputVoltage_V: number;
  readonly from_V: number;
  readonly to_V: number;
}

function wholeColumn({ inputVoltage_V, points }: Column): Stretch {
  return { inputVoltage_V, from_V: points[0]!.outputVoltage_V, to_V: points.at(-1)!.outputVoltage_V };
}

/** Up one side and down the other. */
function outline(stretches: readonly Stretch[]): DataPoint[] {
  return [
    ...stretches.map(({ inputVoltage_V, to_V }): DataPoint => [inputVoltage_V, to_V]),
    ...stretches.map(({ inputVoltage_V, from_V }): DataPoint => [inputVoltage_V, from_V]).reverse(),
  ];
}

/** Where the index is a level or more; under every law that is one stretch of each column. */
function tints(columns: readonly ValuedColumn[], level: number, step: number): Mark[] {
  return runs(columns, (column) => stretchAbove(column, level)).map((stretches) => ({
    kind: 'tint',
    step,
    outline: outline(stretches),
  }));
}

function stretchAbove({ inputVoltage_V, points, values }: ValuedColumn, level: number): Stretch | null {
  const first = values.findIndex((value) => value >= level);
  if (first < 0) return null;
  const last = values.findLastIndex((value) => value >= level);
  const edge = (inside: number, outside: number) =>
    points[outside] === undefined
      ? points[inside]!.outputVoltage_V
      : crossing(points, values, inside, outside, level);
  return { inputVoltage_V, from_V: edge(first, first - 1), to_V: edge(last, last + 1) };
}

function crossing(
  points: readonly RegionPoint[],
  values: readonly number[],
  a: number,
  b: number,
  level: number,
): number {
  const share = (level - values[a]!) / (values[b]! - values[a]!);
  return points[a]!.outputVoltage_V + share * (points[b]!.outputVoltage_V - points[a]!.outputVoltage_V);
}

/** Lines along which the index is a level. */
function contours(columns: readonly ValuedColumn[], level: number): Mark[] {
  const lines = runs(columns, (column): DataPoint | null => {
    const at = column.values.findIndex(
      (value, row) => row > 0 && value >= level !== column.values[row - 1]! >= level,
    );
    return at < 0 ? null : [column.inputVoltage_V, crossing(column.points, column.values, at, at - 1, level)];
  });
  return lines.map((points) => ({ kind: 'contour', points, label: String(level) }));
}

/** Neighbouring columns that have something, run by run. */
function runs<T>(columns: readonly ValuedColumn[], pick: (column: ValuedColumn) => T | null): T[][] {
  const found: T[][] = [[]];
  for (const column of columns) {
    const picked = pick(column);
    if (picked !== null) found.at(-1)!.push(picked);
    else if (found.at(-1)!.length > 0) found.push([]);
  }
  return found.filter((run) => run.length > 1);
}

/** The scale of the maps, as far as any of them reaches. */
export function mapScale({ laws }: Comparison): readonly LegendEntry[] {
  const most = Math.max(...laws.map(({ extremes }) => extremes.max.dampingIndex));
  const used = levels.filter((level) => level < most);
  return [0, ...used.map((_, step) => step + 1)].map((step) => ({
    mark: 'tint',
    ink: 'plain',
    step,
    text:
      step === 0
        ? `x below ${levels[0]}`
        : step === used.length
          ? `above ${used.at(-1)}`
          : `${levels[step - 1]} to ${levels[step]}`,
  }));
}
