import type { Comparison } from '../../loop/Comparison.ts';
import { neededRampAt, spread } from '../../loop/neededRamp.ts';
import type { Chart, DataPoint } from '../chart/Chart.ts';
import { plainNumber, volts } from '../figures.ts';

const inputs = 81;

/** The needed ramp over input, a curve for each output of the table; none for a single input. */
export function neededRampCharts({ region, neededRamp, request }: Comparison): readonly Chart[] {
  const { low, high } = region.inputVoltage_V;
  const goal = request.specification.goal.dampingIndex;
  const outputs = [...new Set(neededRamp.map(({ outputVoltage_V }) => outputVoltage_V))];
  const curves = outputs.flatMap((output) => {
    const points = spread(low, high, inputs).flatMap((input): DataPoint[] => {
      const need = neededRampAt(region, goal, input, output);
      return need === null ? [] : [[input, need.rampOverUpSlope]];
    });
    return points.length > 1 ? [{ output, points }] : [];
  });
  const most = Math.max(0, ...curves.flatMap(({ points }) => points.map(([, need]) => need)));
  if (curves.length === 0 || most === 0) return [];
  return [
    {
      id: 'needed',
      title: 'Needed ramp over input voltage, for each output',
      description: curves
        .map(
          ({ output, points }) =>
            `For ${volts(output)} out from ${plainNumber(points[0]![1])} at ${volts(points[0]![0])} to ${plainNumber(points.at(-1)![1])} at ${volts(points.at(-1)![0])}.`,
        )
        .join(' '),
      x: { quantity: 'input voltage Vin', unit: 'V', low, high },
      y: { quantity: 'needed ramp over sensed up slope, ma/m1', unit: '', low: 0, high: 1.06 * most },
      marks: curves.map(({ points }) => ({ kind: 'line', ink: 'predicted', points })),
      edgeLabels: curves.map(({ output, points }) => ({
        y: points.at(-1)![1],
        ink: 'plain',
        text: `${volts(output)} out`,
      })),
      legend: [],
    },
  ];
}
