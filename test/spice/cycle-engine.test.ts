import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { rampFigures } from '../../generator/circuit/rampFigures.ts';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import type { ConverterDeck } from '../../generator/emit/deck/converterDeck.ts';
import { cyclePlan } from '../../generator/emit/deck/perturbation.ts';
import { type DeckSet, deckSet } from '../../generator/emit/deckSet.ts';
import type { CycleRun } from '../../generator/loop/cycle/CycleRun.ts';
import { periodicOrbit } from '../../generator/loop/cycle/periodicOrbit.ts';
import { runCycles } from '../../generator/loop/cycle/runCycles.ts';
import { readSpecification } from '../../generator/spec/readSpecification.ts';
import type { SpiceEngine, Waveforms } from '../../generator/spice/Deck.ts';
import { openEmbeddedEngine } from '../../generator/spice/engine/embedded.ts';
import { extremeBetween } from '../../generator/spice/measure/extremeBetween.ts';
import { slopeBetween } from '../../generator/spice/measure/slopeBetween.ts';
import { valueAt } from '../../generator/spice/measure/valueAt.ts';

/** Deviations from the steady state after the step, at clock edges and at peaks [A]. */
interface Response {
  readonly edges: readonly number[];
  readonly peaks: readonly number[];
}

const step = cyclePlan.shiftedEdges[0];
/** Cycles looked at after the step. */
const shown = 5;
/** Cycles before the step whose peaks make the steady one. */
const steady = [step - 4, step - 3, step - 2];
const stopCycles = step + shown + 1;

let engine: SpiceEngine;
let design: SizedDesign;
let decks: DeckSet;

beforeAll(async () => {
  const opening = await openEmbeddedEngine();
  if (!opening.ok) throw new Error(opening.reason);
  engine = opening.engine;
  const flags = {
    '--vin': '8 V to 36 V',
    '--vout': '5 V',
    '--l': '10 uH',
    '--fs': '500 kHz',
    '--load': '3 A',
  };
  const read = await readSpecification({
    document: null,
    flags: Object.entries(flags).map(([flag, value]) => ({ flag, value })),
    sets: [],
  });
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  const sized = sizeDesign(read.value);
  if (!sized.ok) throw new Error(JSON.stringify(sized.problems));
  design = sized.value;
  decks = deckSet(design);
});
afterAll(() => engine?.end());

/** The emitted deck with another time step, ended after the first of its two steps. */
async function simulate(file: string, { text, period_s }: ConverterDeck, steps: number): Promise<Waveforms> {
  const time_s = period_s / steps;
  const stop_s = stopCycles * period_s;
  const outcome = await engine.run(
    {
      file,
      text: text.replace(/^\.tran .*$/m, `.tran ${time_s} ${stop_s} 0 ${time_s} uic`),
      includes: { 'ramp.cir': decks.ramp },
      vectors: ['i(l1)', 'v(ramp)'],
      stopTime_s: stop_s,
    },
    { timeout_s: 120 },
  );
  if (!outcome.ok) throw new Error(outcome.reason);
  return outcome.waveforms;
}

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const following = Array.from({ length: shown }, (_, n) => step + n);

/** What SPICE shows; the step ends just before its clock edge. */
function responseOf({ time_s, vectors }: Waveforms, period_s: number): Response & { peak_A: number } {
  const current = vectors['i(l1)']!;
  const edge = (n: number) => valueAt(time_s, current, n * period_s);
  const peak = (n: number) => extremeBetween(time_s, current, n * period_s, (n + 1) * period_s).high;
  const steadyEdge = mean(steady.map((n) => edge(n)));
  const peak_A = mean(steady.map(peak));
  return {
    edges: following.map((n) => edge(n) - steadyEdge),
    peaks: following.map((n) => peak(n) - peak_A),
    peak_A,
  };
}

/** What errors of first order in the time step leave: from Ts/2000 and Ts/8000 to nothing. */
function extrapolate(coarse: readonly number[], fine: readonly number[]): number[] {
  return fine.map((value, place) => value + (value - coarse[place]!) / 3);
}

/** The engine on the deck's power stage, with the slope that the ramp block makes in that deck. */
function engineRun({ point, period_s }: ConverterDeck, waves: Waveforms): CycleRun {
  const from_s = (step - 3 + 0.3 * point.duty) * period_s;
  const to_s = (step - 3 + point.duty) * period_s;
  const capacitorSlope = slopeBetween(waves.time_s, waves.vectors['v(ramp)']!, from_s, to_s);
  const figures = rampFigures(design, point.inputVoltage_V);
  const gain = design.request.specification.senseGain_V_per_A.nominal;
  return {
    stage: {
      kind: 'ideal-output',
      inductance_H: design.corners.referenceInductance_H,
      up_V: point.inputVoltage_V - point.outputVoltage_V,
      down_V: point.outputVoltage_V,
      // What the deck gives ideal switches and windings.
      up_ohm: 0.5005e-3,
      down_ohm: 0.5005e-3,
    },
    rampSlope_A_per_s: (capacitorSlope * figures.senseSlope_V_per_s) / figures.capacitorSlope_V_per_s / gain,
    rampPerOutputVolt_A_per_Vs: 0,
    internalSlope_A_per_s: 0,
    control_A: 4,
    limit: null,
    timing: {
      period_s,
      maximumDuty: design.request.specification.maximumDutyRatio,
      minimumOnTime_s: 0,
      comparatorDelay_s: 0,
      skipsPulses: false,
      rectifies: false,
    },
    cycles: shown,
    initial: [3],
  };
}

function engineResponse(run: CycleRun, peak_A: number, shift_A: number): Response {
  const orbit = periodicOrbit(run, { quantity: 'peak', value: peak_A })!;
  const start = orbit.state[0]!;
  const record = runCycles({ ...run, control_A: orbit.control_A, initial: [start + shift_A] });
  return {
    edges: Array.from(record.edges[0]!.slice(0, shown), (value) => value - start),
    peaks: Array.from(record.peak_A, (value) => value - peak_A),
  };
}

/** Cycles until the deviation at the edges stays below a hundredth of the step. */
const settled = (edges: readonly number[]) =>
  edges.findLastIndex((value) => Math.abs(value) > 0.01 * Math.abs(edges[0]!)) + 1;

describe('the cycle engine against SPICE on the same step of the inductor current', () => {
  it.each(['converter-adaptive.cir', 'converter-adaptive-3.cir'])(
    'shows peaks of %s within a thousandth of the step, valleys within two, and settles in the same cycle',
    async (file) => {
      const deck = decks.converters.get(file)!;
      const fineRun = await simulate(file, deck, 8000);
      const fine = responseOf(fineRun, deck.period_s);
      const coarse = responseOf(await simulate(file, deck, 2000), deck.period_s);
      const edges = extrapolate(coarse.edges, fine.edges);
      const peaks = extrapolate(coarse.peaks, fine.peaks);
      const shift_A = edges[0]!;
      const own = engineResponse(engineRun(deck, fineRun), fine.peak_A, shift_A);
      const far = (spice: readonly number[], exact: readonly number[]) =>
        Math.max(...spice.map((value, n) => Math.abs(value - exact[n]!))) / Math.abs(shift_A);
      expect(Math.abs(shift_A)).toBeGreaterThan(0.1);
      expect(far(peaks, own.peaks)).toBeLessThan(1e-3);
      // The valleys come out within 0.05 % and 0.14 %, whatever the time step: the deck's switches and ramp are
      // not quite those of the engine.
      expect(far(edges, own.edges)).toBeLessThan(2e-3);
      expect(settled(own.edges)).toBe(settled(edges));
    },
    240_000,
  );
});
