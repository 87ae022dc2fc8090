import { worstSpread } from '../circuit/boardOpamp/rampSpread.ts';
import { currentSourceVoltages, rampFigures } from '../circuit/rampFigures.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { cycleRatio } from '../law/innerLoop.ts';
import { figure, percent, volts } from './figures.ts';
import { type TableView, tableView } from './table.ts';

type Step = readonly [
  probe: string,
  conditions: string,
  quantity: string,
  expected: string,
  least: string,
  most: string,
  measured: '',
  initials: '',
];

/** What to probe on the first boards, with what to expect and the limits of a good unit. */
export function benchPlan(design: SizedDesign): TableView {
  const { low, high } = design.region.inputVoltage_V;
  const inputs =
    design.demand.tracks === 'input' ? [low, (low + high) / 2, high] : [design.demand.track_V.high];
  return tableView(
    'Bench test of the first boards; for the rows of the ramp: power stage off, clock running, isense tied to ground',
    [
      ['probe', 'code'],
      ['conditions', 'words'],
      ['quantity', 'words'],
      ['expected', 'num'],
      ['least', 'num'],
      ['most', 'num'],
      ['measured', 'write'],
      ['initials', 'write'],
    ],
    [...inputs.flatMap((track) => rampSteps(design, track)), ...loopSteps(design)],
  );
}

function rampSteps(design: SizedDesign, track_V: number): Step[] {
  const { sizing, demand } = design;
  const figures = rampFigures(design, track_V);
  const { set_V } = currentSourceVoltages(design, track_V);
  const capacitor = worstSpread(sizing.causes.filter(({ parameter }) => parameter !== 'summing resistors'));
  const at = `${demand.tracks === 'input' ? 'Vin' : 'reference'} ${volts(track_V)}`;
  const step = (
    probe: string,
    quantity: string,
    value: number,
    unit: string,
    spread: typeof capacitor,
  ): Step => [
    probe,
    at,
    quantity,
    figure(value, unit),
    figure(value * spread.low, unit),
    figure(value * spread.high, unit),
    '',
    '',
  ];
  const voltage = worstSpread(
    sizing.causes.filter(({ parameter }) => ['divider', 'op-amp offset', 'reference'].includes(parameter)),
  );
  return [
    step('set', 'voltage across R4', set_V, 'V', voltage),
    step('ramp', 'slope of the rise', figures.capacitorSlope_V_per_s, 'V/s', capacitor),
    step('ramp', 'voltage at maximum duty, nominal period', figures.amplitude_V, 'V', capacitor),
    [
      'ramp',
      at,
      'voltage at the end of the reset',
      figure(figures.residual_V, 'V'),
      '–',
      figure(figures.amplitude_V / 100, 'V'),
      '',
      '',
    ],
    step('sense', 'slope of the rise', figures.comparatorSlope_V_per_s, 'V/s', sizing.spread),
  ];
}

/** The loop itself: the worst points are those of the damping index. */
function loopSteps({ chosen }: SizedDesign): Step[] {
  const { min, max } = chosen.extremes;
  const at = ({ at: point }: typeof min) =>
    `${volts(point.inputVoltage_V)} in, ${volts(point.outputVoltage_V)} out, duty ${percent(point.duty, 3)}`;
  return [
    [
      'switch node',
      at(min),
      'on-times of successive cycles, steady state',
      'alike',
      '–',
      'no alternation',
      '',
      '',
    ],
    [
      'inductor current',
      `${at(min)}, load step`,
      'what is left of a disturbance after one cycle',
      percent(cycleRatio(min.dampingIndex), 2),
      '–',
      'dies within cycles',
      '',
      '',
    ],
    [
      'inductor current',
      `${at(max)}, load step`,
      'what is left of a disturbance after one cycle, at most',
      percent(cycleRatio(max.dampingIndex), 2),
      '–',
      'dies within cycles',
      '',
      '',
    ],
  ];
}
