import { type ChartView, paper, type ShapeView, type TextView, textView } from './ChartView.ts';
import type { Format } from './formats.ts';
import { scaleOf } from './scale.ts';

/** A named interval about nothing. */
export interface Bar {
  readonly name: string;
  readonly low: number;
  readonly high: number;
  readonly lowText: string;
  readonly highText: string;
  readonly isTotal: boolean;
}

/** Causes of an error, one below the other, each with how far it reaches to both sides. */
export interface BarChart {
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly caption: string;
  readonly bars: readonly Bar[];
}

const rowHeight = 21;
const barHeight = 11;
const head = 26;
/** For the names at the left. */
const nameRoom = 88;
/** For the figures at both ends of a bar. */
const figureRoom = 82;

/** As high as its rows need, whatever the format's own height. */
export function layOutBars(chart: BarChart, format: Format): ChartView {
  const height = head + chart.bars.length * rowHeight + 14;
  const from = nameRoom + figureRoom;
  const to = format.width - figureRoom - 4;
  const reach = Math.max(...chart.bars.flatMap(({ low, high }) => [Math.abs(low), Math.abs(high)]));
  const scale = scaleOf({ quantity: '', unit: '%', low: -reach, high: reach }, 4);
  const across = (value: number) => from + scale.position(value) * (to - from);
  const zero = paper(across(0));
  return {
    id: `${chart.id}-${format.name}`,
    title: chart.title,
    description: chart.description,
    format: format.name,
    viewBox: `0 0 ${format.width} ${height}`,
    width: String(format.width),
    height: String(height),
    shapes: [
      ...chart.bars.map((bar, row) => barShape(bar, row, across)),
      { d: `M${zero} ${head - 6}V${height - 10}`, className: 'axis' },
    ],
    texts: [
      textView(0, 12, chart.caption, 'start', 'caption'),
      ...chart.bars.flatMap((bar, row) => barTexts(bar, row, across)),
    ],
  };
}

function barShape({ low, high, isTotal }: Bar, row: number, across: (value: number) => number): ShapeView {
  const top = head + row * rowHeight + (rowHeight - barHeight) / 2;
  const [left, right] = [across(low), across(high)].map(paper);
  return {
    d: `M${left} ${paper(top)}H${right}v${barHeight}H${left}Z`,
    className: isTotal ? 'bar total' : 'bar',
  };
}

function barTexts(bar: Bar, row: number, across: (value: number) => number): TextView[] {
  const y = head + row * rowHeight + rowHeight / 2 + 4;
  const weight = bar.isTotal ? ' total' : '';
  return [
    textView(0, y, bar.name, 'start', `name${weight}`),
    textView(across(bar.low) - 6, y, bar.lowText, 'end', `value${weight}`),
    textView(across(bar.high) + 6, y, bar.highText, 'start', `value${weight}`),
  ];
}
