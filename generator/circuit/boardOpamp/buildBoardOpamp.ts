import { engineering } from '../../base/engineering.ts';
import { resistorTolerance, timingCapacitorTolerance } from '../../parts/catalogue.ts';
import { isPreferred } from '../../parts/eSeries.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { Circuit, Component } from '../Circuit.ts';
import { passive, semiconductor, strayCapacitor } from '../component.ts';
import { resetSwitch, stray } from '../DeviceModels.ts';
import type { BoardOpampSizing } from './candidate.ts';
import { slewNeeded_V_per_s } from './slewNeeded.ts';

/**
 * The op-amp build as a circuit.
 *
 * Divider → op-amp and transistor turn the scaled voltage into a current through the set resistor →
 * degenerated mirror → timing capacitor with reset switch → buffer → summing resistors at `sense`.
 */
export function buildBoardOpamp(sizing: BoardOpampSizing, demand: RampDemand): Circuit {
  return {
    build: 'board-opamp',
    name: 'ramp_generator',
    ports: [
      {
        node: 'track',
        meaning:
          demand.tracks === 'input'
            ? 'converter input, followed by the slope'
            : 'reference voltage, sets the slope',
      },
      { node: 'vcc', meaning: 'supply of the ramp generator' },
      { node: 'clk', meaning: 'high from maximum duty to the end of the period: resets the ramp' },
      { node: 'isense', meaning: 'output of the current sense element' },
      { node: 'sense', meaning: 'current-sense input of the comparator' },
      { node: 'ramp', meaning: 'timing capacitor, for a probe' },
    ],
    components: [
      ...inputDivider(sizing, demand),
      ...currentSource(sizing, demand),
      ...rampNode(sizing, demand),
      ...summing(sizing, demand),
    ],
  };
}

/** Stress with the rating to order: twice the voltage and the power, at least what the smallest size has. */
function resistorRating(voltage_V: number, ohm: number): string {
  const power_W = voltage_V ** 2 / ohm;
  return `stress ${engineering(voltage_V, 'V', 2)}, ${engineering(power_W, 'W', 2)}; order ≥ ${engineering(Math.max(50, Math.ceil((1.5 * voltage_V) / 25) * 25), 'V')}, ${engineering(Math.max(0.0625, 2 * power_W), 'W', 3)}`;
}

function inputDivider(sizing: BoardOpampSizing, demand: RampDemand): Component[] {
  const { divider } = sizing;
  const top_V = demand.track_V.high;
  const perResistor_V = (top_V * (1 - divider.ratio)) / divider.upperCount;
  const resistor = (
    reference: string,
    role: string,
    nodes: readonly [string, string],
    ohm: number,
    volts: number,
  ) => passive('resistor', reference, role, nodes, ohm, choice(demand, resistorRating(volts, ohm)));
  const single = divider.upperCount === 1;
  const upper = Array.from({ length: divider.upperCount }, (_, index) => {
    const from = index === 0 ? 'track' : `tap${index}`;
    const to = index === divider.upperCount - 1 ? 'scaled' : `tap${index + 1}`;
    const reference = single ? 'R1' : `R1${String.fromCharCode(65 + index)}`;
    return resistor(reference, 'divider, upper', [from, to], divider.upper_ohm, perResistor_V);
  });
  const lower = resistor('R2', 'divider, lower', ['scaled', '0'], divider.lower_ohm, top_V * divider.ratio);
  if (divider.filter_F === null) return [...upper, lower];
  return [
    ...upper,
    lower,
    passive('capacitor', 'C2', 'divider filter', ['scaled', '0'], divider.filter_F, {
      series: 'E6',
      toleranceRatio: 0.1,
      rating: 'C0G or X7R, order ≥ 25 V',
    }),
  ];
}

function currentSource(sizing: BoardOpampSizing, demand: RampDemand): Component[] {
  const set_V = sizing.divider.ratio * demand.track_V.high;
  const degeneration_V = (set_V / sizing.set_ohm) * sizing.degeneration_ohm;
  const mirrorResistor = (reference: string, role: string, node: string) =>
    passive(
      'resistor',
      reference,
      role,
      ['vcc', node],
      sizing.degeneration_ohm,
      choice(demand, resistorRating(degeneration_V, sizing.degeneration_ohm)),
    );
  const bipolarRating = `order ≥ ${engineering(Math.ceil((2 * demand.supply_V.high) / 5) * 5, 'V')} collector-emitter, gain 100 to 400`;
  return [
    semiconductor(
      'opamp',
      'U1A',
      'U1',
      'dual op-amp: voltage to current',
      ['scaled', 'set', 'vcc', 'drive'],
      'opamp_rr',
      opampRating(sizing, demand),
    ),
    passive('resistor', 'R3', 'base stopper', ['drive', 'base'], 1e3, {
      series: 'E24',
      toleranceRatio: 0.05,
      rating: 'any',
    }),
    semiconductor(
      'npn',
      'Q1',
      'Q1',
      'voltage-to-current transistor',
      ['mirror', 'base', 'set'],
      'npn_small',
      bipolarRating,
    ),
    passive(
      'resistor',
      'R4',
      'set resistor',
      ['set', '0'],
      sizing.set_ohm,
      choice(demand, resistorRating(set_V, sizing.set_ohm)),
    ),
    mirrorResistor('R5', 'mirror, input side', 'mirror_in'),
    semiconductor(
      'pnp',
      'Q2A',
      'Q2',
      'mirror, matched pair',
      ['mirror', 'mirror', 'mirror_in'],
      'pnp_small',
      bipolarRating,
    ),
    mirrorResistor('R6', 'mirror, output side', 'mirror_out'),
    semiconductor(
      'pnp',
      'Q2B',
      'Q2',
      'mirror, matched pair',
      ['ramp', 'mirror', 'mirror_out'],
      'pnp_small',
      bipolarRating,
    ),
  ];
}

function rampNode(sizing: BoardOpampSizing, demand: RampDemand): Component[] {
  return [
    passive('capacitor', 'C1', 'timing capacitor', ['ramp', '0'], sizing.capacitance_F, {
      series: isPreferred(demand.series.capacitor, sizing.capacitance_F) ? demand.series.capacitor : null,
      toleranceRatio: demand.capacitorToleranceRatio ?? timingCapacitorTolerance,
      rating: 'C0G (0 ± 30 ppm/K), order ≥ 25 V',
    }),
    strayCapacitor(
      'CS1',
      'layout and junctions at the ramp',
      ['ramp', '0'],
      stray.capacitance_F,
      stray.toleranceRatio,
    ),
    strayCapacitor('CS2', 'gate-drain capacitance of Q3', ['clk', 'ramp'], resetSwitch.gateDrain_F, 0.5),
    semiconductor(
      'nmos',
      'Q3',
      'Q3',
      'reset switch',
      ['ramp', 'clk', '0'],
      'nmos_reset',
      'logic level, order ≥ 20 V drain-source, Crss ≤ 2 pF',
    ),
    semiconductor(
      'opamp',
      'U1B',
      'U1',
      'dual op-amp: buffer',
      ['ramp', 'buffer', 'vcc', 'buffer'],
      'opamp_rr',
      opampRating(sizing, demand),
    ),
    passive('capacitor', 'C3', 'supply decoupling', ['vcc', '0'], 100e-9, {
      series: 'E6',
      toleranceRatio: 0.1,
      rating: 'X7R, order ≥ 16 V',
    }),
  ];
}

function summing(sizing: BoardOpampSizing, demand: RampDemand): Component[] {
  return [
    passive(
      'resistor',
      'R7',
      'ramp summing',
      ['buffer', 'sense'],
      sizing.summing_ohm,
      choice(demand, resistorRating(sizing.amplitude_V, sizing.summing_ohm)),
    ),
    passive(
      'resistor',
      'R8',
      'sense summing',
      ['isense', 'sense'],
      sizing.sense_ohm,
      choice(demand, resistorRating(1, sizing.sense_ohm)),
    ),
  ];
}

function opampRating(sizing: BoardOpampSizing, demand: RampDemand): string {
  const slew = engineering(slewNeeded_V_per_s(sizing, demand) / 1e6, 'V/µs', 2);
  return `rail to rail in and out, ≥ 20 MHz, slew rate ≥ ${slew}, offset ≤ 1 mV, supply ${engineering(demand.supply_V.low, 'V')} to ${engineering(demand.supply_V.high, 'V')}`;
}

function choice(demand: RampDemand, rating: string) {
  const { resistor } = demand.series;
  return { series: resistor, toleranceRatio: resistorTolerance(resistor), rating };
}
