import type { RuleOutcome } from '../../emit/resultSchema.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure } from './figures.ts';
import { row } from './table.ts';

/** More would push the rest off the screen. */
const mostRows = 3;

const words = { error: 'failed', warning: 'warning', note: 'note' } as const;

/** What to look at before the design is used: every rule that has not passed, the gravest first. */
export function outcomeRows(rules: readonly RuleOutcome[], paint: Paint): string[] {
  const failing = (['error', 'warning', 'note'] as const).flatMap((severity) =>
    rules.filter((outcome) => outcome.severity === severity && !outcome.passed),
  );
  if (failing.length === 0) return row('rules', `all ${rules.length} pass`);
  const left = failing.length - mostRows;
  return [
    ...failing.slice(0, mostRows).flatMap((outcome) => outcomeRow(outcome, paint)),
    ...(left > 0 ? row('', `… and ${left} more`) : []),
    ...row('', `why, and what to do: counterslope rules explain ${failing[0]!.id}`),
  ];
}

function outcomeRow({ id, severity, measured, limit, unit }: RuleOutcome, paint: Paint): string[] {
  const colour = severity === 'error' ? paint.bad : paint.caution;
  return row(words[severity], `rule ${id}: ${figure(measured, unit)}, limit ${figure(limit, unit)}`, colour);
}
