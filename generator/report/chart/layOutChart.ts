import { type Area, areaOf } from './area.ts';
import type { Chart } from './Chart.ts';
import { type ChartView, paper, type ShapeView, type TextView, textView } from './ChartView.ts';
import type { Format } from './formats.ts';
import { markShapes, markTexts } from './markViews.ts';
import { spreadLabels } from './spreadLabels.ts';

/** Height of a line of labels at the right edge. */
const lineHeight = 17;

/** A plot on a sheet of a format: paths and texts with their classes. */
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
      { d: `M${area.left} ${area.bottom}H${area.right}`, className: 'axis' },
      ...labels.shapes,
    ],
    texts: [...axisTexts(area), ...chart.marks.flatMap((mark) => markTexts(mark, area)), ...labels.texts],
  };
}

function gridShapes(area: Area): ShapeView[] {
  const lines = area.y.ticks.map(
    ({ value }) => `M${area.left} ${paper(area.up(value))}H${paper(area.right)}`,
  );
  const ticks = area.x.ticks.map(({ value }) => `M${paper(area.across(value))} ${area.bottom}v5`);
  return [
    { d: lines.join(''), className: 'grid' },
    { d: ticks.join(''), className: 'axis' },
  ];
}

function axisTexts(area: Area): TextView[] {
  const { x, y } = area;
  return [
    ...y.ticks.map(({ value, text }) => textView(area.left - 7, area.up(value) + 4, text, 'end', 'tick')),
    ...x.ticks.map(({ value, text }) =>
      textView(area.across(value), area.bottom + 18, text, 'middle', 'tick'),
    ),
    textView(0, 12, y.caption, 'start', 'caption'),
    textView(area.right, area.bottom + 35, x.caption, 'end', 'caption'),
  ];
}

/** Labels beside the right edge, led to what they name where they had to move. */
function edgeLabels({ edgeLabels: labels }: Chart, area: Area): { shapes: ShapeView[]; texts: TextView[] } {
  const own = labels.map(({ y }) => area.up(y));
  const heights = spreadLabels(own, lineHeight, { low: area.top, high: area.bottom });
  const start = area.right + 14;
  return {
    shapes: labels.map((_, index) => ({
      d: `M${area.right + 1} ${paper(own[index]!)}L${start - 3} ${paper(heights[index]!)}`,
      className: 'leader',
    })),
    texts: labels.map(({ text, ink }, index) => textView(start, heights[index]! + 4, text, 'start', ink)),
  };
}
