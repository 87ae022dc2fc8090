import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { type DeckSet, deckSet } from '../../generator/emit/deckSet.ts';
import { simulateDesign } from '../../generator/simulateDesign.ts';
import type { SpiceEngine } from '../../generator/spice/Deck.ts';
import { openEmbeddedEngine } from '../../generator/spice/engine/embedded.ts';
import { designOf } from '../support/request.ts';
import { mainJob } from './support/designDecks.ts';

/** Deck texts of an edited folder, by file name. */
type Edited = ReadonlyMap<string, string>;

describe('the simulation of an edited design', () => {
  let engine: SpiceEngine;
  let design: SizedDesign;
  let set: DeckSet;

  beforeAll(async () => {
    const opening = await openEmbeddedEngine();
    if (!opening.ok) throw new Error(opening.reason);
    engine = opening.engine;
    design = await designOf(mainJob);
    set = deckSet(design);
  });
  afterAll(() => engine?.end());

  const simulate = async (texts: Edited) =>
    (await simulateDesign(design, engine, { timeout_s: 60, texts })).simulation;

  /** The ramp block with one line rewritten; fails where there is no such line. */
  const block = (line: RegExp, rewritten: string | ((line: string) => string)): Edited => {
    const found = line.exec(set.ramp)?.[0];
    if (found === undefined) throw new Error(`no line ${line} in ramp.cir`);
    const text = typeof rewritten === 'string' ? rewritten : rewritten(found);
    return new Map([['ramp.cir', set.ramp.replace(found, text)]]);
  };
  const scaled = (factor: number) => (line: string) =>
    line.replace(/\S+$/, (value) => String(Number(value) * factor));

  it('passes without an edit', async () => {
    const simulation = await simulate(new Map());
    expect(simulation.decks.filter(({ passed }) => !passed)).toEqual([]);
    expect(simulation.passed).toBe(true);
  });

  const edits: readonly [string, string, () => Edited][] = [
    ['a timing capacitor 20 % larger', 'capacitor slope', () => block(/^C1 .*$/m, scaled(1.2))],
    ['a doubled injection resistor', 'comparator slope', () => block(/^R7 .*$/m, scaled(2))],
    ['a removed reset switch', 'residual', () => block(/^MQ3 .*$/m, '* no switch')],
    ['a mirror resistor missing', 'capacitor slope', () => block(/^R6 .*$/m, '* no resistor')],
    ['a mirror resistor shorted', 'capacitor slope', () => block(/^R6 .*$/m, scaled(1e-6))],
    [
      'a ramp of the wrong sign at the buffer',
      'comparator slope',
      () =>
        block(
          /^R7 buffer sense (\S+)$/m,
          (line) => `Eturned turned 0 0 buffer 1\n${line.replace('buffer', 'turned')}`,
        ),
    ],
    ['a set resistor a twentieth smaller', 'capacitor slope', () => block(/^R4 .*$/m, scaled(0.95))],
  ];
  it.each(edits)('says no to %s, by its %s', async (_, quantity, edited) => {
    const simulation = await simulate(edited());
    expect(simulation.passed).toBe(false);
    const failed = simulation.decks.filter(({ passed }) => !passed);
    expect(failed.map((check) => check.quantity)).toContain(quantity);
    // The converter decks carry the same block, so that the loop shows it as well.
    if (quantity !== 'residual') expect(failed.map((check) => check.quantity)).toContain('cycle ratio');
  });

  it('says no to the two laws swapped', async () => {
    const swapped = new Map(
      [...set.converters.keys()].map((file) => {
        const other = file.includes('adaptive')
          ? file.replace('adaptive', 'fixed')
          : file.replace('fixed', 'adaptive');
        const source = set.converters.get(other)!.text;
        // Only what drives the block's port: the operating point stays.
        const track = /^Vref ref 0 .*$/m.exec(source)?.[0] ?? '* The slope follows Vin itself';
        const port = track.startsWith('Vref') ? 'ref' : 'vin';
        const own = set.converters.get(file)!.text;
        const text = own
          .replace(/^(Vref ref 0 .*|\* The slope follows Vin itself)$/m, track)
          .replace(/^X1 \S+/m, `X1 ${port}`);
        expect(text).not.toBe(own);
        return [file, text] as const;
      }),
    );
    const { passed, decks } = await simulate(swapped);
    expect(passed).toBe(false);
    expect(decks.filter((check) => check.file === 'ramp-test.cir').every((check) => check.passed)).toBe(true);
  });

  it('fails the checks of a deck that the engine cannot run, and leaves the others standing', async () => {
    const broken = set.converters.get('converter-fixed.cir')!.text.replace(/^L1 .*$/m, 'L1 switch');
    const run = await simulateDesign(design, engine, {
      timeout_s: 60,
      texts: new Map([['converter-fixed.cir', broken]]),
    });
    expect(run.simulation.passed).toBe(false);
    expect([...run.failures.keys()]).toEqual(['converter-fixed.cir']);
    for (const check of run.simulation.decks) {
      expect(check.passed, `${check.quantity} of ${check.file}`).toBe(check.file !== 'converter-fixed.cir');
      if (check.file === 'converter-fixed.cir') expect(check.measured).toBeNull();
    }
  });
});
