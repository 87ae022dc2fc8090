import { readSpan } from '../values/readSpan.ts';
import { type Reading, read } from '../values/ValueFault.ts';

const bounds = [1e-3, 1e4] as const;

/** A bare number; for the fixed law, whose gain is S·L, also a voltage. */
export function readGain(text: string, law: string | null): Reading<number> {
  const number = readSpan(text, { dimension: 'number', bounds, example: '0.75' });
  if (number.ok) return read(number.value.span.from.nominal);
  if (law !== 'fixed' || number.fault.code !== 'wrong-dimension') return number;
  const voltage = readSpan(text, { dimension: 'voltage', bounds });
  return voltage.ok ? read(voltage.value.span.from.nominal) : voltage;
}
