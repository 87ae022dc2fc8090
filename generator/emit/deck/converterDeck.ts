import converterTemplate from '../../../templates/converter.cir.hbs';
import { engineering } from '../../base/engineering.ts';
import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import { fixedNumber } from '../text/fixedNumber.ts';
import { netlistComment } from '../text/netlistComment.ts';
import { clockTiming } from './deckTiming.ts';
import { operatingState } from './operatingState.ts';
import { cyclePlan, perturbation } from './perturbation.ts';
import { trackSource } from './trackSource.ts';

/** Time steps per period, and at least so many in an on-time. */
const steps = { period: 1000, onTime: 80 } as const;

/**
 * Time after the clock in which the comparator is not heeded: as every controller has it, here for the drop
 * with which the clock's edge begins the ramp. Shares of the period, the time of reset and the on-time.
 */
const blankingShare = { period: 0.02, reset: 0.3, onTime: 0.3 } as const;
const blankingResistor_ohm = 1000;

/** A converter deck's text with what it should show. */
export interface ConverterDeck {
  readonly text: string;
  readonly stop_s: number;
  readonly period_s: number;
  readonly point: RegionPoint;
  /** By which the current is shifted before some clock edges. */
  readonly shift_A: number;
  /** Between these the comparator ends an on-time: after blanking, before the clocked turn-off [s]. */
  readonly comparatorEnds: { readonly from_s: number; readonly to_s: number };
  /** Of the slopes at the mean current. */
  readonly dampingIndex: number;
  /** With every resistance of the deck. */
  readonly cycleRatio: number;
}

/**
 * The converter around the real ramp block, at one operating point.
 *
 * Started at the periodic current; the control voltage follows from the peak and the ramp at the trip.
 */
export function converterDeck(
  design: SizedDesign,
  kind: 'adaptive' | 'fixed',
  sized: SizedLaw,
  point: RegionPoint,
): ConverterDeck {
  const { specification } = design.request;
  const timing = clockTiming(design);
  const source = trackSource(design, kind, sized.realisedGain);
  const state = operatingState(design, source.track_V(point.inputVoltage_V), point);
  const { stage, orbit } = state;
  const shift = perturbation(stage.equations, orbit, state.rampSlope_A_per_s, specification.maximumDutyRatio);
  const stepsPerPeriod = Math.max(steps.period, 100 * Math.ceil(steps.onTime / orbit.duty / 100));
  const blanking_s = Math.min(
    blankingShare.period * timing.period_s,
    blankingShare.reset * (timing.period_s - timing.rise_s),
    blankingShare.onTime * orbit.duty * timing.period_s,
  );
  const supply = specification.ramp.supply_V.nominal;
  const stop_s = cyclePlan.total * timing.period_s;
  const text = converterTemplate({
    title: netlistComment(specification.title || 'converter with the ramp generator'),
    what:
      kind === 'adaptive'
        ? 'Ramp that follows the input voltage'
        : 'Fixed ramp, same block held at one voltage',
    point: `${engineering(point.inputVoltage_V, 'V', 4)} to ${engineering(point.outputVoltage_V, 'V', 4)}, duty ${fixedNumber(point.duty, 4)}`,
    index: fixedNumber(state.dampingIndex, 4),
    ratio: fixedNumber(state.cycleRatio, 4),
    input: fixedNumber(point.inputVoltage_V, 9),
    supply: fixedNumber(supply),
    track: source.line,
    ports: [source.node, 'vcc', 'clk', 'isense', 'sense', 'ramp'].join(' '),
    name: design.circuit.name,
    edge: fixedNumber(timing.edge_s, 9),
    low: fixedNumber(timing.low_s, 9),
    period: fixedNumber(timing.period_s, 9),
    stageName: stage.what,
    stage: stage.lines(orbit.valley_A),
    models: stage.models,
    shiftFrom: 'shifted',
    shiftTo: 'wound',
    shift: shift.corners.map((value) => fixedNumber(value, 9)).join(' '),
    senseGain: fixedNumber(specification.senseGain_V_per_A.nominal),
    internalRamp:
      state.internalSlope_V_per_s === 0 ? '' : fixedNumber(state.internalSlope_V_per_s * timing.low_s, 9),
    control: fixedNumber(state.control_V, 9),
    clockShare: fixedNumber(1 / supply, 9),
    clearThreshold: fixedNumber(supply / 2),
    blanking: fixedNumber(blanking_s / Math.LN2 / blankingResistor_ohm, 3),
    step: fixedNumber(timing.period_s / stepsPerPeriod, 9),
    stop: fixedNumber(stop_s, 9),
  });
  return {
    text,
    stop_s,
    period_s: timing.period_s,
    point,
    shift_A: shift.shift_A,
    comparatorEnds: {
      from_s: 1.5 * blanking_s + 0.5 * timing.edge_s,
      to_s: timing.rise_s - 1.5 * timing.edge_s,
    },
    dampingIndex: state.dampingIndex,
    cycleRatio: state.cycleRatio,
  };
}
