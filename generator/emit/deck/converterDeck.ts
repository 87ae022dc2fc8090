import converterTemplate from '../../../templates/converter.cir.hbs';
import { engineering } from '../../base/engineering.ts';
import { rampFigures, senseAttenuation } from '../../circuit/rampFigures.ts';
import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import { cycleRatio, dampingIndex } from '../../law/innerLoop.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import { fixedNumber } from '../text/fixedNumber.ts';
import { netlistComment } from '../text/netlistComment.ts';
import { clockTiming } from './deckTiming.ts';
import { cyclePlan, perturbation } from './perturbation.ts';
import { buckLines } from './stages/buckLines.ts';
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
  const ramp_V = sized.law.ramp_V(sized.realisedGain, point);
  const index = dampingIndex(point.up_V, point.swing_V, ramp_V);
  const ratio = cycleRatio(index);
  const ripple_A = (point.up_V / inductance_H) * point.duty * timing.period_s;
  const peak_A = (specification.load_A?.to.nominal ?? ripple_A) + ripple_A / 2;
  const senseGain = specification.senseGain_V_per_A.nominal;
  const figures = rampFigures(design, source.track_V(point.inputVoltage_V));
  const atTrip_V = figures.comparatorSlope_V_per_s * point.duty * timing.period_s;
  const stage = buckLines({ ...point, inductance_H, initialCurrent_A: peak_A - ripple_A });
  const shift = perturbation(
    point,
    inductance_H,
    timing.period_s,
    ramp_V,
    ratio,
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
    index: fixedNumber(index, 4),
    ratio: fixedNumber(ratio, 4),
    input: fixedNumber(point.inputVoltage_V, 9),
    supply: fixedNumber(supply),
    track: source.line,
    ports: [source.node, 'vcc', 'clk', 'isense', 'sense', 'ramp'].join(' '),
    name: design.circuit.name,
    edge: fixedNumber(timing.edge_s, 9),
    low: fixedNumber(timing.low_s, 9),
    period: fixedNumber(timing.period_s, 9),
    stage: stage.lines,
    models: stage.models,
    shiftFrom: 'shifted',
    shiftTo: 'wound',
    shift: shift.corners.map((value) => fixedNumber(value, 9)).join(' '),
    senseGain: fixedNumber(senseGain),
    control: fixedNumber(senseAttenuation(design) * senseGain * peak_A + atTrip_V, 6),
    clockShare: fixedNumber(1 / supply, 9),
    clearThreshold: fixedNumber(supply / 2),
    step: fixedNumber(timing.period_s / stepsPerPeriod, 9),
    stop: fixedNumber(stop_s, 9),
  });
  return { text, stop_s, period_s: timing.period_s, point, dampingIndex: index, cycleRatio: ratio };
}
