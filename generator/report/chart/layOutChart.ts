import type { Axis, Chart, DataPoint, Mark } from './Chart.ts';
import { hatching } from './hatching.ts';
import { type Scale, scaleOf } from './scale.ts';
import { spreadLabels } from './spreadLabels.ts';

/** A sheet for a plot, in units that are pixels at full size. */
export interface Format {
  readonly name: 'wide' | 'half' | 'narrow';
  readonly width: number;
  readonly height: number;
  /** Room for the labels at the right edge. */
  readonly margin: number;
}

export const formats = {
  wide: { name: 'wide', width: 1080, height: 380, margin: 150 },
  half: { name: 'half', width: 540, height: 340, margin: 120 },
  narrow: { name: 'narrow', width: 340, height: 300, margin: 84 },
} as const satisfies Record<string, Format>;

const left = 40;
const top = 26;
const bottom = 40;
/** Height of a line of labels. */
const lineHeight = 15;

export interface ShapeView {
  readonly d: string;
  readonly className: string;
}

export interface TextView {
  readonly x: string;
  readonly y: string;
  readonly text: string;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly className: string;
}

/** A plot ready to be laid out: paths and texts with their classes. */
export interface ChartView {
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly format: string;
  readonly viewBox: string;
  readonly width: string;
  readonly height: string;
  readonly shapes: readonly ShapeView[];
  readonly texts: readonly TextView[];
}

/** The plotting area with its scales: data to paper. */
export interface Area {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: Scale;
  readonly y: Scale;
  place(point: DataPoint): DataPoint;
}

export function layOutChart(chart: Chart, format: Format): ChartView {
  const area = areaOf(chart, format);
  const labels = edgeLabels(chart, area);
  return {
    id: `${chart.id}-${format.name}`,
    title: chart.title,
    description: chart.description,
    format: format.name,
    viewBox: `0 0 ${format.width} ${format.height}`,
    width: String(format.width),
    height: String(format.height),
    shapes: [
      ...gridShapes(area),
      ...chart.marks.flatMap((mark) => markShapes(mark, area)),
      ...frame(area),
      ...labels.shapes,
    ],
    texts: [...axisTexts(area), ...chart.marks.flatMap((mark) => markTexts(mark, area)), ...labels.texts],
  };
}

function areaOf({ x, y }: Chart, { width, height, margin }: Format): Area {
  const right = width - margin;
  const foot = height - bottom;
  const scales = { x: scaleOf(x, Math.max(3, (right - left) / 90)), y: scaleOf(y, (foot - top) / 50) };
  const clamped = (axis: Axis, value: number) => Math.min(axis.high, Math.max(axis.low, value));
  return {
    left,
    right,
    top,
    bottom: foot,
    ...scales,
    place: ([px, py]) => [
      left + scales.x.position(clamped(x, px)) * (right - left),
      foot - scales.y.position(clamped(y, py)) * (foot - top),
    ],
  };
}

function gridShapes(area: Area): ShapeView[] {
  const { x, y } = area;
  const across = y.ticks.map(
    ({ value }) => `M${area.left} ${paper(height(area, value))}H${paper(area.right)}`,
  );
  const up = x.ticks.map(({ value }) => {
    const at = area.left + x.position(value) * (area.right - area.left);
    return `M${paper(at)} ${area.bottom}v5`;
  });
  return [
    { d: across.join(''), className: 'grid' },
    { d: up.join(''), className: 'axis' },
  ];
}

function frame({ left: from, right, bottom: foot }: Area): ShapeView[] {
  return [{ d: `M${from} ${foot}H${right}`, className: 'axis' }];
}

function height({ y, top: head, bottom: foot }: Area, value: number): number {
  return foot - y.position(value) * (foot - head);
}

function axisTexts(area: Area): TextView[] {
  const { x, y } = area;
  return [
    ...y.ticks.map(({ value, text }) => label(area.left - 7, height(area, value) + 4, text, 'end', 'tick')),
    ...x.ticks.map(({ value, text }) =>
      label(
        area.left + x.position(value) * (area.right - area.left),
        area.bottom + 18,
        text,
        'middle',
        'tick',
      ),
    ),
    label(0, 12, y.caption, 'start', 'caption'),
    label(area.right, area.bottom + 34, x.caption, 'end', 'caption'),
  ];
}

function markShapes(mark: Mark, area: Area): ShapeView[] {
  switch (mark.kind) {
    case 'band': {
      const d = `${path([...mark.upper, ...[...mark.lower].reverse()], area)}Z`;
      return [{ d, className: `band ${mark.ink}` }];
    }
    case 'line':
      return [{ d: path(mark.points, area), className: `line ${mark.ink}` }];
    case 'level': {
      const y = paper(height(area, mark.y));
      return [{ d: `M${area.left} ${y}H${area.right}`, className: `line ${mark.ink}` }];
    }
    case 'forbidden': {
      const y = height(area, mark.below);
      return [
        {
          d: hatching({ left: area.left, right: area.right, top: y, bottom: area.bottom }),
          className: 'hatch',
        },
        { d: `M${area.left} ${paper(y)}H${area.right}`, className: 'line edge' },
      ];
    }
    case 'rings':
      return [
        { d: mark.points.map((point) => ring(area.place(point))).join(''), className: `ring ${mark.ink}` },
      ];
    case 'crosses':
      return [
        { d: mark.points.map((point) => cross(area.place(point))).join(''), className: `cross ${mark.ink}` },
      ];
    case 'note':
      return [];
  }
}

function markTexts(mark: Mark, area: Area): TextView[] {
  if (mark.kind === 'forbidden') {
    const y = height(area, mark.below);
    return area.bottom - y < lineHeight
      ? []
      : [label(area.left + 8, (y + area.bottom) / 2 + 4, mark.label, 'start', 'halo')];
  }
  if (mark.kind !== 'note') return [];
  const [x, y] = area.place(mark.at);
  const share = (x - area.left) / (area.right - area.left);
  const anchor = share < 0.3 ? 'start' : share > 0.7 ? 'end' : 'middle';
  return [label(x, y + (mark.side === 'above' ? -9 : 18), mark.text, anchor, `halo ${mark.ink}`)];
}

/** Labels beside the right edge, led to what they name where they had to move. */
function edgeLabels({ edgeLabels: labels }: Chart, area: Area): { shapes: ShapeView[]; texts: TextView[] } {
  const own = labels.map(({ y }) => height(area, y));
  const heights = spreadLabels(own, lineHeight, { low: area.top, high: area.bottom });
  const start = area.right + 14;
  return {
    shapes: labels.map((_, index) => ({
      d: `M${area.right + 1} ${paper(own[index]!)}L${start - 3} ${paper(heights[index]!)}`,
      className: 'leader',
    })),
    texts: labels.map(({ text, ink }, index) => label(start, heights[index]! + 4, text, 'start', ink)),
  };
}

function label(x: number, y: number, text: string, anchor: TextView['anchor'], className: string): TextView {
  return { x: paper(x), y: paper(y), text, anchor, className };
}

function path(points: readonly DataPoint[], area: Area): string {
  return points
    .map((point, index) => `${index === 0 ? 'M' : 'L'}${area.place(point).map(paper).join(' ')}`)
    .join('');
}

function ring([x, y]: DataPoint): string {
  return `M${paper(x - 4)} ${paper(y)}a4 4 0 1 0 8 0a4 4 0 1 0 -8 0Z`;
}

function cross([x, y]: DataPoint): string {
  return `M${paper(x - 5)} ${paper(y)}h10M${paper(x)} ${paper(y - 5)}v10`;
}

/** A tenth of a pixel is finer than any eye or printer. */
function paper(value: number): string {
  const rounded = Math.round(value * 10) / 10;
  return String(rounded === 0 ? 0 : rounded);
}
