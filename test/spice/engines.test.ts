import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Deck, SpiceEngine, Waveforms } from '../../generator/spice/Deck.ts';
import { openEmbeddedEngine } from '../../generator/spice/engine/embedded.ts';
import { openInstalledEngine } from '../../generator/spice/engine/installed.ts';
import { runDecks } from '../../generator/spice/engine/runDecks.ts';
import { valueAt } from '../../generator/spice/measure/valueAt.ts';
import { deckOf, latchDeck, RC_LINES, RC_TIME_CONSTANT_S, rcDeck, subcircuitDeck } from './support/decks.ts';
import { runGnucap } from './support/gnucap.ts';
import { describeWith, GNUCAP, NGSPICE } from './support/require.ts';

const TIMEOUT_S = 20;

/** Decks that engines end in their own ways, none of which may pass for a run. */
const FAILURES: readonly (readonly [string, Deck, RegExp])[] = [
  ['a resistor without its second node', deckOf([...RC_LINES, 'R2 in']), /complained/],
  ['a directive that does not exist', deckOf([...RC_LINES, '.foo bar']), /complained/],
  ['a subcircuit that is not there', deckOf([...RC_LINES, 'X1 in out nosuch']), /complained/],
  ['an include that is not there', deckOf([...RC_LINES, '.include absent.cir']), /absent\.cir/],
  ['two voltage sources in conflict', deckOf([...RC_LINES, 'V2 in 0 5']), /complained/],
  [
    'an equation without a solution',
    deckOf([...RC_LINES, 'B1 q 0 V=1e30*exp(1e3*v(q))', 'R9 q 0 1']),
    /Timestep too small/i,
  ],
  ['no analysis', { ...rcDeck, text: rcDeck.text.replace(/^\.tran.*\n/m, '') }, /complained|no waveforms/],
  ['a vector that does not exist', { ...rcDeck, vectors: ['v(out)', 'v(nope)'] }, /v\(nope\)/],
  ['only vectors that do not exist', { ...rcDeck, vectors: ['v(nope)'] }, /complained/],
  ['an analysis that ends early', { ...rcDeck, stopTime_s: 2e-3 }, /ended at 0\.001 s, not at 0\.002 s/],
  ['an empty deck', { ...rcDeck, text: '' }, /complained|no waveforms|an earlier one/],
];

/** A thousand million steps. */
const endlessDeck: Deck = { ...rcDeck, text: rcDeck.text.replace('1m 0 1u', '1000 0 1u'), stopTime_s: 1000 };

function expectRcCurve({ time_s, vectors }: Waveforms): void {
  for (const t of [5e-5, 1e-4, 2e-4, 5e-4, 1e-3]) {
    const decay = Math.exp(-t / RC_TIME_CONSTANT_S);
    expect(valueAt(time_s, vectors['v(out)']!, t)).toBeCloseTo(1 - decay, 3);
    expect(valueAt(time_s, vectors['i(v1)']!, t) * 1e3).toBeCloseTo(-decay, 3);
  }
}

function expectHysteresis({ time_s, vectors }: Waveforms): void {
  const out = (t: number) => valueAt(time_s, vectors['v(out)']!, t);
  expect(out(0.1e-3)).toBeGreaterThan(0.99);
  expect(out(0.3e-3)).toBeLessThan(0.01);
  expect(out(0.5e-3)).toBeLessThan(0.01);
  expect(out(0.7e-3)).toBeGreaterThan(0.99);
  expect(out(0.9e-3)).toBeGreaterThan(0.99);
}

function itIsAnEngine(open: () => Promise<SpiceEngine>): void {
  let engine: SpiceEngine;
  beforeAll(async () => {
    engine = await open();
  }, 60_000);
  afterAll(() => engine.end());

  const waveformsOf = async (deck: Deck): Promise<Waveforms> => {
    const outcome = await engine.run(deck, { timeout_s: TIMEOUT_S });
    if (!outcome.ok) throw new Error(`${outcome.reason}\n${outcome.log}`);
    return outcome.waveforms;
  };

  it('names its version', () => {
    expect(engine.version).toMatch(/^\d+(\.\d+)*$/);
  });

  it('charges a capacitor as the closed form says', async () => {
    expectRcCurve(await waveformsOf(rcDeck));
  });

  it('delivers the wanted vectors and no others, equally long', async () => {
    const { time_s, vectors } = await waveformsOf(rcDeck);
    expect(Object.keys(vectors)).toEqual(['v(out)', 'i(v1)']);
    for (const column of Object.values(vectors)) expect(column.length).toBe(time_s.length);
  });

  it('keeps the state of a latch made of a switch with hysteresis', async () => {
    expectHysteresis(await waveformsOf(latchDeck));
  });

  it('runs a subcircuit out of an included file', async () => {
    const { time_s, vectors } = await waveformsOf(subcircuitDeck);
    expect(valueAt(time_s, vectors['v(out)']!, RC_TIME_CONSTANT_S)).toBeCloseTo(1 - Math.exp(-1), 3);
  });

  it('finds no include that only an earlier deck had', async () => {
    await waveformsOf(subcircuitDeck);
    const outcome = await engine.run({ ...subcircuitDeck, includes: {} }, { timeout_s: TIMEOUT_S });
    expect(outcome).toMatchObject({ ok: false });
  });

  it.each(FAILURES)('fails on %s, and the next good deck runs', async (_title, deck, reason) => {
    await waveformsOf(rcDeck);
    const outcome = await engine.run(deck, { timeout_s: TIMEOUT_S });
    expect(outcome).toMatchObject({ ok: false, reason: expect.stringMatching(reason) });
    expectRcCurve(await waveformsOf(rcDeck));
  });

  it('ends an endless run at its time limit, and the next good deck runs', async () => {
    const begun = performance.now();
    const outcome = await engine.run(endlessDeck, { timeout_s: 0.5 });
    expect(outcome).toMatchObject({
      ok: false,
      reason: expect.stringContaining('not finished within 0.5 s'),
    });
    expect(performance.now() - begun).toBeLessThan(3000);
    expectRcCurve(await waveformsOf(rcDeck));
  });

  it('takes words of alarm in a title for words', async () => {
    const text = rcDeck.text.replace('* test deck', '* fatal error: run aborted, singular matrix');
    expectRcCurve(await waveformsOf({ ...rcDeck, text }));
  });

  it('runs a deck with carriage returns', async () => {
    expectRcCurve(await waveformsOf({ ...rcDeck, text: rcDeck.text.replaceAll('\n', '\r\n') }));
  });

  it('refuses a deck with a control block without running it', async () => {
    const text = rcDeck.text.replace('.end\n', '.control\nshell touch made-by-a-deck\n.endc\n.end\n');
    const outcome = await engine.run({ ...rcDeck, text }, { timeout_s: TIMEOUT_S });
    expect(outcome).toMatchObject({ ok: false, reason: expect.stringContaining('engine commands') });
  });
}

describe('the embedded engine', () => {
  itIsAnEngine(async () => {
    const opening = await openEmbeddedEngine();
    if (!opening.ok) throw new Error(opening.reason);
    return opening.engine;
  });

  it('says why where its worker cannot be loaded', async () => {
    const opening = await openEmbeddedEngine({ workerUrl: new URL('./no-such-worker.mjs', import.meta.url) });
    expect(opening).toMatchObject({ ok: false, reason: expect.stringContaining('did not start') });
  });

  it('gives outcomes in the order of the decks, whatever the number of lanes', async () => {
    const failing = deckOf([...RC_LINES, 'R2 in']);
    const runs = await runDecks(openEmbeddedEngine, [rcDeck, failing, latchDeck], {
      timeout_s: TIMEOUT_S,
      lanes: 2,
    });
    if (!runs.ok) throw new Error(runs.reason);
    expect(runs.outcomes.map((outcome) => outcome.ok)).toEqual([true, false, true]);
    const [rc, , latch] = runs.outcomes;
    if (rc?.ok) expectRcCurve(rc.waveforms);
    if (latch?.ok) expectHysteresis(latch.waveforms);
  });
});

describeWith([NGSPICE], 'the installed engine', () => {
  itIsAnEngine(async () => {
    const opening = await openInstalledEngine({ env: process.env });
    if (!opening.ok) throw new Error(opening.reason);
    return opening.engine;
  });
});

describe('without an installed engine', () => {
  it('the opening says how to install it', async () => {
    const opening = await openInstalledEngine({ env: { PATH: '/nowhere' } });
    expect(opening).toMatchObject({ ok: false, reason: expect.stringContaining('apt-get install ngspice') });
  });

  it('a set of decks ends with the reason', async () => {
    const runs = await runDecks(() => openInstalledEngine({ env: {} }), [rcDeck], { timeout_s: TIMEOUT_S });
    expect(runs).toMatchObject({ ok: false, reason: expect.stringContaining('ngspice') });
  });
});

describeWith([GNUCAP], 'gnucap', () => {
  it.each([
    ['an RC', rcDeck, expectRcCurve],
    ['a latch', latchDeck, expectHysteresis],
  ] as const)('runs the same deck of %s, unchanged and without complaint', async (_title, deck, expectIt) => {
    const run = await runGnucap(deck);
    expect(run.complaints).toEqual([]);
    expectIt(run.waveforms!);
  });

  it('runs a subcircuit out of an included file', async () => {
    const run = await runGnucap(subcircuitDeck);
    expect(run.complaints).toEqual([]);
    const { time_s, vectors } = run.waveforms!;
    expect(valueAt(time_s, vectors['v(out)']!, RC_TIME_CONSTANT_S)).toBeCloseTo(1 - Math.exp(-1), 3);
  });

  it.each([
    ['a line it does not understand', deckOf([...RC_LINES, '.foo bar'])],
    ['a save line', deckOf([...RC_LINES, '.save v(out)'])],
    ['a model that is not there', deckOf([...RC_LINES, 'D1 in 0 nosuch'])],
    ['an include that is not there', deckOf(['.include absent.cir', ...RC_LINES])],
    ['a vector that does not exist', deckOf(RC_LINES, { vectors: ['v(nope)'] })],
  ])('has its complaint about %s reported', async (_title, deck) => {
    expect((await runGnucap(deck)).complaints).not.toEqual([]);
  });
});
