import { followerLag_s } from '../../circuit/DeviceModels.ts';
import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import { leastDuty } from '../../region/buildRegion.ts';
import { type RegionPoint, regionPoint } from '../../region/OperatingRegion.ts';
import { nominalDrops } from '../../region/stageDrops.ts';

/** Kept clear of the clocked turn-off, which would end the on-time in place of the comparator. */
const dutyMargin = 0.02;
/** Below, an on-time has too few time steps. */
const dutyFloor = 0.04;
/** On-time that the buffer needs to reach the ramp's own slope, in its time constants. */
const lagsToSettle = 10;
/** Resolution with which a point is moved. */
const moves = 50;

/**
 * Operating points at which a law is simulated: its worst first, its most over-compensated, and points
 * between these and the middle of the region.
 *
 * Each is moved to where the duty can be observed, and where the block can carry the slope.
 * @param fits whether the block can make the law's slope at an input voltage
 */
export function checkPoints(
  design: SizedDesign,
  law: SizedLaw,
  fits: (inputVoltage_V: number) => boolean,
): readonly RegionPoint[] {
  const worst = observable(design, law.extremes.min.at);
  const carried = ({ inputVoltage_V }: RegionPoint) => fits(inputVoltage_V);
  const reach = (point: RegionPoint) =>
    nearestOnWay(design, point, [worst, ...sameOutput(design, point)], carried) ?? worst;
  const over = reach(observable(design, law.extremes.max.at));
  const halfWay = (point: RegionPoint) =>
    reach(observable(design, mix(design, point, centre(design, point), 0.5)));
  const far = reach(observable(design, farthest(design, worst)));
  return distinct([worst, over, halfWay(worst), far, halfWay(over), halfWay(far)]).slice(0, 3);
}

/** The vertex whose input voltage is farthest, as a ratio: where the most over-compensated is the worst itself. */
function farthest({ region }: SizedDesign, from: RegionPoint): RegionPoint {
  const distance = (point: RegionPoint) => Math.abs(Math.log(point.inputVoltage_V / from.inputVoltage_V));
  return region.vertices.reduce((a, b) => (distance(b) > distance(a) ? b : a));
}

/**
 * The nearest point at which the comparator ends the on-time, with the ramp settled by then: of the same
 * output if it has one.
 *
 * Where no output has one, that of the longest on-time which the comparator still ends.
 */
function observable(design: SizedDesign, from: RegionPoint): RegionPoint {
  const { specification } = design.request;
  const settled = (lagsToSettle * followerLag_s) / design.demand.period_s;
  const low = Math.max(dutyFloor, leastDuty(specification), settled);
  const high = specification.maximumDutyRatio - dutyMargin;
  const isEnded = ({ duty, outputVoltage_V }: RegionPoint) => duty <= high && outputVoltage_V > 0;
  const accepts = (point: RegionPoint) => isEnded(point) && point.duty >= low;
  const { vertices } = design.region;
  for (const start of [from, ...vertices]) {
    const found = nearestOnWay(design, start, [centre(design, start), ...sameOutput(design, start)], accepts);
    if (found !== null) return found;
  }
  const ended = vertices.filter(isEnded);
  const longest = (ended.length > 0 ? ended : vertices).reduce((a, b) => (b.duty > a.duty ? b : a));
  return mix(design, longest, longest, 0);
}

/** The first point that is accepted on any of the ways, none where there is none. */
function nearestOnWay(
  design: SizedDesign,
  from: RegionPoint,
  ways: readonly RegionPoint[],
  accepts: (point: RegionPoint) => boolean,
): RegionPoint | null {
  for (let move = 0; move <= moves; move += 1) {
    const point = ways.map((to) => mix(design, from, to, move / moves)).find(accepts);
    if (point !== undefined) return point;
  }
  return null;
}

function sameOutput({ region }: SizedDesign, point: RegionPoint): readonly RegionPoint[] {
  return region.vertices.filter((vertex) => vertex.outputIndex === point.outputIndex);
}

/** Mean of the vertices that belong to the same output. */
function centre(design: SizedDesign, from: RegionPoint): RegionPoint {
  const same = sameOutput(design, from);
  const mean = (pick: (point: RegionPoint) => number) =>
    same.reduce((sum, point) => sum + pick(point), 0) / same.length;
  return {
    ...from,
    inputVoltage_V: mean((point) => point.inputVoltage_V),
    outputVoltage_V: mean((point) => point.outputVoltage_V),
  };
}

/** A point between two of the same output, for a nominal unit at full load; of two outputs, the first. */
function mix(design: SizedDesign, a: RegionPoint, b: RegionPoint, t: number): RegionPoint {
  const share = a.outputIndex === b.outputIndex ? t : 0;
  const between = (from: number, to: number) => from + share * (to - from);
  const { specification } = design.request;
  const point = {
    inputVoltage_V: between(a.inputVoltage_V, b.inputVoltage_V),
    outputVoltage_V: between(a.outputVoltage_V, b.outputVoltage_V),
    loadCurrent_A: specification.load_A?.to.nominal ?? 0,
  };
  return regionPoint(design.region.stage, point, nominalDrops(specification), a.outputIndex);
}

function distinct(points: readonly RegionPoint[]): RegionPoint[] {
  const near = (a: number, b: number) => Math.abs(a - b) <= 1e-3 * Math.max(Math.abs(a), Math.abs(b));
  const same = (a: RegionPoint, b: RegionPoint) =>
    near(a.inputVoltage_V, b.inputVoltage_V) && near(a.outputVoltage_V, b.outputVoltage_V);
  return points.filter((point, index) => !points.slice(0, index).some((other) => same(point, other)));
}
