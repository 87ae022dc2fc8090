import type { DeckCheck, Result, Simulation } from '../../emit/resultSchema.ts';
import { printable } from '../problems/printable.ts';
import type { Paint } from '../terminal/paint.ts';
import { figure, percent, plainNumber, volts } from './figures.ts';
import { row, together } from './table.ts';

/** Whether the waveforms agree with the sizing, and where they come closest to the limit. */
export function simulationRow(simulation: Simulation | null, paint: Paint): string[] {
  if (simulation === null) return row('simulation', 'not run');
  const { decks, passed, engine, version } = simulation;
  const worst = worstOf(decks);
  const by = `${engine} engine ${version}`;
  if (worst === null) return row('failed', `simulation: nothing was measured; ${by}`, paint.bad);
  const extent = `largest deviation ${deviation(worst)}; ${by}`;
  if (passed) return row('simulation', `agrees in ${decks.length} figures; ${extent}`);
  const failed = decks.filter((check) => !check.passed).length;
  return row('failed', `simulation: ${failed} of ${decks.length} figures disagree; ${extent}`, paint.bad);
}

/** Every figure that was measured, deck by deck; a failed line starts with the word. */
export function simulationView(
  { simulation }: Result,
  { directory, paint }: { readonly directory: string; readonly paint: Paint },
): string {
  const checks = simulation?.decks ?? [];
  const files = [...new Set(checks.map(({ file }) => file))];
  const lines = [
    ...row('folder', printable(directory)),
    ...files.flatMap((file) => [
      paint.strong(file),
      ...checks.filter((check) => check.file === file).flatMap((check) => checkRow(check, paint)),
    ]),
    ...simulationRow(simulation, paint),
  ];
  return `${lines.join('\n')}\n`;
}

function checkRow({ quantity, predicted, measured, unit, at, passed }: DeckCheck, paint: Paint): string[] {
  const output = at.outputVoltage_V === null ? '' : `, ${volts(at.outputVoltage_V)} out`;
  const where = together(`${volts(at.inputVoltage_V)} in${output}`);
  const values = together(`${figure(measured, unit)}, predicted ${figure(predicted, unit)}`);
  const text = `${quantity} at ${where}: ${values}`;
  return passed ? row('agrees', text) : row('failed', text, paint.bad);
}

function deviation({ errorRatio, limit, quantity, file, unit }: DeckCheck): string {
  // What has no unit is compared by plain difference: near zero a ratio would mean nothing.
  const amount = unit === '' || unit === '1' ? plainNumber : percent;
  const extent = errorRatio === null ? 'not to be told' : amount(errorRatio);
  return `${together(`${extent} (limit ${amount(limit)})`)}, ${quantity} in ${file}`;
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
