import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Result } from '../emit/resultSchema.ts';
import type { RegionCut } from '../region/OperatingRegion.ts';
import { writeQuantity, writeSpan } from '../spec/values/writeSpan.ts';
import { digits, figure, interval, percent, plainNumber, typeset, volts } from './figures.ts';
import { type TableView, tableView } from './table.ts';

/** What was asked for, normalised. */
export function requirementTable({ specification: spec }: SizedDesign['request']): TableView {
  const inductance = spec.inductance?.kind === 'value' ? spec.inductance : null;
  const rows: (readonly [string, string | null])[] = [
    ['converter', spec.converter],
    ['input voltage', writeSpan(spec.input_V, 'voltage')],
    ['output voltage', spec.output_V?.map((span) => writeSpan(span, 'voltage')).join('; ') ?? 'not known'],
    ['inductance', inductanceText(spec.inductance)],
    [
      'inductance at the peak limit',
      inductance?.atPeakLimit_H ? writeQuantity(inductance.atPeakLimit_H, 'inductance') : null,
    ],
    ['switching frequency', writeSpan(spec.frequency_Hz, 'frequency')],
    ['maximum duty', percent(spec.maximumDutyRatio, 4)],
    ['load', spec.load_A ? writeSpan(spec.load_A, 'current') : 'not known'],
    ['rectifier drop', writeQuantity(spec.rectifierDrop_V, 'voltage')],
    ['losses', lossesText(spec.losses)],
    ['minimum on-time', writeQuantity(spec.minimumOnTime_s, 'time')],
    ['sense gain', writeQuantity(spec.senseGain_V_per_A, 'gain')],
    ['supply of the ramp circuit', writeQuantity(spec.ramp.supply_V, 'voltage')],
    [
      'goal of the damping index',
      `${plainNumber(spec.goal.dampingIndex)}, ceiling ${plainNumber(spec.goal.ceilingIndex)}`,
    ],
  ];
  return tableView(
    'Requirements',
    [
      ['requirement', 'words'],
      ['value', 'words'],
    ],
    rows.flatMap(([name, text]) => (text === null ? [] : [[name, text]])),
  );
}

function inductanceText(inductance: SizedDesign['request']['specification']['inductance']): string {
  if (inductance === null) return 'not known';
  if (inductance.kind === 'value') return writeSpan(inductance.value_H, 'inductance');
  const { rippleRatio, of_A } = inductance;
  return `for a ripple of ${writeSpan(rippleRatio, 'ratio')} of ${writeQuantity(of_A, 'current')}`;
}

function lossesText(losses: SizedDesign['request']['specification']['losses']): string {
  if (losses === null) return 'not given';
  const parts = [
    ['switch', losses.switch_ohm],
    ['winding', losses.winding_ohm],
    ['rectifier', losses.rectifier_ohm],
  ] as const;
  return parts.map(([name, quantity]) => `${name} ${writeQuantity(quantity, 'resistance')}`).join(', ');
}

/** The region that is left, in sentences. */
export function regionSentences({
  region,
  request,
}: Pick<SizedDesign, 'region' | 'request'>): readonly string[] {
  const { inputVoltage_V, outputVoltage_V, duty } = region;
  const input = interval(volts(inputVoltage_V.low), volts(inputVoltage_V.high));
  const duties = interval(percent(duty.low, 3), percent(duty.high, 3));
  const output =
    outputVoltage_V === null
      ? `The output is not known: every duty from ${duties} is taken as possible at every input from ${input}.`
      : `Input ${input}, output ${interval(volts(outputVoltage_V.low), volts(outputVoltage_V.high))}, duty ${duties}.`;
  const load =
    request.specification.load_A === null ? ' Continuous conduction is taken; the load is not known.' : '';
  return [`${output}${load}`, ...region.cuts.map(cutSentence)];
}

function cutSentence({
  reason,
  inputVoltage_V,
  outputVoltage_V,
  limitDuty,
  peakCurrent_A,
}: RegionCut): string {
  const from = interval(volts(inputVoltage_V[0]), volts(inputVoltage_V[1]));
  const output =
    outputVoltage_V === null
      ? ''
      : ` for outputs from ${interval(volts(outputVoltage_V[0]), volts(outputVoltage_V[1]))}`;
  const peak = peakCurrent_A === null ? '' : ` Peak current there: ${figure(peakCurrent_A, 'A')}.`;
  const what = reason === 'minimum on-time' ? 'pulses are skipped' : 'the output is not reached everywhere';
  return `Cut off by ${reason} (duty ${percent(limitDuty, 3)}), inputs from ${from}${output}: ${what}.${peak}`;
}

/** What varies from unit to unit, and how far. */
export function cornerTable({ corners }: Result): TableView {
  return tableView(
    'Corners: what varies from unit to unit',
    [
      ['parameter', 'words'],
      ['low', 'num'],
      ['high', 'num'],
    ],
    corners.map(({ parameter, low, high, unit }) => [parameter, figure(low, unit), figure(high, unit)]),
  );
}

/** Assumptions and waivers, each with a field to sign. */
export function assumptionTable({ assumptions }: Pick<Result, 'assumptions'>): TableView {
  return tableView(
    'Assumptions, to be accepted or waived one by one',
    [
      ['key', 'code'],
      ['taken as', 'short'],
      ['reason', 'words'],
      ['initials', 'write'],
    ],
    assumptions.map(({ key, value, unit, reason }) => [key, assumedText(value, unit), reason, '']),
  );
}

function assumedText(value: number | string | null, unit: string): string {
  if (value === null) return 'not known';
  if (typeof value === 'string') return typeset(value);
  return unit === '' ? digits(value, 4) : figure(value, unit);
}
