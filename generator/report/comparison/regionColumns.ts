import { outputAtDuty } from '../../region/dutyInverse.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from '../../region/OperatingRegion.ts';

/** What varies besides input and output: one unit at one load. */
type Condition = Pick<RegionPoint, 'loadCurrent_A' | 'drops' | 'outputIndex'>;

/** The region at one input voltage, from the least output to the greatest. */
export interface Column {
  readonly inputVoltage_V: number;
  readonly points: readonly RegionPoint[];
}

/** Every unit and load among the vertices of a region, each once. */
export function conditionsOf({ vertices }: OperatingRegion): readonly Condition[] {
  const distinct = new Map(
    vertices.map(({ loadCurrent_A, drops, outputIndex }) => [
      JSON.stringify([loadCurrent_A, drops, outputIndex]),
      { loadCurrent_A, drops, outputIndex },
    ]),
  );
  return [...distinct.values()];
}

/** The one with the least losses, which can do most and is damped most. */
export function leastLosses(conditions: readonly Condition[]): Condition {
  const lost = ({ loadCurrent_A, drops }: Condition) =>
    drops.rectifierDrop_V + loadCurrent_A * (drops.switch_ohm + drops.winding_ohm + drops.rectifier_ohm);
  return conditions.reduce((a, b) => (lost(b) < lost(a) ? b : a));
}

/** Inputs close enough for a curve, kinks of the region among them. */
export function inputsOf(
  { inputVoltage_V: { low, high }, vertices }: OperatingRegion,
  steps: number,
): number[] {
  const even = Array.from({ length: steps + 1 }, (_, step) => low + ((high - low) * step) / steps);
  const kinks = vertices.map((vertex) => vertex.inputVoltage_V);
  return [...new Set([...even, ...kinks])].sort((a, b) => a - b);
}

/** A region at one condition, column by column; inputs at which it has no output are left out. */
export function regionColumns(
  region: OperatingRegion,
  condition: Condition,
  { inputs, rows }: { readonly inputs: readonly number[]; readonly rows: number },
): readonly Column[] {
  return inputs.flatMap((inputVoltage_V) => {
    const [low, high] = outputsAt(region, condition, inputVoltage_V);
    if (low > high * (1 + 1e-9)) return [];
    const count = high - low <= 1e-9 * high ? 0 : rows;
    const points = Array.from({ length: count + 1 }, (_, row) =>
      pointAt(region, condition, inputVoltage_V, low + (count === 0 ? 0 : ((high - low) * row) / count)),
    );
    return [{ inputVoltage_V, points }];
  });
}

function pointAt(
  { stage }: OperatingRegion,
  { loadCurrent_A, drops, outputIndex }: Condition,
  inputVoltage_V: number,
  outputVoltage_V: number,
): RegionPoint {
  return regionPoint(stage, { inputVoltage_V, outputVoltage_V, loadCurrent_A }, drops, outputIndex);
}

/** Outputs asked for and within the duties. */
function outputsAt(region: OperatingRegion, condition: Condition, inputVoltage_V: number): [number, number] {
  const { stage, duty, vertices } = region;
  const own = vertices
    .filter(({ outputIndex }) => outputIndex === condition.outputIndex)
    .map(({ outputVoltage_V }) => outputVoltage_V);
  const at = { ...condition, inputVoltage_V, outputVoltage_V: 0 };
  const reach = (share: number) => outputAtDuty(stage, at, condition.drops, share);
  return [Math.max(Math.min(...own), reach(duty.low)), Math.min(Math.max(...own), reach(duty.high))];
}
