import { isOpen, type WindowBound } from '../loop/inductanceWindow.ts';
import type { Window, WindowRow } from '../loop/Window.ts';
import type { WindowDocument } from './windowSchema.ts';

/** A window in the shape of `window --json`. */
export function windowDocument({ rows }: Window): WindowDocument {
  return { schema: 'counterslope/window/1', rows: rows.map(rowDocument) };
}

type RowDocument = WindowDocument['rows'][number];

function rowDocument({ outputVoltage_V, frequency_Hz, window }: WindowRow): RowDocument {
  const [least, largest] = [window?.least ?? null, window?.largest ?? null];
  return {
    outputVoltage_V,
    frequency_Hz,
    inductance_H:
      window !== null && isOpen(window) ? [least?.inductance_H ?? 0, largest?.inductance_H ?? null] : null,
    bound: { least: boundDocument(least), largest: boundDocument(largest) },
  };
}

function boundDocument(bound: WindowBound | null): RowDocument['bound']['least'] {
  if (bound === null) return null;
  const { limit, inductance_H, at } = bound;
  return {
    limit,
    inductance_H: Number.isFinite(inductance_H) ? Math.max(0, inductance_H) : null,
    inputVoltage_V: at.inputVoltage_V,
    outputVoltage_V: at.outputVoltage_V,
    dutyRatio: at.duty,
  };
}
