import type { ComparisonDocument } from '../../emit/comparisonSchema.ts';
import { printable } from '../problems/printable.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber, volts } from './figures.ts';
import { labelWidth, oneLine, row, rule, viewWidth } from './table.ts';

export interface ComparisonViewOptions {
  readonly title: string;
  /** Where the files are, or null: none were written. */
  readonly directory: string | null;
  readonly paint: Paint;
}

/** A comparison on one screen: the verdict, the laws side by side, the reasons, what to know besides. */
export function comparisonView(
  document: ComparisonDocument,
  { title, directory, paint }: ComparisonViewOptions,
): string {
  const [verdict = '', ...reasons] = document.verdict.reasons;
  const lines = [
    ...(title === '' ? [] : [paint.strong(oneLine(printable(title)))]),
    ...row('verdict', minus(verdict), paint.strong),
    ...regionRows(document),
    rule,
    ...lawTable(document.laws, paint),
    rule,
    ...labelled(
      'because',
      reasons.filter((reason) => !isInTable(reason)),
    ),
    ...neededRampRows(document),
    ...labelled('light load', document.lightLoad?.notes ?? []),
    ...labelled('note', document.notes),
    ...row('assumptions', assumptionsText(document)),
    ...(directory === null
      ? []
      : row('files', `comparison.html, comparison.json in ${printable(directory)}`)),
  ];
  return `${lines.join('\n')}\n`;
}

/** The table has these figures. */
function isInTable(reason: string): boolean {
  return /^(Peak limit|Output limit|Line response)/.test(reason);
}

function labelled(label: string, sentences: readonly string[]): string[] {
  return sentences.flatMap((sentence, at) => row(at === 0 ? label : '', minus(sentence)));
}

/** Figures in sentences are data; on paper a hyphen is no minus sign. */
function minus(text: string): string {
  return text.replace(/(^|[\s(])-(?=\d)/g, '$1−');
}

function regionRows({ region }: ComparisonDocument): string[] {
  const [inputs, duties] = [region.inputVoltage_V.map(volts), region.duty.map((duty) => percent(duty))];
  const output =
    region.outputVoltage_V === null
      ? 'output not known: every duty'
      : `${span(region.outputVoltage_V.map(volts))} out, duty`;
  const cuts =
    region.cut.length === 0
      ? ''
      : `; cut by ${[...new Set(region.cut.map(({ reason }) => reason))].join(', ')}`;
  return row('region', `${span(inputs)} in, ${output} ${span(duties)}${cuts}`);
}

function span([low, high]: readonly string[]): string {
  return low === high ? `${low}` : `${low} to ${high}`;
}

type Law = ComparisonDocument['laws'][number];

/** What is told of each law: a head with its unit, and the figure. */
const rows: readonly (readonly [head: string, text: (law: Law) => string | null])[] = [
  ['least gain', ({ kind, gain }) => `${symbols[kind]} ${figure(gain, kind === 'fixed' ? 'V' : '')}`],
  ['x', ({ dampingIndexMin, dampingIndexMax }) => range([dampingIndexMin, dampingIndexMax])],
  ['α ringing', ({ cycleRatioMin: ratio }) => (ratio < 0 ? plainNumber(ratio) : 'none')],
  ['α sluggish', ({ cycleRatioMax: ratio }) => (ratio > 0 ? plainNumber(ratio) : 'none')],
  ['cycles to 1 %', ({ settlingCyclesMax: count }) => (count === null ? 'endless' : String(count))],
  ['ramp share, %', ({ rampShare }) => range(rampShare, (share) => String(Math.round(100 * share)))],
  ['peak limit, A', ({ peakLimit_A }) => peakLimit_A && range(peakLimit_A)],
  ['out limit, A', ({ outputLimit_A }) => outputLimit_A && range(outputLimit_A)],
  ['line, mA/V', ({ lineResponse_A_per_V: line }) => line && range(line.map((value) => 1e3 * value))],
];
const symbols: Readonly<Record<Law['kind'], string>> = {
  fixed: 'S·L',
  vin: 'k',
  vout: 'p',
  'constant-q': 'x',
};
const columnWidth = Math.floor((viewWidth - labelWidth - 1) / 4);

function lawTable(laws: readonly Law[], paint: Paint): string[] {
  const line = (head: string, cells: readonly string[]) =>
    `${head.padEnd(labelWidth + 1)}${cells.map((cell) => cell.padEnd(columnWidth)).join('')}`.trimEnd();
  return [
    paint.strong(
      line(
        'law',
        laws.map(({ kind }) => kind),
      ),
    ),
    ...rows.flatMap(([head, text]) => {
      const cells = laws.map(text);
      return cells.every((cell) => cell === null)
        ? []
        : [
            line(
              head,
              cells.map((cell) => cell ?? '–'),
            ),
          ];
    }),
  ];
}

function range([low, high]: readonly number[], text = plainNumber): string {
  const [from, to] = [text(low!), text(high!)];
  return from === to ? from : `${from} … ${to}`;
}

/** Where nothing else can be given: the ramp over the sensed up slope, inputs across, outputs down. */
function neededRampRows({ neededRamp, laws }: ComparisonDocument): string[] {
  if (laws.some(({ lineResponse_A_per_V }) => lineResponse_A_per_V !== null)) return [];
  const inputs = [...new Set(neededRamp.map(({ inputVoltage_V }) => inputVoltage_V))];
  const outputs = [...new Set(neededRamp.map(({ outputVoltage_V }) => outputVoltage_V))];
  const cell = (input: number, output: number) => {
    const need = neededRamp.find(
      ({ inputVoltage_V, outputVoltage_V }) => inputVoltage_V === input && outputVoltage_V === output,
    );
    return (need === undefined ? '–' : plainNumber(need.rampOverUpSlopeRatio)).padStart(10);
  };
  const head = (text: string) => text.padEnd(labelWidth + 1);
  return [
    ...row('needed ramp', 'as a multiple of the sensed up slope, inputs across, outputs down'),
    head('') + inputs.map((input) => volts(input).padStart(10)).join(''),
    ...outputs.map(
      (output) => head(`  ${volts(output)}`) + inputs.map((input) => cell(input, output)).join(''),
    ),
  ];
}

function assumptionsText({ assumptions }: ComparisonDocument): string {
  if (assumptions.length === 0) return 'none';
  return `${assumptions.length}, each with its reason in --json`;
}
