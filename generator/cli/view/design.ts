import type { Result, WorstPoint } from '../../emit/resultSchema.ts';
import { printable } from '../problems/printable.ts';
import type { Alternative } from '../Stages.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber, volts } from './figures.ts';
import { outcomeRows } from './outcomes.ts';
import { simulationRow } from './simulation.ts';
import { oneLine, row, rule, together } from './table.ts';

export interface DesignViewOptions {
  readonly alternative: Alternative | null;
  /** Where the files are, or null: none were written. */
  readonly directory: string | null;
  readonly paint: Paint;
}

/** A design on one screen, in the order of the report's first: is it stable, with what, does it agree. */
export function designView(result: Result, { alternative, directory, paint }: DesignViewOptions): string {
  const lines = [
    ...titleRow(result, paint),
    ...stabilityRows(result, paint),
    ...lawRows(result, alternative),
    rule,
    ...buildRows(result),
    ...rampRows(result),
    rule,
    ...simulationRow(result.simulation, paint),
    ...outcomeRows(result.rules, paint),
    ...row('assumptions', assumptionsText(result)),
    ...row('files', filesText(result, directory)),
  ];
  return `${lines.join('\n')}\n`;
}

function titleRow({ specification }: Result, paint: Paint): string[] {
  const title = specification.title;
  return typeof title === 'string' && title !== '' ? [paint.strong(oneLine(printable(title)))] : [];
}

function stabilityRows({ stability, region, specification }: Result, paint: Paint): string[] {
  const { dampingIndexMin: least, dampingIndexMax: most, at, atMax } = stability;
  const isStable = least > 0.5;
  const where = region.outputVoltage_V === null ? everyDuty(region.duty[1]) : reach(region);
  const verdict = isStable
    ? `yes, ${where}: x at least ${plainNumber(least)} (${pointText(at)})`
    : `not stable everywhere: x only ${plainNumber(least)} (${pointText(at)}); ½ is the edge`;
  const goal = goalOf(specification);
  const aim = goal === null ? '' : `goal ${plainNumber(goal)}; `;
  const settling =
    stability.settlingCyclesMax === null ? '' : `; settles in ${stability.settlingCyclesMax} cycles`;
  return [
    ...(isStable ? row('stable', verdict) : row('failed', verdict, paint.bad)),
    ...row('', `${aim}x up to ${plainNumber(most)} (${pointText(atMax)})${settling}`),
    ...region.cut.flatMap((cut, index) => row(index === 0 ? 'limited' : '', cutText(cut))),
  ];
}

/** The part of the asked-for region that the duty limits take away. */
function cutText(cut: Result['region']['cut'][number]): string {
  const span = (values: unknown) => {
    const [low, high] = values as readonly [number, number];
    return together(low === high ? volts(low) : `${volts(low)} to ${volts(high)}`);
  };
  const output = Array.isArray(cut.outputVoltage_V) ? `, ${span(cut.outputVoltage_V)} out` : '';
  return `not regulated within ${span(cut.inputVoltage_V)} in${output}: ${cut.reason}`;
}

function reach({ cut }: Result['region']): string {
  return cut.length > 0 ? 'wherever the duty allows to regulate' : 'over the whole region';
}

function everyDuty(highest: number): string {
  return `at every duty to ${together(percent(highest))} (output not known: each is assumed possible)`;
}

function pointText({ inputVoltage_V, outputVoltage_V, dutyRatio }: WorstPoint): string {
  const output = outputVoltage_V === null ? '' : `, ${volts(outputVoltage_V)} out`;
  return together(`${volts(inputVoltage_V)} in${output}, duty ${percent(dutyRatio)}`);
}

function goalOf(specification: Result['specification']): number | null {
  const goal = specification.goal as { readonly dampingIndex?: unknown } | undefined;
  return typeof goal?.dampingIndex === 'number' ? goal.dampingIndex : null;
}

const follows = {
  fixed: 'the same slope at every input',
  vin: 'slope ∝ Vin',
  vout: 'slope ∝ Vout',
  'constant-q': 'slope for one Q',
};
const symbols = { fixed: 'S·L', vin: 'k', vout: 'p', 'constant-q': 'x' };

function lawRows({ law, stability }: Result, alternative: Alternative | null): string[] {
  const unit = law.kind === 'fixed' ? 'V' : '';
  const [realised, designed, least] = [law.realisedGain, law.gain, law.requiredGain].map((gain) =>
    figure(gain, unit),
  );
  const gains = `${symbols[law.kind]} = ${realised} realised, ${designed} designed, ${least} least`;
  return [
    ...row('law', `${law.kind}, ${follows[law.kind]}: ${together(gains)}`),
    ...costRows(stability, law.kind, alternative),
  ];
}

/** How far the loop is over-damped, and what the other law would do over the same region. */
function costRows(own: Cost, kind: string, alternative: Alternative | null): string[] {
  const text = (name: string, cost: Cost) =>
    together(`${name}  x to ${plainNumber(cost.dampingIndexMax)}, α ${cycleRatios(cost)}`);
  if (alternative === null) return row('cost', text(kind, own));
  const other = `${alternative.kind} instead`;
  const simpler = kind !== 'fixed' && alternative.dampingIndexMax <= own.dampingIndexMax;
  return [
    ...row('cost', text(kind.padEnd(other.length), own)),
    ...row('', text(other, alternative)),
    ...(simpler ? row('', 'for damping the fixed ramp is at least as good here: --law fixed') : []),
  ];
}

type Cost = Pick<Alternative, 'dampingIndexMax' | 'cycleRatioMin' | 'cycleRatioMax'>;

function cycleRatios({ cycleRatioMin, cycleRatioMax }: Cost): string {
  return `${plainNumber(cycleRatioMin)} … ${plainNumber(cycleRatioMax)}`;
}

/** More would push the verdicts off the screen; bom.csv has them all. */
const mostPartLines = 3;

function buildRows(result: Result): string[] {
  const { parts } = result;
  const named = ['capacitor', 'resistor'].flatMap((kind) => parts.filter((part) => part.kind === kind));
  const others = parts
    .filter((part) => !named.includes(part))
    .reduce((sum, { quantity }) => sum + quantity, 0);
  const texts = named.map(({ reference, text }) => together(`${reference} ${text}`));
  const rows = row('build', `${buildOf(result)}: ${[...texts, together(`and ${others} more`)].join(', ')}`);
  if (rows.length <= mostPartLines) return rows;
  return [...rows.slice(0, mostPartLines - 1), ...row('', `… ${parts.length} parts in all`)];
}

function buildOf({ law, ramp, specification }: Result): string {
  const { injection } = specification.ramp as { readonly injection: string };
  const feed = law.kind === 'fixed' ? ', fed from a 2.5 V reference' : '';
  return `${ramp.build}${feed}, injected at ${injection}`;
}

function rampRows({ ramp, region }: Result): string[] {
  const inputs = region.inputVoltage_V;
  const ends = (values: readonly [number, number], unit: string) =>
    inputs.map((input, end) => together(`${figure(values[end]!, unit)} at ${volts(input)}`)).join(', ');
  return [
    ...row('ramp', `${ends(ramp.comparatorSlope_V_per_s, 'V/s')}, at the comparator`),
    ...row(
      'current',
      `${ends(ramp.current_A, 'A')}, into the timing capacitor, ${together(figure(ramp.capacitance_F, 'F'))}`,
    ),
  ];
}

function assumptionsText({ assumptions }: Result): string {
  if (assumptions.length === 0) return 'none';
  return `${assumptions.length}, each with its reason in result.json (--json) and report`;
}

function filesText({ files }: Result, directory: string | null): string {
  return directory === null
    ? 'none written; --out DIR keeps them'
    : `${files.length} in ${printable(directory)}`;
}
