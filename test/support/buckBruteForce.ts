import type { Quantity } from '../../generator/base/Quantity.ts';
import type { Specification } from '../../generator/spec/Specification.ts';

/**
 * A buck by its equations, and the extremes of its damping index by search. Shares no code with the
 * generator, the specification's types apart.
 *
 *   up = Vin − Vout − I(Rsw + Rw),  down = Vout + Vd + I(Rrect + Rw),  x = (up + Se/Ri·L)/(up + down)
 */
export interface Conditions {
  readonly input: number;
  readonly output: number;
  readonly load: number;
  readonly drop: number;
  /** Where between low and high the resistances are. */
  readonly heat: number;
}

export function buckVoltages(specification: Specification, at: Conditions) {
  const at_ohm = (quantity?: Quantity) =>
    quantity ? quantity.low + at.heat * (quantity.high - quantity.low) : 0;
  const { losses } = specification;
  const [sw, winding, rectifier] = [losses?.switch_ohm, losses?.winding_ohm, losses?.rectifier_ohm].map(
    (quantity) => at_ohm(quantity),
  );
  const up = at.input - at.output - at.load * (sw! + winding!);
  const down = at.output + at.drop + at.load * (rectifier! + winding!);
  return { up, down, duty: down / (up + down) };
}

/** What a unit may have: ends of everything, and whatever lies between. */
export interface RegionBox {
  readonly input: readonly [number, number];
  readonly load: readonly [number, number];
  readonly drop: readonly [number, number];
  readonly duty: readonly [number, number];
  /** Null: every duty. */
  readonly output: readonly [number, number] | null;
}

export function regionBoxes(specification: Specification): RegionBox[] {
  const { input_V, output_V, load_A, rectifierDrop_V, minimumOnTime_s, frequency_Hz } = specification;
  const box = {
    input: [input_V.from.low, input_V.to.high] as const,
    load: load_A ? ([load_A.from.low, load_A.to.high] as const) : ([0, 0] as const),
    drop: [rectifierDrop_V.low, rectifierDrop_V.high] as const,
    duty: [minimumOnTime_s.high * frequency_Hz.to.high, specification.maximumDutyRatio] as const,
  };
  if (output_V === null) return [{ ...box, output: null }];
  return output_V.map(({ from, to }) => ({ ...box, output: [from.low, to.high] as const }));
}

/** A duty or an output held, the input running over what the other limits leave; null where nothing is left. */
type Face = { readonly duty: number } | { readonly output: number };

function inputRange(specification: Specification, box: RegionBox, face: Face, free: Free): Ends | null {
  const { outputAt, inputAt } = dutyLines(specification, free);
  const [dutyLow, dutyHigh] = box.duty;
  const inside = (ends: Ends): Ends | null => {
    const range: Ends = [Math.max(box.input[0], ends[0]), Math.min(box.input[1], ends[1])];
    return range[0] <= range[1] ? range : null;
  };
  if ('duty' in face) {
    if (box.output === null) return box.input;
    if (face.duty === 0) return null;
    return inside([inputAt(box.output[0], face.duty), inputAt(box.output[1], face.duty)]);
  }
  const most = dutyLow > 0 ? inputAt(face.output, dutyLow) : Number.POSITIVE_INFINITY;
  const range = inside([inputAt(face.output, dutyHigh), most]);
  return range !== null && outputAt(range[0], dutyHigh) >= face.output * (1 - 1e-12) ? range : null;
}

type Ends = readonly [number, number];
type Free = Pick<Conditions, 'load' | 'drop' | 'heat'>;

const lerp = ([low, high]: Ends, share: number) => low + share * (high - low);

/** At duty D: Vout = D·U − Vd − I(Rrect + Rw) with U = Vin + offset; both from the equations at zero. */
function dutyLines(specification: Specification, free: Free) {
  const zero = buckVoltages(specification, { input: 0, output: 0, ...free });
  const offset = zero.up + zero.down;
  return {
    outputAt: (input: number, duty: number) => duty * (input + offset) - zero.down,
    inputAt: (output: number, duty: number) => (output + zero.down) / duty - offset,
  };
}

/**
 * A point of the region from five shares in 0 … 1; null where the region has none for them.
 *
 * Order: input, output (or duty), load, drop, heat. Input and output are scaled to what the duty limits
 * leave, so that the ends of every share lie on the region's boundary.
 */
export function pointAt(
  specification: Specification,
  box: RegionBox,
  shares: readonly [number, number, number, number, number],
): Conditions | null {
  const [inputShare, outputShare, loadShare, dropShare, heat] = shares;
  const free = { load: lerp(box.load, loadShare), drop: lerp(box.drop, dropShare), heat };
  const { outputAt, inputAt } = dutyLines(specification, free);
  if (box.output === null) {
    const input = lerp(box.input, inputShare);
    return { input, output: outputAt(input, lerp(box.duty, outputShare)), ...free };
  }
  const least = Math.max(box.input[0], inputAt(box.output[0], box.duty[1]));
  const most = Math.min(box.input[1], box.duty[0] > 0 ? inputAt(box.output[1], box.duty[0]) : box.input[1]);
  if (least > most) return null;
  const input = lerp([least, most], inputShare);
  const low = Math.max(box.output[0], outputAt(input, box.duty[0]));
  const high = Math.min(box.output[1], outputAt(input, box.duty[1]));
  return { input, output: lerp([low, Math.max(low, high)], outputShare), ...free };
}

/**
 * Least and greatest of a figure that is monotone in the output, so extreme on an end of outputs or duties.
 *
 * Each such face is searched over input, load, drop and heat by grids that close in on the best point.
 */
export function searchedExtremes(
  specification: Specification,
  figure: (at: Conditions) => number,
  sense: 'least' | 'greatest',
): number {
  const sign = sense === 'least' ? 1 : -1;
  const faces = regionBoxes(specification).flatMap((box) => {
    const ends: Face[] = [
      ...box.duty.map((duty) => ({ duty })),
      ...(box.output ?? []).map((output) => ({ output })),
    ];
    return ends.map((face) => searchFace(specification, box, face, (at) => sign * figure(at)));
  });
  return sign * Math.min(...faces);
}

function searchFace(
  specification: Specification,
  box: RegionBox,
  face: Face,
  figure: (at: Conditions) => number,
): number {
  const evaluate = ([inputShare, loadShare, dropShare, heat]: readonly number[]) => {
    const free = { load: lerp(box.load, loadShare!), drop: lerp(box.drop, dropShare!), heat: heat! };
    const range = inputRange(specification, box, face, free);
    if (range === null) return Number.POSITIVE_INFINITY;
    const input = lerp(range, inputShare!);
    const output = 'output' in face ? face.output : dutyLines(specification, free).outputAt(input, face.duty);
    return figure({ input, output, ...free });
  };
  const varies = [true, box.load[0] < box.load[1], box.drop[0] < box.drop[1], specification.losses !== null];
  let centre: readonly number[] = [0.5, 0.5, 0.5, 0.5];
  let found = Number.POSITIVE_INFINITY;
  for (let width = 0.5; width > 1e-8; width *= 0.6) {
    for (const shares of around(centre, varies, width)) {
      const value = evaluate(shares);
      if (value < found) [found, centre] = [value, shares];
    }
  }
  return found;
}

/** The points one step up and down each side that varies, and their combinations. */
function around(centre: readonly number[], varies: readonly boolean[], width: number): number[][] {
  const clamp = (value: number) => Math.min(1, Math.max(0, value));
  return varies.reduce<number[][]>(
    (grid, free, side) =>
      grid.flatMap((point) =>
        (free ? [-1, 0, 1] : [0]).map((step) => [...point, clamp(centre[side]! + step * width)]),
      ),
    [[]],
  );
}
