import type { WindowDocument } from '../../emit/windowSchema.ts';
import type { Specification } from '../../spec/Specification.ts';
import { printable } from '../problems/printable.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber, volts } from './figures.ts';
import { oneLine, row, rule } from './table.ts';

export interface WindowViewOptions {
  readonly specification: Specification;
  /** Where the files are, or null: none were written. */
  readonly directory: string | null;
  readonly paint: Paint;
}

/** The table for a data sheet, and what it holds for. */
export function windowView(
  { rows }: WindowDocument,
  { specification, directory, paint }: WindowViewOptions,
): string {
  const { title, goal } = specification;
  const lines = [
    ...(title === '' ? [] : [paint.strong(oneLine(printable(title)))]),
    ...row('window', verdict(rows), paint.strong),
    ...row(
      'holds for',
      `x from ${plainNumber(goal.dampingIndex)} (goal) to ${plainNumber(goal.ceilingIndex)} (ceiling) over the whole input range; the inductance that a part really has at the trip current: leave room for its tolerance and saturation`,
    ),
    ...row('ramp', rampText(specification)),
    rule,
    paint.strong(line(['output', 'frequency', 'least', 'largest', 'set by, at input and duty'])),
    ...rows.map(tableLine),
    ...(directory === null
      ? []
      : [rule, ...row('files', `window.csv, window.json in ${printable(directory)}`)]),
  ];
  return `${lines.join('\n')}\n`;
}

type Row = WindowDocument['rows'][number];

function verdict(rows: readonly Row[]): string {
  const open = rows.flatMap(({ inductance_H }) => (inductance_H === null ? [] : [inductance_H]));
  const closed = rows.length - open.length;
  const none =
    closed === 0
      ? ''
      : closed === rows.length
        ? 'no inductance fits at any row'
        : `none fits at ${closed} of ${rows.length} rows`;
  if (open.length === 0) return `${none}: the ramp spreads, or the region asks, too much`;
  const least = Math.max(...open.map(([low]) => low));
  const tops = open.flatMap(([, high]) => (high === null ? [] : [high]));
  const most = tops.length === 0 ? null : Math.min(...tops);
  const lead = none === '' ? '' : `${none}; `;
  if (most !== null && least > most)
    return `${lead}no one inductance fits all ${none === '' ? '' : 'other '}rows: choose by row`;
  const upTo = most === null ? 'upwards' : `to ${figure(most, 'H')}`;
  return `${lead}${figure(least, 'H')} ${upTo} fits ${none === '' ? 'every row' : 'every other row'}`;
}

function rampText({ ramp, controller, inductance }: Specification): string {
  const parts: string[] = [];
  if (ramp.gain !== null && inductance?.kind === 'value') {
    const unit = ramp.law === 'fixed' ? 'V' : '';
    parts.push(
      `${ramp.law}, gain ${figure(ramp.gain, unit)} at ${figure(inductance.value_H.from.nominal, 'H')}`,
    );
  }
  const internal = controller?.internalRamp_V_per_s;
  if (internal && internal.high > 0) {
    const spread =
      internal.low === internal.high
        ? ''
        : ` (${figure(internal.low, 'V/s')} to ${figure(internal.high, 'V/s')})`;
    parts.push(`internal, ${figure(internal.nominal, 'V/s')}${spread}`);
  }
  const follows = ramp.follows === 'frequency' ? '; it follows the frequency' : '';
  return `${parts.join('; and ')}${follows}`;
}

const widths = [10, 11, 10, 10];

function line(cells: readonly string[]): string {
  return cells
    .map((cell, at) => cell.padEnd(widths[at] ?? 0))
    .join('')
    .trimEnd();
}

function tableLine({ outputVoltage_V, frequency_Hz, inductance_H, bound }: Row): string {
  const head = [outputVoltage_V === null ? 'any' : volts(outputVoltage_V), figure(frequency_Hz, 'Hz')];
  if (inductance_H !== null)
    return line([
      ...head,
      inductance_H[0] === 0 ? 'any' : figure(inductance_H[0], 'H'),
      inductance_H[1] === null ? 'any' : figure(inductance_H[1], 'H'),
      boundsText(bound),
    ]);
  if (bound.least === null && bound.largest === null)
    return line([...head, 'none', '', 'output out of reach']);
  const needed = bound.least === null ? '' : `goal asks ${amount(bound.least)} ${at(bound.least)}`;
  const allowed = bound.largest === null ? '' : `ceiling allows ${amount(bound.largest)}`;
  return line([...head, 'none', `${needed}, ${allowed}`]);
}

type Bound = NonNullable<Row['bound']['least']>;

/** Both at one place, or each at its own. */
function boundsText({ least, largest }: Row['bound']): string {
  if (least !== null && largest !== null && at(least) === at(largest)) return `both at ${at(least)}`;
  return [least, largest].flatMap((end) => (end === null ? [] : [`${end.limit} ${at(end)}`])).join(', ');
}

function at({ inputVoltage_V, dutyRatio }: Bound): string {
  return `${volts(Number(inputVoltage_V.toPrecision(3)))} ${percent(dutyRatio)}`;
}

function amount({ inductance_H }: Bound): string {
  return inductance_H === null ? 'more than any' : figure(inductance_H, 'H');
}
