import type { Chart, LegendEntry } from './Chart.ts';

const strokes: Readonly<Record<LegendEntry['mark'], string>> = {
  line: 'M1 6H33',
  rings: 'M13 6a4 4 0 1 0 8 0a4 4 0 1 0 -8 0Z',
  crosses: 'M12 6h10M17 1v10',
};
const classes: Readonly<Record<LegendEntry['mark'], string>> = {
  line: 'line',
  rings: 'ring',
  crosses: 'cross',
};

/** The keys below a plot: a stroke of each kind with its meaning. */
export function legendView({ legend }: Chart) {
  return legend.map(({ mark, ink, text }) => ({
    d: strokes[mark],
    className: `${classes[mark]} ${ink}`,
    text,
  }));
}
