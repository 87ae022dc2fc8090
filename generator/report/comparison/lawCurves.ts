import type { Comparison } from '../../loop/Comparison.ts';
import type { ComparedLaw } from '../../loop/compareLaws.ts';
import { lineResponse_A_per_V } from '../../loop/lineResponse.ts';
import { type LoopUnit, outputLimit_A, peakLimit_A } from '../../loop/peakLimits.ts';
import type { OperatingRegion, RegionPoint } from '../../region/OperatingRegion.ts';
import type { Axis, Chart, DataPoint, EdgeLabel, Ink, Mark } from '../chart/Chart.ts';
import { figure, plainNumber, volts } from '../figures.ts';
import { lawName } from '../lawNames.ts';
import { greatestIndex } from './indexMaps.ts';
import { conditionsOf, inputsOf, regionColumns } from './regionColumns.ts';

const steps = 60;
const rows = 8;

/** The ink that a law keeps through the page. */
export function lawInk({ law }: Pick<ComparedLaw, 'law'>): Ink {
  return law.kind === 'vin' ? 'adaptive' : law.kind;
}

/** Which of several values at one input stands for all of them. */
type Representative = (values: readonly number[]) => number;

const least: Representative = (values) => Math.min(...values);
const greatest: Representative = (values) => Math.max(...values);
const largest: Representative = (values) => values.reduce((a, b) => (Math.abs(b) > Math.abs(a) ? b : a));

/** A figure over input: of all outputs, loads and units the one that counts. */
function curveOf(
  { region }: Comparison,
  figure: (at: RegionPoint) => number,
  pick: Representative,
): DataPoint[] {
  const inputs = inputsOf(region, steps);
  const columns = conditionsOf(region).flatMap((condition) =>
    regionColumns(region, condition, { inputs, rows }),
  );
  return inputs.flatMap((input): DataPoint[] => {
    const values = columns
      .filter(({ inputVoltage_V }) => inputVoltage_V === input)
      .flatMap(({ points }) => points.map(figure));
    return values.length === 0 ? [] : [[input, pick(values)]];
  });
}

interface Curve {
  readonly law: ComparedLaw;
  readonly points: readonly DataPoint[];
}

interface CurveHead extends Pick<Chart, 'id' | 'title'> {
  readonly y: Pick<Axis, 'quantity' | 'unit'>;
  readonly pick: Representative;
}

/** A figure of each law over the input voltage, or null where no law has it. */
function curveChart(
  comparison: Comparison,
  { id, title, y, pick }: CurveHead,
  figureOf: (law: ComparedLaw) => ((at: RegionPoint) => number) | null,
): Chart | null {
  const { low, high } = comparison.region.inputVoltage_V;
  if (!(high > low)) return null;
  const curves = comparison.laws.flatMap((law): Curve[] => {
    const figure = figureOf(law);
    return figure === null ? [] : [{ law, points: curveOf(comparison, figure, pick) }];
  });
  if (curves.length === 0) return null;
  return {
    id,
    title,
    description: curves.map((curve) => describe(curve, y)).join(' '),
    x: { quantity: 'input voltage Vin', unit: 'V', low, high },
    y: { ...y, ...room(curves) },
    marks: curves.map(({ law, points }) => ({ kind: 'line', ink: lawInk(law), points })),
    edgeLabels: curves.map(
      ({ law, points }): EdgeLabel => ({ y: points.at(-1)![1], ink: lawInk(law), text: law.law.kind }),
    ),
    legend: [],
  };
}

function room(curves: readonly Curve[]): { low: number; high: number } {
  const values = curves.flatMap(({ points }) => points.map(([, value]) => value));
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const margin = Math.max(0.08 * (high - low), 1e-3 * Math.max(Math.abs(low), Math.abs(high)), 1e-9);
  return { low: low - margin, high: high + margin };
}

function describe({ law, points }: Curve, { unit }: CurveHead['y']): string {
  const text = ([input, value]: DataPoint) =>
    `${unit === '' ? plainNumber(value) : figure(value, unit)} at ${volts(input)}`;
  return `With a ${lawName(law.law.kind)} ${text(points[0]!)} and ${text(points.at(-1)!)}.`;
}

/** Damping index over input voltage, for outputs that span no plane. */
export function indexChart(comparison: Comparison): Chart | null {
  const { goal } = comparison.request.specification;
  const chart = curveChart(
    comparison,
    {
      id: 'index',
      title: 'Greatest damping index of any unit over input voltage',
      y: { quantity: 'damping index x', unit: '' },
      pick: greatest,
    },
    (law) => greatestIndex(comparison, law),
  );
  if (chart === null) return null;
  const isNear = (level: number) => level < 1.25 * chart.y.high;
  const shown = [
    { y: goal.dampingIndex, ink: 'goal', text: `goal ${plainNumber(goal.dampingIndex)}` },
    { y: goal.ceilingIndex, ink: 'ceiling', text: `ceiling ${plainNumber(goal.ceilingIndex)}` },
  ] as const;
  const levels = shown.filter(({ y }) => isNear(y));
  const high = Math.max(chart.y.high, ...levels.map(({ y }) => y * 1.03));
  return {
    ...chart,
    y: { ...chart.y, low: Math.min(0.45, chart.y.low), high, isLogarithmic: high > 3 },
    marks: [
      { kind: 'forbidden', below: 0.5, label: 'not stable: x ≤ ½' },
      ...chart.marks,
      ...levels.map(({ y, ink }): Mark => ({ kind: 'level', ink, y })),
    ],
    edgeLabels: [...chart.edgeLabels, ...levels],
  };
}

/** Peak limit, output limit and line response over input voltage, as far as they are known. */
export function currentCurves(comparison: Comparison): readonly Chart[] {
  const isOne = isOneOutput(comparison.region);
  const ofAny = isOne ? '' : ', least of any output';
  const ofLargest = isOne ? '' : ', largest of any output';
  return [
    curveChart(
      comparison,
      {
        id: 'peak',
        title: `Peak current limit${ofAny}`,
        pick: least,
        y: { quantity: 'inductor current at which it trips', unit: 'A' },
      },
      ({ unit }) => limitOf(unit, comparison, peakLimit_A),
    ),
    curveChart(
      comparison,
      {
        id: 'output',
        title: `Output current limit${ofAny}`,
        pick: least,
        y: { quantity: 'load current at which it trips', unit: 'A' },
      },
      ({ unit }) => limitOf(unit, comparison, outputLimit_A),
    ),
    curveChart(
      comparison,
      {
        id: 'line',
        title: `Line response at constant control${ofLargest}`,
        pick: largest,
        y: { quantity: 'mean inductor current per volt of input', unit: 'A/V' },
      },
      ({ unit }) => unit && ((at) => lineResponse_A_per_V(unit, at)),
    ),
  ].filter((chart) => chart !== null);
}

function limitOf(
  unit: LoopUnit | null,
  { region }: Comparison,
  limit: (unit: LoopUnit, at: RegionPoint) => number | null,
): ((at: RegionPoint) => number) | null {
  if (unit === null || limit(unit, region.vertices[0]!) === null) return null;
  return (at) => limit(unit, at)!;
}

function isOneOutput({ vertices }: OperatingRegion): boolean {
  const outputs = vertices.map(({ outputVoltage_V }) => outputVoltage_V);
  return Math.max(...outputs) - Math.min(...outputs) < 1e-9 * Math.max(...outputs);
}
