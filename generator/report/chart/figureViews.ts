import type { Chart } from './Chart.ts';
import { type Format, formats } from './formats.ts';
import { layOutChart } from './layOutChart.ts';
import { legendView } from './legendView.ts';

/** A plot at its place, drawn once for desks and paper and once for narrow screens. */
export function figureViews(chart: Chart, format: Format, narrow: Format = formats.narrow) {
  return {
    title: chart.title,
    formats: [layOutChart(chart, format), layOutChart(chart, narrow)],
    legend: legendView(chart),
  };
}
