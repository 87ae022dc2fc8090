import converterTemplate from '../../../templates/converter.cir.hbs';
import { engineering } from '../../base/engineering.ts';
import { rampFigures, senseAttenuation } from '../../circuit/rampFigures.ts';
import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import { fixedNumber } from '../text/fixedNumber.ts';
import { netlistComment } from '../text/netlistComment.ts';
import { clockTiming } from './deckTiming.ts';
import { operatingState } from './operatingState.ts';
import { cyclePlan, perturbation } from './perturbation.ts';
import { stageLines } from './stages/StageLines.ts';
import { trackSource } from './trackSource.ts';

const stepsPerPeriod = 1000;

/** A converter deck's text with what it should show. */
export interface ConverterDeck {
  readonly text: string;
  readonly stop_s: number;
  readonly period_s: number;
  readonly point: RegionPoint;
  readonly dampingIndex: number;
  readonly cycleRatio: number;
}

/**
 * The converter around the real ramp block, at one operating point.
 *
 * Started at the periodic current that the slopes predict; the control voltage follows from the peak and
 * the ramp at the trip.
 */
export function converterDeck(
  design: SizedDesign,
  kind: 'adaptive' | 'fixed',
  sized: SizedLaw,
  point: RegionPoint,
): ConverterDeck {
  const { specification } = design.request;
  const timing = clockTiming(design);
  const inductance_H = design.corners.referenceInductance_H;
  const source = trackSource(design, kind, sized.realisedGain);
  const state = operatingState(design, sized, point);
  const senseGain = specification.senseGain_V_per_A.nominal;
  const attenuation = senseAttenuation(design);
  const onTime_s = point.duty * timing.period_s;
  const figures = rampFigures(design, source.track_V(point.inputVoltage_V));
  const atTrip_V =
    (figures.comparatorSlope_V_per_s + state.internalSlope_V_per_s) * onTime_s +
    attenuation * senseGain * (state.peak_A + state.freeSlope_A_per_s * onTime_s);
  const stage = stageLines(specification.converter, {
    ...point,
    inductance_H,
    initialCurrent_A: state.peak_A - state.ripple_A,
    magnetizing: state.magnetizing,
  });
  const shift = perturbation(
    point,
    inductance_H,
    timing.period_s,
    state.ramp_V,
    state.cycleRatio,
    specification.maximumDutyRatio,
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
    stage: stage.lines,
    models: stage.models,
    shiftFrom: 'shifted',
    shiftTo: 'wound',
    shift: shift.corners.map((value) => fixedNumber(value, 9)).join(' '),
    senseGain: fixedNumber(senseGain),
    internalRamp:
      state.internalSlope_V_per_s === 0 ? '' : fixedNumber(state.internalSlope_V_per_s * timing.low_s, 9),
    control: fixedNumber(atTrip_V, 6),
    clockShare: fixedNumber(1 / supply, 9),
    clearThreshold: fixedNumber(supply / 2),
    step: fixedNumber(timing.period_s / stepsPerPeriod, 9),
    stop: fixedNumber(stop_s, 9),
  });
  return {
    text,
    stop_s,
    period_s: timing.period_s,
    point,
    dampingIndex: state.dampingIndex,
    cycleRatio: state.cycleRatio,
  };
}
