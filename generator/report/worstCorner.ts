import { limits } from '../circuit/boardOpamp/limits.ts';
import { resetTimeNeeded_s } from '../circuit/boardOpamp/resetTime.ts';
import { bipolar, switchResistance_ohm } from '../circuit/DeviceModels.ts';
import { currentSourceVoltages, rampFigures } from '../circuit/rampFigures.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { cycleRatio, dampingQ } from '../law/innerLoop.ts';
import { ownRamp_V } from '../law/leastGain.ts';
import { digits, figure, percent, plainNumber, volts } from './figures.ts';
import { type TableView, tableView } from './table.ts';

/** One line of a worst-case analysis: what stands at its extreme, the formula, the numbers put in. */
type Line = readonly [
  what: string,
  corner: string,
  formula: string,
  numbers: string,
  result: string,
  limit: string,
  source: string,
];

const partsSource = 'part values, extreme values multiplied';

/** Each limit of the design at the corner that strains it most. */
export function worstCornerTable(design: SizedDesign): TableView {
  return tableView(
    'Worst-case analysis, extreme values',
    [
      ['figure', 'words'],
      ['corner', 'words'],
      ['formula', 'words'],
      ['with its numbers', 'words'],
      ['result', 'num'],
      ['limit', 'num'],
      ['source', 'words'],
    ],
    [indexLine(design, 'low'), indexLine(design, 'high'), ...loopLines(design), ...circuitLines(design)],
  );
}

function indexLine(design: SizedDesign, corner: 'low' | 'high'): Line {
  const { chosen, corners, sizing, request } = design;
  const { at, dampingIndex } = chosen.extremes[corner === 'low' ? 'min' : 'max'];
  const other = corner === 'low' ? 'high' : 'low';
  const { law } = chosen;
  const isFixed = law.kind === 'fixed';
  const internal_V = ownRamp_V(design.region, corners, at)[corner];
  const lambda = corners.at(at).lambda[corner] * sizing.spread[corner];
  const { goal } = request.specification;
  const tail = internal_V === 0 ? ['', ''] : [' + internal', ` + ${digits(internal_V, 4)}`];
  const ramp = isFixed ? `λ·S·L` : `λ·${law.gainSymbol}·Vin`;
  const numbers = [lambda, chosen.realisedGain, ...(isFixed ? [] : [law.ramp_V(1, at)])].map((value) =>
    digits(value, 4),
  );
  return [
    corner === 'low' ? 'least damping index' : 'greatest damping index',
    `${volts(at.inputVoltage_V)} in, ${volts(at.outputVoltage_V)} out, duty ${percent(at.duty, 3)}; L ${figure(corners.inductance_H[corner], 'H')}, Ri ${figure(corners.senseGain_V_per_A[other], 'V/A')}, ramp ${percent(sizing.spread[corner], 4)} of nominal`,
    `x = (up + ${ramp}${tail[0]})/U, λ = (L/Lref)(Ri,nom/Ri)·spread`,
    `(${digits(at.up_V, 4)} + ${numbers.join(' · ')}${tail[1]}) V / ${digits(at.swing_V, 4)} V`,
    digits(dampingIndex, 4),
    corner === 'low' ? `≥ ${digits(goal.dampingIndex, 4)}` : `≤ ${digits(goal.ceilingIndex, 4)}`,
    corner === 'low' ? 'Q of the double pole at fs/2: Ridley 1991 (from memory)' : 'common practice',
  ];
}

function loopLines({ chosen, request }: SizedDesign): Line[] {
  const { min, max } = chosen.extremes;
  const { goal } = request.specification;
  const ratio = (index: number): Line => [
    index < 1 ? 'strongest ringing' : 'slowest decay',
    'as above',
    'α = 1 − 1/x',
    `1 − 1/${digits(index, 4)}`,
    plainNumber(cycleRatio(index)),
    '|α| < 1',
    'Erickson and Maksimović, current-programmed control (from memory)',
  ];
  const q = dampingQ(min.dampingIndex);
  const goalQ = dampingQ(goal.dampingIndex);
  return [
    ratio(min.dampingIndex),
    ratio(max.dampingIndex),
    [
      'greatest Q at fs/2',
      'at the least x',
      'Q = 1/(π(x − ½))',
      `1/(π(${digits(min.dampingIndex, 4)} − 0.5))`,
      q === null ? 'none' : digits(q, 3),
      goalQ === null ? '–' : `≤ ${digits(goalQ, 3)}`,
      'Ridley 1991 (from memory)',
    ],
  ];
}

function circuitLines(design: SizedDesign): Line[] {
  const { demand, sizing } = design;
  const top = volts(demand.track_V.high);
  const reset = resetTimeNeeded_s(demand, sizing.capacitance_F);
  const source = currentSourceVoltages(design, demand.track_V.high);
  const figures = rampFigures(design, demand.track_V.high);
  const switch_ohm = switchResistance_ohm(demand.supply_V.low);
  const least_V = demand.supply_V.low - source.degeneration_V - bipolar.baseEmitterHigh_V - source.set_V;
  return [
    [
      'greatest ramp amplitude',
      `${top} tracked, maximum duty at the lowest frequency, ramp ${percent(sizing.spread.high, 4)}`,
      'A = slope · rise time · spread',
      `${figure(figures.capacitorSlope_V_per_s, 'V/s', 4)} · ${figure(demand.riseTime_s, 's', 4)} · ${digits(sizing.spread.high, 4)}`,
      figure(sizing.amplitude_V * sizing.spread.high, 'V'),
      `≤ ${figure(sizing.headroom.ramp_V, 'V')}`,
      partsSource,
    ],
    [
      'time to reset to 1\u00a0%',
      `supply ${figure(demand.supply_V.low, 'V')}, highest frequency`,
      't = edges + ln 100 · Ron·C',
      `${figure(limits.resetOverhead_s, 's')} + ${digits(Math.log(100), 4)} · ${figure(switch_ohm, 'Ω')} · ${figure(sizing.totalCapacitance_F, 'F')}`,
      figure(reset, 's'),
      `≤ ${figure(demand.resetTime_s, 's')}`,
      partsSource,
    ],
    [
      'least collector-emitter voltage of Q1',
      `${top} tracked, supply ${figure(demand.supply_V.low, 'V')}, cold`,
      'VCE = Vcc − VRE − VEB − Vset',
      `${[demand.supply_V.low, source.degeneration_V, bipolar.baseEmitterHigh_V, source.set_V].map((value) => digits(value, 3)).join(' − ')} V`,
      figure(least_V, 'V'),
      `≥ ${figure(bipolar.saturation_V, 'V')}`,
      partsSource,
    ],
    [
      'greatest reset residual',
      `${top} tracked, nominal supply`,
      'V = I·Ron + A·exp(−t/(Ron·C))',
      `${figure(figures.chargingCurrent_A, 'A')} · ${figure(switchResistance_ohm(demand.supply_V.nominal), 'Ω')} + rest`,
      figure(figures.residual_V, 'V'),
      `≤ ${figure(figures.amplitude_V / 100, 'V')}`,
      partsSource,
    ],
  ];
}
