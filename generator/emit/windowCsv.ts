import { type Cell, csvDocument } from './text/csvDocument.ts';
import type { WindowDocument } from './windowSchema.ts';

type Row = WindowDocument['rows'][number];
type Bound = Row['bound']['least'];

/** The window as a table for a data sheet; a cell stays empty where there is no figure. */
export function windowCsv({ rows }: WindowDocument): string {
  const heads = [
    'output voltage [V]',
    'frequency [Hz]',
    'least inductance [H]',
    'largest inductance [H]',
    ...['least', 'largest'].flatMap((end) => [`${end} set by`, `${end} at input [V]`, `${end} at duty`]),
  ];
  return csvDocument([
    heads.map((text) => ({ text })),
    ...rows.map(({ outputVoltage_V, frequency_Hz, inductance_H, bound }) => [
      number(outputVoltage_V),
      number(frequency_Hz),
      number(inductance_H?.[0] ?? null),
      number(inductance_H?.[1] ?? null),
      ...boundCells(bound.least),
      ...boundCells(bound.largest),
    ]),
  ]);
}

function boundCells(bound: Bound): Cell[] {
  return [
    { text: bound?.limit ?? '' },
    number(bound?.inputVoltage_V ?? null),
    number(bound?.dutyRatio ?? null),
  ];
}

function number(value: number | null): Cell {
  return value === null ? { text: '' } : { number: value };
}
