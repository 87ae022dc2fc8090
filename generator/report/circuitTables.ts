import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Result } from '../emit/resultSchema.ts';
import { digits, figure, percent } from './figures.ts';
import { type TableView, tableView } from './table.ts';

/** Bill of materials with stress and the rating to order. */
export function partsTable({ parts }: Result): TableView {
  return tableView(
    'Parts, with stress and the rating to order',
    [
      ['part', 'code'],
      ['value', 'num'],
      ['tolerance', 'num'],
      ['series', 'short'],
      ['kind', 'short'],
      ['place', 'words'],
      ['stress and rating', 'words'],
    ],
    parts.map(({ reference, text, toleranceRatio, series, kind, role, rating, value }) => [
      reference,
      value === null ? 'generic' : text,
      toleranceRatio === null ? '–' : `± ${percent(toleranceRatio)}`,
      series ?? '–',
      kind,
      role,
      rating,
    ]),
  );
}

/** Ports of the subcircuit, to wire it up. */
export function portTable({ circuit }: SizedDesign): TableView {
  return tableView(
    `Ports of .subckt ${circuit.name}, in their order`,
    [
      ['node', 'code'],
      ['meaning', 'words'],
    ],
    circuit.ports.map(({ node, meaning }) => [node, meaning]),
  );
}

/** Currents, slopes and voltages at both ends of the input. */
export function rampTable({ ramp, region }: Result): TableView {
  const [low, high] = region.inputVoltage_V;
  const pair = (head: string, values: readonly (number | null)[], unit: string) => [
    head,
    ...[0, 1].map((end) => figure(values[end] ?? null, unit)),
  ];
  const both = (head: string, text: string) => [head, text, text];
  return tableView(
    'Ramp of the realised parts, nominal',
    [
      ['figure', 'words'],
      [`at ${digits(low, 4)}\u00a0V`, 'num'],
      [`at ${digits(high, 4)}\u00a0V`, 'num'],
    ],
    [
      pair('charging current', ramp.current_A, 'A'),
      pair('slope at the capacitor', ramp.capacitorSlope_V_per_s, 'V/s'),
      pair('slope at the comparator', ramp.comparatorSlope_V_per_s, 'V/s'),
      pair('amplitude at the capacitor', ramp.amplitude_V, 'V'),
      pair('ramp at the trip, at the comparator', ramp.rampAtTrip_V, 'V'),
      pair('current signal at the trip', ramp.signalAtTrip_V, 'V'),
      both('ramp injected per capacitor volt', percent(ramp.injectionGainRatio, 3)),
      both('current signal left by the summing resistors', percent(ramp.senseAttenuationRatio, 3)),
      both('time left for the reset', figure(ramp.resetTime_s, 's')),
    ],
  );
}

/** What else there is to know of the circuit; the spread has a plot of its own. */
export function figureTable({ circuitFigures }: Result): TableView {
  const shown = circuitFigures.filter(({ id }) => !/spread, (low|high) side/.test(id));
  const sources = [...new Set(shown.map(({ source }) => source))];
  const isOneSource = sources.length === 1;
  return tableView(
    isOneSource ? `Figures of the circuit, ${sources[0]}` : 'Figures of the circuit',
    [
      ['figure', 'words'],
      ['value', 'num'],
      ['limit', 'num'],
      ...(isOneSource ? [] : [['source', 'words'] as const]),
    ],
    shown.map(({ id, value, unit, limit, source }) => [
      id,
      figure(value, unit),
      figure(limit, unit),
      ...(isOneSource ? [] : [source]),
    ]),
  );
}
