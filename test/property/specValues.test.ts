import fc from 'fast-check';
import { expect, test } from 'vitest';
import { type DimensionName, dimensions } from '../../generator/spec/values/dimensions.ts';
import { readSpan } from '../../generator/spec/values/readSpan.ts';
import { applyTolerance } from '../../generator/spec/values/tolerance.ts';
import { writeSpan } from '../../generator/spec/values/writeSpan.ts';

const seed = 60062;
const names = Object.keys(dimensions) as DimensionName[];

/** Values of up to seven digits, spread evenly over the decades that the dimension allows. */
function magnitude(name: DimensionName) {
  const { least, most } = dimensions[name];
  const [low, high] = [Math.ceil(Math.log10(least)), Math.floor(Math.log10(most)) - 1];
  return fc
    .record({
      digits: fc.integer({ min: 1_000_000, max: 9_999_999 }),
      decade: fc.integer({ min: low, max: high }),
    })
    .map(({ digits, decade }) => Number(`${digits}e${decade - 6}`));
}

const percent = fc.integer({ min: 0, max: 9999 }).map((hundredths) => hundredths / 10_000);
const toleranceRatios = fc.record({ up: percent, down: percent });

function quantity(name: DimensionName) {
  return fc
    .record({ nominal: magnitude(name), ratios: toleranceRatios })
    .map(({ nominal, ratios }) =>
      applyTolerance(nominal, { up: { ratio: ratios.up }, down: { ratio: ratios.down } }),
    );
}

test('a value or range with tolerances, once written, reads back to the very same numbers', () => {
  const spans = fc.constantFrom(...names).chain((name) =>
    fc.record({
      name: fc.constant(name),
      ends: fc.tuple(quantity(name), quantity(name)),
      isRange: fc.boolean(),
    }),
  );
  fc.assert(
    fc.property(spans, ({ name, ends, isRange }) => {
      const [from, to] = [...ends].sort((a, b) => a.nominal - b.nominal);
      const span = isRange ? { from: from!, to: to! } : { from: from!, to: from! };
      const reading = readSpan(writeSpan(span, name), { dimension: name, range: true, tolerance: true });
      expect(reading).toMatchObject({ ok: true, value: { span } });
    }),
    { seed, numRuns: 2000 },
  );
});

test('a tolerance given as a distance survives being written as well', () => {
  const texts = fc
    .record({
      volts: fc.integer({ min: 10, max: 9999 }),
      up: fc.integer({ min: 1, max: 9 }),
      down: fc.integer({ min: 1, max: 9 }),
    })
    .map(({ volts, up, down }) => `${volts / 100} V +${up / 100} V -${down / 100} V`);
  const form = { dimension: 'voltage', tolerance: true } as const;
  fc.assert(
    fc.property(texts, (text) => {
      const first = readSpan(text, form);
      if (!first.ok) throw new Error(first.fault.code);
      const again = readSpan(writeSpan(first.value.span, 'voltage'), form);
      expect(again).toMatchObject({ ok: true, value: { span: first.value.span } });
    }),
    { seed, numRuns: 1000 },
  );
});

const isControl = (character: string) => {
  const code = character.charCodeAt(0);
  return code < 0x20 || (code > 0x7e && code < 0xa0);
};

const pieces = [
  '8',
  '36',
  '.',
  '..',
  ',',
  ' ',
  'V',
  'uH',
  'k',
  'M',
  'm',
  '%',
  '±',
  '+',
  '-',
  ' to ',
  '–',
  '/',
  'e',
  'Ω',
  'µ',
  '4k7',
  'NaN',
  '0',
  '\n',
  '"',
];
const nearMisses = fc.array(fc.constantFrom(...pieces), { maxLength: 12 }).map((parts) => parts.join(''));

test('any text is read or refused with a code, what is wanted and how to mend it', () => {
  const texts = fc.oneof(nearMisses, fc.string({ unit: 'binary', maxLength: 40 }));
  fc.assert(
    fc.property(texts, fc.constantFrom(...names), (text, dimension) => {
      const reading = readSpan(text, { dimension, range: true, tolerance: true });
      if (reading.ok) {
        const { from, to } = reading.value.span;
        for (const { low, nominal, high } of [from, to]) {
          expect(0 < low && low <= nominal && nominal <= high && Number.isFinite(high)).toBe(true);
        }
        expect(from.nominal).toBeLessThanOrEqual(to.nominal);
      } else {
        const { code, expected, received, fix } = reading.fault;
        expect([code, expected, received, fix].every((field) => field.length > 0)).toBe(true);
        expect([...received].every((character) => !isControl(character))).toBe(true);
      }
    }),
    { seed, numRuns: 5000 },
  );
});
