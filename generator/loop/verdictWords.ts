import { engineering } from '../base/engineering.ts';
import type { LawKind } from '../spec/Specification.ts';
import type { ComparedLaw } from './compareLaws.ts';

/** What each law has to sense, the reason to stay with a simpler one. */
export const senses: Readonly<Record<LawKind, string>> = {
  fixed: 'nothing',
  vin: 'the input voltage',
  vout: 'the output voltage',
  'constant-q': 'the input and the output voltage',
};

export function index(value: number): string {
  return value.toPrecision(4);
}

/** `at 6 V in, 5 V out`, of the largest damping index. */
export function placeOfMax({ extremes }: ComparedLaw): string {
  const { inputVoltage_V, outputVoltage_V } = extremes.max.at;
  return `at ${volts(inputVoltage_V)} in, ${volts(Math.max(0, outputVoltage_V))} out`;
}

/** A value that somebody chose: `5 V`, not `5.00 V`. */
export function volts(value: number): string {
  return `${Number(value.toPrecision(3))} V`;
}

export function henries(value: number): string {
  return engineering(value, 'H').replace(/\.?0+(?= )/, '');
}

export function cycles({ settlingCyclesMax: count }: ComparedLaw): string {
  if (count === null) return 'no number of cycles';
  return count === 1 ? '1 cycle' : `${count} cycles`;
}

/** `x between 0.8183 and 0.9697` */
export function indexSpan({ extremes: { min, max } }: ComparedLaw): string {
  const [least, most] = [index(min.dampingIndex), index(max.dampingIndex)];
  return least === most ? `x at ${least}` : `x between ${least} and ${most}`;
}

/** `-0.222 to -0.031` */
export function ratioSpan({ cycleRatio: { low, high } }: ComparedLaw): string {
  const [from, to] = [low.toFixed(3), high.toFixed(3)];
  return from === to ? from : `${from} to ${to}`;
}

/** Closer than this, relative, two figures are one. */
const alike = 1e-6;

export function isAlike(a: number, b: number): boolean {
  return Math.abs(a - b) <= alike * Math.max(Math.abs(a), Math.abs(b));
}

export function ampereSpan({ low, high }: { readonly low: number; readonly high: number }): string {
  const [from, to] = [engineering(low, 'A', 3), engineering(high, 'A', 3)];
  return from === to ? `${from} throughout` : `${from} to ${to}`;
}
