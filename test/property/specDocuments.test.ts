import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { SpecKey } from '../../generator/spec/keys/SpecKey.ts';
import { specKeys } from '../../generator/spec/keys/specKeys.ts';
import { readSpecification } from '../../generator/spec/readSpecification.ts';

const seed = 4242;

/** Keys that need no other and exclude no other. */
const independent = specKeys.filter(
  ({ path }) =>
    !/^(inductance|goal\.damping|outputCapacitor\.seriesResistance|controller\.oscillator)/.test(path),
);
const required = independent.filter((key) => key.required === true);
const someKeys = fc
  .subarray(independent.filter((key) => key.required !== true) as SpecKey[])
  .map((optional) => [...required, ...optional]);

/** Nested maps in flow style, each key with its example in quotes. */
function documentOf(keys: readonly SpecKey[]): string {
  const root: Record<string, unknown> = {};
  for (const { path, example } of keys) {
    const names = path.split('.');
    const last = names.pop()!;
    let group = root;
    for (const name of names) {
      group[name] ??= {};
      group = group[name] as Record<string, unknown>;
    }
    group[last] = example;
  }
  return JSON.stringify(root);
}

test('the same keys in a document, by --set or mixed give the same specification and the same assumptions', async () => {
  await fc.assert(
    fc.asyncProperty(someKeys, fc.infiniteStream(fc.boolean()), async (keys, coin) => {
      const [inDocument, bySet]: [SpecKey[], SpecKey[]] = [[], []];
      for (const key of keys) (coin.next().value ? inDocument : bySet).push(key);
      const sets = (some: readonly SpecKey[]) => some.map(({ path, example }) => `${path}=${example}`);
      const requests = [
        { document: { name: '-', text: documentOf(keys) }, flags: [], sets: [] },
        { document: null, flags: [], sets: sets(keys) },
        { document: { name: '-', text: documentOf(inDocument) }, flags: [], sets: sets(bySet) },
      ];
      const outcomes = await Promise.all(requests.map(readSpecification));
      const read = outcomes.map((outcome) =>
        outcome.ok ? [outcome.value.specification, outcome.value.assumptions] : outcome.problems,
      );
      expect(outcomes[0]!.ok).toBe(true);
      expect(read[1]).toEqual(read[0]);
      expect(read[2]).toEqual(read[0]);
    }),
    { seed, numRuns: 60 },
  );
});

test('a key that is given is never filled in', async () => {
  await fc.assert(
    fc.asyncProperty(someKeys, async (keys) => {
      const outcome = await readSpecification({
        document: { name: '-', text: documentOf(keys) },
        flags: [],
        sets: [],
      });
      if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
      const filled = outcome.value.assumptions.filter(
        ({ reason }) => !reason.startsWith('given without a tolerance'),
      );
      expect(filled.filter(({ key }) => keys.some(({ path }) => path === key))).toEqual([]);
    }),
    { seed, numRuns: 60 },
  );
});

const fragments = [
  'input: 8 V',
  'frequency: 1 MHz',
  '\n',
  '  ',
  '- ',
  ': ',
  '{',
  '}',
  '[',
  ']',
  '&a ',
  '*a',
  '!t ',
  '? ',
  '"',
  "'",
  '#',
  '|',
  '>',
  '%YAML 1.1\n',
  '---',
  '...',
  '\t',
  '<<: ',
  'ramp:',
  '\u0000',
  '\u0085',
  '~',
  '@',
  ', ',
  'output: ',
];
const brokenDocuments = fc.oneof(
  fc.array(fc.constantFrom(...fragments), { maxLength: 30 }).map((parts) => parts.join('')),
  fc.string({ unit: 'binary', maxLength: 60 }),
);

test('any text is read, or refused with problems that each have a place, and never throws', async () => {
  await fc.assert(
    fc.asyncProperty(brokenDocuments, async (text) => {
      const outcome = await readSpecification({ document: { name: 'rail.yaml', text }, flags: [], sets: [] });
      if (outcome.ok) return;
      expect(outcome.problems.length).toBeGreaterThan(0);
      for (const { place, fix } of outcome.problems) {
        expect(place?.path).toBe('rail.yaml');
        expect(fix).not.toBe('');
      }
    }),
    { seed, numRuns: 600 },
  );
});
