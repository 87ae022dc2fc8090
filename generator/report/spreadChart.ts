import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Bar, BarChart } from './chart/layOutBars.ts';
import { signedPercent } from './figures.ts';

/** How the ramp's own spread adds up: every cause at its worst at once. */
export function spreadChart({ sizing }: SizedDesign): BarChart {
  const { causes, spread } = sizing;
  const counted = causes.filter(({ low, high }) => low !== 0 || high !== 0);
  const widest = [...counted].sort((a, b) => b.high - b.low - (a.high - a.low));
  const bars = [
    ...widest.map(({ parameter, low, high }) => bar(parameter, low, high, false)),
    bar('all at once', spread.low - 1, spread.high - 1, true),
  ];
  return {
    id: 'spread',
    title: 'How the spread of the ramp is composed',
    description: `Extreme values of each cause: ${bars.map(({ name, lowText, highText }) => `${name} ${lowText} to ${highText}`).join(', ')}.`,
    caption: 'error of the slope; extreme values, multiplied',
    bars,
  };
}

function bar(name: string, low: number, high: number, isTotal: boolean): Bar {
  const count = isTotal ? 3 : 2;
  return {
    name,
    low,
    high,
    isTotal,
    lowText: signedPercent(low, count),
    highText: signedPercent(high, count),
  };
}
