import type { Chart, LegendEntry } from './Chart.ts';
import { cross, ring } from './markViews.ts';

const strokes: Readonly<Record<LegendEntry['mark'], string>> = {
  line: 'M1 9H33',
  rings: ring([17, 9]),
  crosses: cross([17, 9]),
  tint: 'M1 2H33V16H1Z',
};
const classes: Readonly<Record<LegendEntry['mark'], string>> = {
  line: 'line',
  rings: 'ring',
  crosses: 'cross',
  tint: 'tint',
};

/** The keys below a plot: a stroke of each kind with its meaning. */
export function legendView({ legend }: Pick<Chart, 'legend'>) {
  return legend.map(({ mark, ink, step, text }) => ({
    d: strokes[mark],
    className: `${classes[mark]} ${step === undefined ? ink : `t${step}`}`,
    text,
  }));
}
