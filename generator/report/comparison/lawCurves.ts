import type { Comparison } from '../../loop/Comparison.ts';
import type { ComparedLaw } from '../../loop/compareLaws.ts';
import { lineResponse_A_per_V } from '../../loop/lineResponse.ts';
import { type LoopUnit, outputLimit_A, peakLimit_A } from '../../loop/peakLimits.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import type { Axis, Chart, DataPoint, EdgeLabel, Ink, Mark } from '../chart/Chart.ts';
import { plainNumber, volts } from '../figures.ts';
import { lawName } from '../lawNames.ts';
import { greatestIndex } from './indexMaps.ts';
import { conditionsOf, inputsOf, regionColumns } from './regionColumns.ts';

const steps = 60;
const rows = 8;

/** The ink that a law keeps through the page. */
export function lawInk({ law }: Pick<ComparedLaw, 'law'>): Ink {
  return law.kind === 'vin' ? 'adaptive' : law.kind;
}

interface Band {
  readonly inputVoltage_V: number;
  readonly low: number;
  readonly high: number;
}

/** Least and greatest of a figure over input, every output, load and unit. */
function bandsOf({ region }: Comparison, figure: (at: RegionPoint) => number): readonly Band[] {
  const inputs = inputsOf(region, steps);
  const columns = conditionsOf(region).flatMap((condition) =>
    regionColumns(region, condition, { inputs, rows }),
  );
  return inputs.flatMap((inputVoltage_V) => {
    const values = columns
      .filter((column) => column.inputVoltage_V === inputVoltage_V)
      .flatMap(({ points }) => points.map(figure));
    return values.length === 0
      ? []
      : [{ inputVoltage_V, low: Math.min(...values), high: Math.max(...values) }];
  });
}

interface Curve {
  readonly law: ComparedLaw;
  readonly bands: readonly Band[];
}

/** A figure of each law over the input voltage, or null where no law has it. */
function curveChart(
  comparison: Comparison,
  head: Pick<Chart, 'id' | 'title'> & { readonly y: Pick<Axis, 'quantity' | 'unit'> },
  figureOf: (law: ComparedLaw) => ((at: RegionPoint) => number) | null,
): Chart | null {
  const { low, high } = comparison.region.inputVoltage_V;
  if (!(high > low)) return null;
  const curves = comparison.laws.flatMap((law): Curve[] => {
    const figure = figureOf(law);
    return figure === null ? [] : [{ law, bands: bandsOf(comparison, figure) }];
  });
  if (curves.length === 0) return null;
  return {
    ...head,
    description: curves.map((curve) => describe(curve, head.y)).join(' '),
    x: { quantity: 'input voltage Vin', unit: 'V', low, high },
    y: { ...head.y, ...room(curves) },
    marks: curves.flatMap(curveMarks),
    edgeLabels: curves.map(
      ({ law, bands }): EdgeLabel => ({ y: bands.at(-1)!.high, ink: lawInk(law), text: law.law.kind }),
    ),
    legend: [],
  };
}

function room(curves: readonly Curve[]): { low: number; high: number } {
  const values = curves.flatMap(({ bands }) => bands.flatMap(({ low, high }) => [low, high]));
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const margin = Math.max(0.08 * (high - low), 1e-3 * Math.max(Math.abs(low), Math.abs(high)), 1e-9);
  return { low: low - margin, high: high + margin };
}

function curveMarks({ law, bands }: Curve): Mark[] {
  const ink = lawInk(law);
  const side = (pick: 'low' | 'high') => bands.map((band): DataPoint => [band.inputVoltage_V, band[pick]]);
  const [lower, upper] = [side('low'), side('high')];
  const isLine = bands.every(({ low, high }) => high - low <= 1e-9 * Math.max(Math.abs(low), Math.abs(high)));
  if (isLine) return [{ kind: 'line', ink, points: upper }];
  return [
    { kind: 'band', ink, upper, lower },
    { kind: 'line', ink, points: upper },
    { kind: 'line', ink, points: lower },
  ];
}

function describe({ law, bands }: Curve, { unit }: Pick<Axis, 'unit'>): string {
  const [first, last] = [bands[0]!, bands.at(-1)!];
  const text = ({ low, high }: Band) =>
    `${plainNumber(low)}${low === high ? '' : ` to ${plainNumber(high)}`}${unit === '' ? '' : ` ${unit}`}`;
  return `With a ${lawName(law.law.kind)} ${text(first)} at ${volts(first.inputVoltage_V)} and ${text(last)} at ${volts(last.inputVoltage_V)}.`;
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
  return [
    curveChart(
      comparison,
      {
        id: 'peak',
        title: 'Peak current limit',
        y: { quantity: 'inductor current at which it trips', unit: 'A' },
      },
      ({ unit }) => limitOf(unit, comparison, peakLimit_A),
    ),
    curveChart(
      comparison,
      {
        id: 'output',
        title: 'Output current limit',
        y: { quantity: 'load current at which it trips', unit: 'A' },
      },
      ({ unit }) => limitOf(unit, comparison, outputLimit_A),
    ),
    curveChart(
      comparison,
      {
        id: 'line',
        title: 'Line response at constant control',
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
