import type { LineStep, LineStepResponse } from '../../loop/lineStep.ts';
import type { Chart, DataPoint, EdgeLabel, Ink, Mark } from '../chart/Chart.ts';
import { figure, volts } from '../figures.ts';

function inkOf({ kind }: LineStepResponse): Ink {
  return kind === 'vin' ? 'adaptive' : kind;
}

/** Mean inductor current of each cycle while the input steps up and down again. */
export function lineStepChart({ low, high, up, down, responses }: LineStep): Chart {
  const values = responses.flatMap(({ deviation_A }) => deviation_A);
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const room = Math.max(0.1 * (most - least), 1e-6);
  const cycles = responses[0]!.deviation_A.length;
  return {
    id: 'line-step',
    title: `Line step, ${volts(low.inputVoltage_V)} to ${volts(high.inputVoltage_V)} and back, at ${volts(low.outputVoltage_V)} out`,
    description: responses.map((response) => describe(response, down - up)).join(' '),
    x: { quantity: 'clock cycles since the step', unit: '', low: -up, high: cycles - up },
    y: { quantity: 'mean inductor current, change', unit: 'A', low: least - room, high: most + room },
    marks: [
      { kind: 'level', ink: 'plain', y: 0 },
      ...responses.flatMap((response) => responseMarks(response, up)),
      {
        kind: 'note',
        ink: 'plain',
        side: 'above',
        at: [0, least - room],
        text: `${volts(high.inputVoltage_V)} from here`,
      },
      {
        kind: 'note',
        ink: 'plain',
        side: 'above',
        at: [down - up, least - room],
        text: `${volts(low.inputVoltage_V)} again`,
      },
    ],
    edgeLabels: responses.map(
      (response): EdgeLabel => ({
        y: response.deviation_A.at(-1)!,
        ink: inkOf(response),
        text: response.kind,
      }),
    ),
    legend: [],
  };
}

/** Each cycle at its middle, so that a step at an edge lies between two points. */
function responseMarks(response: LineStepResponse, up: number): Mark[] {
  const points = response.deviation_A.map((value, cycle): DataPoint => [cycle + 0.5 - up, value]);
  return [{ kind: 'line', ink: inkOf(response), points }];
}

function describe({ kind, deviation_A }: LineStepResponse, shown: number): string {
  const settled = deviation_A[deviation_A.length - shown - 1]!;
  return `With ${kind} the mean current moves by ${figure(settled, 'A')} at the higher input.`;
}
