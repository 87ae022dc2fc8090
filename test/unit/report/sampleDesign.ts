import { rampFigures } from '../../../generator/circuit/rampFigures.ts';
import type { SizedDesign } from '../../../generator/circuit/SizedDesign.ts';
import { design, designResult, ruleQuantities } from '../../../generator/design.ts';
import { clockTiming } from '../../../generator/emit/deck/deckTiming.ts';
import { cyclePlan } from '../../../generator/emit/deck/perturbation.ts';
import { rampTestDeck } from '../../../generator/emit/deck/rampTestDeck.ts';
import { deckSet } from '../../../generator/emit/deckSet.ts';
import type { Result, Simulation } from '../../../generator/emit/resultSchema.ts';
import { evaluateRules } from '../../../generator/rules/evaluateRules.ts';
import { shippedDeck } from '../../../generator/rules/shippedDeck.ts';
import { readSpecification } from '../../../generator/spec/readSpecification.ts';
import type { CheckedDeck } from '../../../generator/spice/check/Check.ts';
import { loopChecks } from '../../../generator/spice/check/loopChecks.ts';
import { rampChecks } from '../../../generator/spice/check/rampChecks.ts';
import { simulateDecks } from '../../../generator/spice/check/simulateDecks.ts';
import type { Waveforms } from '../../../generator/spice/Deck.ts';

export const unknownOutput = 'input: 8 V to 36 V\ninductance: 10 uH\nfrequency: 500 kHz\n';
export const oneOutput = `${unknownOutput}output: 5 V\n`;

/** The sizing of a specification given as YAML. */
export async function sized(text: string): Promise<SizedDesign> {
  const read = await readSpecification({ document: { name: 'spec.yaml', text }, flags: [], sets: [] });
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  const outcome = design(read.value);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.value;
}

export function resultWith(sizedDesign: SizedDesign, simulation: Simulation | null): Result {
  return designResult(sizedDesign, evaluateRules(shippedDeck.rules, ruleQuantities(sizedDesign)), simulation);
}

/** A simulation whose waveforms are those of the closed forms, `slopeError` apart: no engine, no seconds. */
export async function idealSimulation(sizedDesign: SizedDesign, slopeError = 0) {
  const decks = deckSet(sizedDesign);
  const waves = new Map<string, Waveforms>([
    ['ramp-test.cir', idealRamp(sizedDesign, 1 + slopeError)],
    ...[...decks.converters].map(([file, deck]): [string, Waveforms] => [
      file,
      idealCurrent(deck.period_s, deck.cycleRatio),
    ]),
  ]);
  const engine = {
    kind: 'embedded' as const,
    version: 'closed form',
    run: async ({ file }: CheckedDeck['deck']) => ({ ok: true as const, waveforms: waves.get(file)! }),
    end: async () => {},
  };
  const checks = [rampChecks(sizedDesign, decks), ...loopChecks(decks)];
  return simulateDecks(checks, engine, { timeout_s: 1 });
}

const perPeriod = 500;

function idealRamp(sizedDesign: SizedDesign, scale: number): Waveforms {
  const { levels, stop_s } = rampTestDeck(sizedDesign);
  const { period_s, rise_s, edge_s } = clockTiming(sizedDesign);
  const { demand, sizing } = sizedDesign;
  const share = sizing.sense_ohm / (sizing.sense_ohm + sizing.summing_ohm);
  const dwell_s = stop_s / levels.length;
  const time_s = columnOf(Math.round((stop_s / period_s) * perPeriod) + 1, (n) => (n / perPeriod) * period_s);
  const ramp = time_s.map((t) => {
    const level = levels[Math.min(levels.length - 1, Math.floor((t + 1e-12) / dwell_s))]!;
    const track_V = demand.tracks === 'input' ? level.inputVoltage_V : demand.track_V.high;
    const { amplitude_V, residual_V, capacitorSlope_V_per_s } = rampFigures(sizedDesign, track_V);
    const phase = t % period_s;
    const rising = amplitude_V + capacitorSlope_V_per_s * (phase - (rise_s - edge_s));
    return phase <= rise_s - edge_s / 2 ? scale * Math.max(rising, 0) : residual_V;
  });
  return { time_s, vectors: { 'v(ramp)': ramp, 'v(sense)': ramp.map((volts) => share * volts) } };
}

/** A triangle at the edges of which the deviation obeys δ[n+1] = α·δ[n]. */
function idealCurrent(period_s: number, ratio: number): Waveforms {
  const time_s = columnOf(cyclePlan.total * perPeriod + 1, (n) => (n / perPeriod) * period_s);
  const deviation = (cycle: number) =>
    cyclePlan.shiftedEdges.reduce(
      (sum, edge) => sum + (cycle >= edge ? 0.2 * ratio ** (cycle - edge) : 0),
      0,
    );
  const current = time_s.map((_, n) => {
    const [cycle, phase] = [Math.floor(n / perPeriod), (n % perPeriod) / perPeriod];
    return 1 + 0.3 * Math.min(phase / 0.7, (1 - phase) / 0.3) + deviation(cycle);
  });
  return { time_s, vectors: { 'i(l1)': current, 'v(ramp)': current, 'v(sense)': current } };
}

function columnOf(length: number, value: (index: number) => number): Float64Array {
  return Float64Array.from({ length }, (_, index) => value(index));
}
