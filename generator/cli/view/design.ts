import type { Result, WorstPoint } from '../../emit/resultSchema.ts';
import { printable } from '../problems/printable.ts';
import type { Alternative } from '../Stages.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber } from './figures.ts';
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
  const where = region.outputVoltage_V === null ? everyDuty(region.duty[1]) : 'over the whole region';
  const verdict = isStable
    ? `yes, ${where}: x at least ${plainNumber(least)}, ${pointText(at)}`
    : `not stable everywhere: x only ${plainNumber(least)}, ${pointText(at)}; ½ is the edge`;
  const goal = goalOf(specification);
  const aim = goal === null ? '' : `goal ${plainNumber(goal)}; `;
  const settling =
    stability.settlingCyclesMax === null ? '' : `; settles in ${stability.settlingCyclesMax} cycles`;
  return [
    ...(isStable ? row('stable', verdict) : row('failed', verdict, paint.bad)),
    ...row('', `${aim}x up to ${plainNumber(most)}, ${pointText(atMax)}${settling}`),
  ];
}

function everyDuty(highest: number): string {
  return `at every duty to ${together(percent(highest))} (output not known: each is assumed possible)`;
}

function pointText({ inputVoltage_V, outputVoltage_V, dutyRatio }: WorstPoint): string {
  const output = outputVoltage_V === null ? '' : ` to ${figure(outputVoltage_V, 'V')}`;
  return together(`at ${figure(inputVoltage_V, 'V')}${output}, duty ${percent(dutyRatio)}`);
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
    ...row('cost', costText(stability, law.kind, alternative)),
  ];
}

/** How far the loop is over-damped, against what the other law would do over the same region. */
function costText(stability: Result['stability'], kind: string, alternative: Alternative | null): string {
  const own = together(`x to ${plainNumber(stability.dampingIndexMax)}, α ${cycleRatios(stability)}`);
  if (alternative === null) return own;
  const other = together(`x to ${plainNumber(alternative.dampingIndexMax)}, α ${cycleRatios(alternative)}`);
  return `${kind}: ${own}; ${alternative.kind} instead: ${other}`;
}

function cycleRatios({
  cycleRatioMin,
  cycleRatioMax,
}: Pick<Alternative, 'cycleRatioMin' | 'cycleRatioMax'>): string {
  return `${plainNumber(cycleRatioMin)} … ${plainNumber(cycleRatioMax)}`;
}

/** More would push the verdicts off the screen; bom.csv has them all. */
const mostPartLines = 4;

function buildRows({ parts, specification, ramp }: Result): string[] {
  const passives = parts.filter(({ kind }) => kind === 'capacitor' || kind === 'resistor');
  const others =
    parts.reduce((sum, { quantity }) => sum + quantity, 0) -
    passives.reduce((sum, part) => sum + part.quantity, 0);
  const texts = passives.map(({ reference, text }) => together(`${reference} ${text}`));
  const head = `${buildOf(specification)}; C ${figure(ramp.capacitance_F, 'F')}`;
  const rows = row('build', [head, ...texts, `and ${others} more`].join(', '));
  return rows.length <= mostPartLines
    ? rows
    : [...rows.slice(0, mostPartLines - 1), row('', `… ${parts.length} parts in all`)[0]!];
}

function buildOf(specification: Result['specification']): string {
  const ramp = specification.ramp as { readonly build?: unknown; readonly injection?: unknown } | undefined;
  return `${String(ramp?.build ?? 'circuit')}, injected at ${String(ramp?.injection ?? 'sense')}`;
}

function rampRows({ ramp, region }: Result): string[] {
  const inputs = region.inputVoltage_V;
  const ends = (values: readonly [number, number], unit: string) =>
    inputs.map((input, end) => together(`${figure(values[end]!, unit)} at ${figure(input, 'V')}`)).join(', ');
  return [
    ...row('ramp', `${ends(ramp.comparatorSlope_V_per_s, 'V/s')}, at the comparator`),
    ...row('current', `${ends(ramp.current_A, 'A')}, into the timing capacitor`),
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
