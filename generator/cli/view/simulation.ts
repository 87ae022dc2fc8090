import type { DeckCheck, Result, Simulation } from '../../emit/resultSchema.ts';
import { printable } from '../problems/printable.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber } from './figures.ts';
import { row, together } from './table.ts';

/** Whether the waveforms agree with the sizing, and where they come closest to the limit. */
export function simulationRow(simulation: Simulation | null, paint: Paint): string[] {
  if (simulation === null) return row('simulation', 'not run');
  const { decks, passed, engine, version } = simulation;
  const by = `${engine} engine ${version}`;
  const worst = worstOf(decks);
  if (worst === null) return row('failed', `simulation: nothing was measured (${by})`, paint.bad);
  if (passed) {
    return row(
      'simulation',
      `agrees in ${decks.length} figures; nearest to its limit: ${deviation(worst)} (${by})`,
    );
  }
  const failed = decks.filter((check) => !check.passed).length;
  return row(
    'failed',
    `simulation: ${failed} of ${decks.length} figures; worst: ${deviation(worst)} (${by})`,
    paint.bad,
  );
}

/** Every figure that was measured; a failed line starts with the word. */
export function simulationView(
  { simulation }: Result,
  { directory, paint }: { readonly directory: string; readonly paint: Paint },
): string {
  const head = row('folder', printable(directory));
  const checks = (simulation?.decks ?? []).flatMap((check) =>
    check.passed ? row('agrees', checkText(check)) : row('failed', checkText(check), paint.bad),
  );
  return `${[...head, ...checks, ...simulationRow(simulation, paint)].join('\n')}\n`;
}

function checkText(check: DeckCheck): string {
  const { file, predicted, measured, unit, at } = check;
  const where = `${figure(at.inputVoltage_V, 'V')}${at.outputVoltage_V === null ? '' : ` to ${figure(at.outputVoltage_V, 'V')}`}`;
  const values = `${figure(measured, unit)} measured, ${figure(predicted, unit)} predicted`;
  return `${file} ${check.quantity} at ${together(where)}: ${together(values)}`;
}

function deviation(check: DeckCheck): string {
  const { errorRatio, limit, quantity, file, unit } = check;
  // What has no unit is compared by plain difference: near zero a ratio would mean nothing.
  const amount = unit === '' || unit === '1' ? plainNumber : percent;
  const error = errorRatio === null ? 'no figure' : amount(errorRatio);
  return `${quantity} in ${file} ${together(`off by ${error}, limit ${amount(limit)}`)}`;
}

function worstOf(decks: readonly DeckCheck[]): DeckCheck | null {
  return decks.reduce<DeckCheck | null>(
    (worst, check) => (worst === null || nearness(check) > nearness(worst) ? check : worst),
    null,
  );
}

/** 1 at the limit; a figure that is missing is beyond any. */
function nearness({ errorRatio, limit }: DeckCheck): number {
  return errorRatio === null ? Number.POSITIVE_INFINITY : Math.abs(errorRatio) / limit;
}
