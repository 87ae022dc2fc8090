import fc from 'fast-check';
import { afterAll, beforeAll, expect, inject, it } from 'vitest';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import { simulateDesign } from '../../generator/simulateDesign.ts';
import type { SpiceEngine } from '../../generator/spice/Deck.ts';
import { openEmbeddedEngine } from '../../generator/spice/engine/embedded.ts';
import { type Keys, requestOf } from '../support/request.ts';
import { randomKeys } from './support/randomKeys.ts';

/** Few, since each takes a second; `COUNTERSLOPE_BREADTH=100` looks wider. */
const wanted = Number(process.env.COUNTERSLOPE_BREADTH ?? 5);

/** Corners that once went wrong: each for a reason of its own. */
const corners: Readonly<Record<string, Keys>> = {
  'a 20 : 1 input at a high supply, where the mirror is hardly degenerated': {
    input: '2.7 V to 54 V',
    output: '1.795 V',
    inductance: '195.6 uH',
    frequency: '55.21 kHz ± 10 %',
    maximumDuty: '70 %',
    senseGain: '1 mOhm',
    load: '2 A',
    'ramp.supply': '12 V ± 5 %',
  },
  'resistances that damp the current within a cycle': {
    input: '4.061 V to 4.062 V',
    inductance: '13.91 uH ± 20 %',
    frequency: '58.39 kHz',
    maximumDuty: '60 %',
    'ramp.law': 'fixed',
    senseGain: '5 mOhm',
    load: '0.2 A to 2 A',
    'rectifier.drop': '0.4 V',
    'losses.switch': '0.1015 Ohm ± 20 %',
    'losses.winding': '0.1015 Ohm',
    'losses.rectifier': '0.05077 Ohm',
    'ramp.supply': '3.3 V ± 5 %',
    'goal.dampingIndex': 1,
  },
  'an on-time no longer than the buffer trails': {
    input: '2.7 V',
    output: '0.06156 V',
    inductance: '0.18 uH',
    frequency: '3000 kHz',
    maximumDuty: '80 %',
    'ramp.law': 'fixed',
    senseGain: '20 mOhm',
    'ramp.supply': '2.7 V',
    'goal.dampingIndex': 1.3,
  },
  'a clock edge that takes more than the ramp of the first half of the on-time': {
    input: '21.17 V to 375 V',
    inductance: '166.2 uH ± 20 %',
    frequency: '451.4 kHz ± 5 %',
    maximumDuty: '80 %',
    senseGain: '20 mOhm',
    load: '2 A',
    'ramp.supply': '3.3 V ± 5 %',
    'goal.dampingIndex': 1.3,
  },
};

let engine: SpiceEngine;
beforeAll(async () => {
  const opening = await openEmbeddedEngine();
  if (!opening.ok) throw new Error(opening.reason);
  engine = opening.engine;
});
afterAll(() => engine?.end());

it.each(Object.entries(corners))('%s simulates as sized', async (_, keys) => {
  await expectAsSized(await sized(keys), keys);
});

it(`the first ${wanted} designs of random specifications simulate as sized`, {
  timeout: 30_000 + 20_000 * wanted,
}, async () => {
  const drawn = fc.sample(randomKeys, { seed: inject('seed'), numRuns: 6 * wanted + 20 });
  let made = 0;
  for (const keys of drawn) {
    if (made === wanted) break;
    const design = await sized(keys);
    if (design === null) continue;
    made += 1;
    await expectAsSized(design, keys);
  }
  expect(made).toBe(wanted);
});

/** Null where there is no circuit, or no sound specification, with what was drawn. */
async function sized(keys: Keys): Promise<SizedDesign | null> {
  const request = await requestOf(keys).catch(() => null);
  const outcome = request === null ? null : sizeDesign(request);
  return outcome?.ok ? outcome.value : null;
}

async function expectAsSized(design: SizedDesign | null, keys: Keys) {
  expect(design, 'no circuit').not.toBeNull();
  const { simulation, failures } = await simulateDesign(design!, engine, { timeout_s: 60 });
  expect([...failures], JSON.stringify(keys)).toEqual([]);
  expect(
    simulation.decks.filter(({ passed }) => !passed),
    JSON.stringify(keys),
  ).toEqual([]);
}
