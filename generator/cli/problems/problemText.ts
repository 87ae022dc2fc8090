import type { Problem } from '../../base/Problem.ts';
import type { Paint } from '../terminal/paint.ts';
import { printable } from './printable.ts';

/**
 * A problem for people: what and where on the first line, how to mend it on the second.
 *
 *   error: spec.yaml:3:8 input: expected a voltage, such as 12 V, received 12
 *          give the unit: 12 V
 */
export function problemText(problem: Problem, paint: Paint): string {
  const { severity, expected, received, fix } = problem;
  const word = severity === 'error' ? paint.bad(`${severity}:`) : paint.caution(`${severity}:`);
  const where = printable(placeText(problem));
  const what = `expected ${printable(expected)}, received ${printable(received)}`;
  const indent = ' '.repeat(severity.length + 2);
  return `${word} ${where === '' ? '' : `${where}: `}${what}\n${fix === '' ? '' : `${indent}${printable(fix)}\n`}`;
}

function placeText({ key, place }: Problem): string {
  if (place === null) return key ?? '';
  const { path, line, column } = place;
  const position = [path === '-' ? 'stdin' : path, line, column].filter((part) => part !== null).join(':');
  return key === null || (line === null && path.startsWith('--')) ? position : `${position} ${key}`;
}
