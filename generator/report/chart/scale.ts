import { shiftDecimal } from '../../base/shiftDecimal.ts';
import type { Axis } from './Chart.ts';

export interface Tick {
  readonly value: number;
  readonly text: string;
}

export interface Scale {
  /** 0 at the low end of the axis, 1 at the high end. */
  position(value: number): number;
  readonly ticks: readonly Tick[];
  /** `input voltage, V` */
  readonly caption: string;
}

const prefixes = ['p', 'n', 'µ', 'm', '', 'k', 'M', 'G'];

/** Positions, ticks and caption of an axis; the figures along it stay between 1 and 1000. */
export function scaleOf(axis: Axis, wantedTicks: number): Scale {
  const { low, high } = axis;
  if (!(high > low)) throw new RangeError(`${axis.quantity}: an axis from ${low} to ${high}`);
  const exponent =
    axis.unit === '' || axis.unit === '%' ? 0 : prefixExponent(Math.max(Math.abs(low), Math.abs(high)));
  const values = axis.isLogarithmic ? decadeTicks(low, high) : evenTicks(axis, wantedTicks);
  const unit = `${prefixes[exponent / 3 + 4]}${axis.unit}`;
  return {
    position: axis.isLogarithmic
      ? (value) => Math.log(value / low) / Math.log(high / low)
      : (value) => (value - low) / (high - low),
    ticks: values.map((value) => ({ value, text: tickText(value, exponent) })),
    caption: unit === '' ? axis.quantity : `${axis.quantity}, ${unit}`,
  };
}

function prefixExponent(largest: number): number {
  if (largest === 0) return 0;
  return Math.min(9, Math.max(-12, 3 * Math.floor((Math.log10(largest) + 1e-9) / 3)));
}

function tickText(value: number, exponent: number): string {
  const shifted = shiftDecimal(Number(value.toPrecision(9)), -exponent);
  return String(shifted).replace('-', '−');
}

/** A step of one, two or five times a power of ten that comes closest to the wanted number of ticks. */
export function niceStep(span: number, wantedTicks: number): number {
  const raw = span / wantedTicks;
  const decade = 10 ** Math.floor(Math.log10(raw));
  const share = raw / decade;
  return decade * (share < 1.5 ? 1 : share < 3.5 ? 2 : share < 7.5 ? 5 : 10);
}

function evenTicks({ low, high, step: given }: Axis, wantedTicks: number): number[] {
  const step = given ?? niceStep(high - low, wantedTicks);
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}

function decadeTicks(low: number, high: number): number[] {
  const from = Math.floor(Math.log10(low));
  const to = Math.ceil(Math.log10(high));
  return Array.from({ length: to - from + 1 }, (_, index) => from + index)
    .flatMap((decade) => [1, 2, 5].map((digit) => shiftDecimal(digit, decade)))
    .filter((value) => value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9));
}
