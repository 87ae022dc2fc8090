import testTemplate from '../../../templates/ramp-test.cir.hbs';
import { outerInterval } from '../../base/Quantity.ts';
import type { SizedDesign } from '../../circuit/SizedDesign.ts';
import { fixedNumber } from '../text/fixedNumber.ts';
import { netlistComment } from '../text/netlistComment.ts';
import { clockTiming } from './deckTiming.ts';
import { trackSource } from './trackSource.ts';

/** Periods at each input voltage; the last one is measured. */
export const periodsPerLevel = 22;
/** Time steps per period of the ramp alone, which is nearly straight. */
export const stepsPerPeriod = 300;

/** `ramp-test.cir`: its text, its input voltages and when each has settled. */
export interface RampTestDeck {
  readonly text: string;
  readonly stop_s: number;
  /** Lowest, middle and highest input with the start of the period to measure. */
  readonly levels: readonly { readonly inputVoltage_V: number; readonly measureFrom_s: number }[];
}

export function rampTestDeck(design: SizedDesign): RampTestDeck {
  const { specification } = design.request;
  const timing = clockTiming(design);
  const { low, high } = outerInterval(specification.input_V);
  const dwell = periodsPerLevel * timing.period_s;
  const voltages = [low, (low + high) / 2, high];
  const steps = voltages.flatMap((voltage, index) => [
    index === 0 ? 0 : index * dwell + timing.period_s / 10,
    voltage,
    (index + 1) * dwell,
    voltage,
  ]);
  const source = trackSource(
    design,
    design.demand.tracks === 'input' ? 'adaptive' : 'fixed',
    design.chosen.realisedGain,
  );
  return {
    stop_s: voltages.length * dwell,
    levels: voltages.map((inputVoltage_V, index) => ({
      inputVoltage_V,
      measureFrom_s: (index + 1) * dwell - timing.period_s,
    })),
    text: testTemplate({
      title: netlistComment(specification.title || 'ramp generator'),
      inputSteps: steps.map((value) => fixedNumber(value, 9)).join(' '),
      supply: fixedNumber(specification.ramp.supply_V.nominal),
      track: source.line,
      ports: [source.node, 'vcc', 'clk', 'isense', 'sense', 'ramp'].join(' '),
      name: design.circuit.name,
      edge: fixedNumber(timing.edge_s, 9),
      low: fixedNumber(timing.low_s, 9),
      period: fixedNumber(timing.period_s, 9),
      step: fixedNumber(timing.period_s / stepsPerPeriod, 9),
      stop: fixedNumber(voltages.length * dwell, 9),
    }),
  };
}
