import type { Comparison } from '../../loop/Comparison.ts';
import type { ComparedLaw } from '../../loop/compareLaws.ts';
import { figure, interval, percent, plainNumber, volts } from '../figures.ts';
import { capital } from '../lawComparison.ts';
import { gainText, lawName } from '../lawNames.ts';
import { type TableView, tableView } from '../table.ts';

/** The same figures for every law, each at its least gain. */
export function lawTable({ laws, verdict }: Comparison): TableView {
  const row = (head: string, cell: (law: ComparedLaw) => string) => [head, ...laws.map(cell)];
  const span = (unit: string, pick: (law: ComparedLaw) => { low: number; high: number } | null) => {
    return (law: ComparedLaw) => {
      const found = pick(law);
      return found === null ? '–' : interval(figure(found.low, unit), figure(found.high, unit));
    };
  };
  const rows = [
    row('least gain that the worst unit must deliver', (law) => gainText(law, law.required.gain)),
    row('damping index x', ({ extremes: { min, max } }) =>
      interval(plainNumber(min.dampingIndex), plainNumber(max.dampingIndex)),
    ),
    row('least x at', ({ extremes: { min } }) => placeText(min.at)),
    row('greatest x at', ({ extremes: { max } }) => placeText(max.at)),
    row('ringing, most negative α', ({ cycleRatio: { low } }) => (low < 0 ? plainNumber(low) : 'none')),
    row('sluggish, most positive α', ({ cycleRatio: { high } }) => (high > 0 ? plainNumber(high) : 'none')),
    row('cycles until 1 % is left', ({ settlingCyclesMax }) => String(settlingCyclesMax ?? 'endless')),
    row('greatest Q at half the switching frequency', ({ dampingQMax }) =>
      dampingQMax === null ? '–' : plainNumber(dampingQMax),
    ),
    row("ramp's share of the comparator signal", ({ rampShare: { low, high } }) =>
      interval(percent(low), percent(high)),
    ),
    row(
      'peak limit',
      span('A', ({ peakLimit_A }) => peakLimit_A),
    ),
    row(
      'output limit',
      span('A', ({ outputLimit_A }) => outputLimit_A),
    ),
    row(
      'line response',
      span('A/V', ({ lineResponse_A_per_V }) => lineResponse_A_per_V),
    ),
  ];
  return tableView(
    'Every law over the same region and corners, at the least gain that meets the goal',
    [
      ['figure', 'words'],
      ...laws.map(({ law }): [string, 'num'] => [
        `${capital(lawName(law.kind))}${law.kind === verdict.preferred ? ', preferred' : ''}`,
        'num',
      ]),
    ],
    rows.filter(([, ...cells]) => cells.some((cell) => cell !== '–')),
  );
}

function placeText(at: { readonly inputVoltage_V: number; readonly outputVoltage_V: number }): string {
  return `${volts(at.inputVoltage_V)} in, ${volts(Math.max(0, at.outputVoltage_V))} out`;
}

/** Needed ramp over the up slope: inputs across, outputs down. */
export function neededRampTable({ neededRamp }: Comparison): TableView {
  const inputs = [...new Set(neededRamp.map(({ inputVoltage_V }) => inputVoltage_V))];
  const outputs = [...new Set(neededRamp.map(({ outputVoltage_V }) => outputVoltage_V))].sort(
    (a, b) => a - b,
  );
  const cell = (input: number, output: number) => {
    const found = neededRamp.find(
      ({ inputVoltage_V, outputVoltage_V }) => inputVoltage_V === input && outputVoltage_V === output,
    );
    if (found === undefined) return '–';
    return found.rampOverUpSlope === 0 ? '0' : plainNumber(found.rampOverUpSlope);
  };
  return tableView(
    'Needed ma/m1, input voltage across, output voltage down',
    [['output', 'short'], ...inputs.map((input): [string, 'num'] => [`${volts(input)} in`, 'num'])],
    outputs.map((output) => [`${volts(output)} out`, ...inputs.map((input) => cell(input, output))]),
  );
}
