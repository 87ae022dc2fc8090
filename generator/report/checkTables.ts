import type { DeckCheck, Result } from '../emit/resultSchema.ts';
import { digits, figure, volts } from './figures.ts';
import { errorText, limitText, worstCheck } from './summary.ts';
import { type TableView, tableView } from './table.ts';

/** Every figure that was read from a waveform; the one that comes nearest to its limit in bold. */
export function simulationTable({ simulation }: Result): TableView | null {
  if (simulation === null) return null;
  const { decks } = simulation;
  const worst = worstCheck(decks);
  return tableView(
    'Simulated against predicted; the prediction comes from the part values, nothing is fitted',
    [
      ['deck', 'code'],
      ['quantity', 'words'],
      ['input', 'num'],
      ['output', 'num'],
      ['predicted', 'num'],
      ['measured', 'num'],
      ['error', 'num'],
      ['limit', 'num'],
      ['verdict', 'short'],
    ],
    decks.map((check) => [
      check.file,
      check.quantity,
      volts(check.at.inputVoltage_V),
      check.at.outputVoltage_V === null ? '–' : volts(check.at.outputVoltage_V),
      checkFigure(check.predicted, check),
      checkFigure(check.measured, check),
      errorText(check),
      limitText(check),
      check.passed ? 'agrees' : 'disagrees',
    ]),
    (index) => `${decks[index]!.passed ? '' : 'bad'} ${decks[index] === worst ? 'worst' : ''}`.trim(),
  );
}

function checkFigure(value: number | null, { unit }: DeckCheck): string {
  return value !== null && unit === '' ? digits(value, 3) : figure(value, unit, 4);
}

/** Every rule that applies, the failing ones first. */
export function ruleTable({ rules }: Result): TableView {
  const sorted = [...rules].sort((a, b) => Number(a.passed) - Number(b.passed));
  return tableView(
    'Every rule that applies; those that fail first',
    [
      ['rule', 'code'],
      ['severity', 'short'],
      ['measured', 'num'],
      ['limit', 'num'],
      ['verdict', 'short'],
      ['reason and source', 'words'],
    ],
    sorted.map(({ id, severity, measured, limit, unit, passed, reason, source }) => [
      id,
      severity,
      figure(measured, unit),
      figure(limit, unit),
      passed ? 'passes' : 'fails',
      `${reason} Source: ${source}.`,
    ]),
    (index) => (sorted[index]!.passed ? '' : sorted[index]!.severity === 'error' ? 'bad' : 'caution'),
  );
}
