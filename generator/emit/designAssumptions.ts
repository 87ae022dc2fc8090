import type { Assumption } from '../base/Assumption.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { dampingIndex } from '../law/innerLoop.ts';
import { ownRamp_V } from '../law/leastGain.ts';
import { lightLoad } from '../loop/lightLoad.ts';
import { rampReference } from '../ramp/demandOf.ts';
import type { RegionPoint } from '../region/OperatingRegion.ts';

/** Inductance that saturation might leave, and extra duty that losses might take, where neither is given. */
const saturationShare = 0.7;
const extraDuty = 1.05;

/** What the sizing takes for granted besides the spec's own keys, each with what it would cost if it fails. */
export function designAssumptions(design: SizedDesign): readonly Assumption[] {
  const { specification } = design.request;
  const { inductance } = specification;
  const { losses, load_A } = specification;
  const instead = `the least damping index is this instead of ${design.chosen.extremes.min.dampingIndex.toPrecision(4)}`;
  const assumptions: Assumption[] = [];
  if (inductance?.kind === 'value' && inductance.atPeakLimit_H === null)
    assumptions.push({
      key: 'inductance.atPeakLimit',
      value: leastIndex(design, saturationShare, 1),
      unit: '',
      reason: `not given: the inductor is taken not to saturate up to the peak limit; with 30 % less inductance there ${instead}`,
    });
  if (losses === null || load_A === null)
    assumptions.push({
      key: 'losses',
      value: leastIndex(design, 1, extraDuty),
      unit: '',
      reason: `${losses === null ? 'not given' : 'given without a load, at which they could count'}: the duty is that of a lossless stage; with 5 % more duty ${instead}`,
    });
  if (inductance?.kind === 'value' && inductance.value_H.from.nominal !== inductance.value_H.to.nominal)
    assumptions.push({
      key: 'inductance',
      value: design.corners.referenceInductance_H,
      unit: 'H',
      reason:
        'a range that the customer chooses from: gains refer to the least inductance of it, where the ramp binds',
    });
  if (design.demand.tracks === 'reference')
    assumptions.push({
      key: 'ramp.reference',
      value: rampReference.voltage_V,
      unit: 'V',
      reason:
        'the fixed ramp is fed from a reference of 2.5 V within 1 %, as a shunt reference or the controller offers',
    });
  const { borderLoad_A, notes } = lightLoad(specification, design.region, design.corners);
  const least_A = specification.load_A?.from.low ?? 0;
  if (least_A < borderLoad_A.high)
    assumptions.push({
      key: 'continuous conduction',
      value: borderLoad_A.high,
      unit: 'A',
      reason: notes.join(' '),
    });
  return assumptions;
}

/** Least damping index of the worst unit over the region with its inductance reduced or its duties stretched. */
function leastIndex(design: SizedDesign, inductanceShare: number, stretch: number): number {
  return Math.min(
    ...design.region.vertices.map((at) => indexWith(design, stretched(at, stretch), inductanceShare)),
  );
}

/** The ramp scales with what the inductance leaves. */
function indexWith(design: SizedDesign, at: RegionPoint, inductanceShare: number): number {
  const { chosen, corners, region, sizing } = design;
  const ramp_V = corners.at(at).lambda.low * sizing.spread.low * chosen.law.ramp_V(chosen.realisedGain, at);
  const own_V = ownRamp_V(region, corners, at).low;
  return dampingIndex(at.up_V, at.swing_V, inductanceShare * (ramp_V + own_V));
}

/** The same point with more duty, the swing as it was. */
function stretched(at: RegionPoint, stretch: number): RegionPoint {
  const duty = Math.min(1, at.duty * stretch);
  return { ...at, duty, up_V: at.swing_V * (1 - duty), down_V: at.swing_V * duty };
}
