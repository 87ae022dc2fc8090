import { describe, expect, it } from 'vitest';
import { benchPlan } from '../../../generator/report/benchPlan.ts';
import { comparisonTable } from '../../../generator/report/lawComparison.ts';
import { spreadChart } from '../../../generator/report/spreadChart.ts';
import type { TableView } from '../../../generator/report/table.ts';
import { worstCornerTable } from '../../../generator/report/worstCorner.ts';
import { oneOutput, sized, unknownOutput } from './sampleDesign.ts';

const tolerances =
  'input: 9 V to 60 V\noutput: 0.8 V to 30 V\ninductance: 47 uH ± 20 %\nfrequency: 150 kHz ± 10 %\n' +
  'senseGain: 50 mV/A ± 5 %\nload: 0.3 A to 3 A\n';

function cellsOf({ rows }: TableView, head: string): string[] {
  const row = rows.find((candidate) => candidate.head === head)!;
  return row.cells.map(({ text }) => text.replaceAll('\u00a0', ' '));
}

/** A number with an engineering prefix and unit, in SI. */
function numberOf(text: string): number {
  const [, digits, prefix] = /^[+≤≥]?\s*(−?[\d.]+) ?([pnµmkM]?)(?:$|[VAsFHΩ%])/.exec(text)!;
  const scale = { p: 1e-12, n: 1e-9, µ: 1e-6, m: 1e-3, '': 1, k: 1e3, M: 1e6 }[prefix!]!;
  return Number(digits!.replace('−', '-')) * scale;
}

/** What a line of figures with · − / π and parentheses comes to; units are left out. */
function reckoned(formula: string): number {
  const plain = formula
    .replaceAll('·', '*')
    .replaceAll('−', '-')
    .replaceAll('π(', 'Math.PI*(')
    .replace(/ V\b/g, '');
  if (!/^[\d\s.*+/()-]|Math\.PI/.test(plain)) throw new Error(`not a formula: ${plain}`);
  return Number(new Function(`return ${plain}`)());
}

describe('the worst-case table', () => {
  it.each([unknownOutput, oneOutput, tolerances, `${oneOutput}ramp: { law: fixed }\n`])(
    'shows numbers that give the figure beside them: %s',
    async (text) => {
      const table = worstCornerTable(await sized(text));
      for (const head of ['least damping index', 'greatest damping index', 'greatest Q at fs/2']) {
        const [, , numbers, result] = cellsOf(table, head);
        expect(reckoned(numbers!) / numberOf(result!), head).toBeCloseTo(1, 2);
      }
    },
  );

  it('has every figure within its limit for a design that meets its goal', async () => {
    const table = worstCornerTable(await sized(`${oneOutput}ramp: { law: fixed }\n`));
    const held = table.rows.filter(({ cells }) => /^[≤≥]/.test(cells[4]!.text));
    expect(held.length).toBeGreaterThanOrEqual(6);
    for (const { head, cells } of held) {
      const [result, limit] = [cells[3]!, cells[4]!].map(({ text }) =>
        numberOf(text.replaceAll('\u00a0', ' ')),
      );
      const sign = cells[4]!.text.startsWith('≤') ? 1 : -1;
      expect(sign * (limit! - result!), head).toBeGreaterThanOrEqual(0);
    }
  });
});

describe('the bench test', () => {
  it('expects figures inside its own limits, and leaves fields to write in', async () => {
    const { rows, columns } = benchPlan(await sized(tolerances));
    expect(columns.slice(-2).map(({ className }) => className)).toEqual(['write', 'write']);
    const slopes = rows.filter(({ cells }) => cells[1]!.text === 'slope of the rise');
    // At the capacitor and at the comparator, at lowest, middle and highest input.
    expect(slopes).toHaveLength(6);
    for (const { cells } of slopes) {
      const [expected, least, most] = [2, 3, 4].map((at) =>
        numberOf(cells[at]!.text.replaceAll('\u00a0', ' ')),
      );
      expect(least!).toBeLessThan(expected!);
      expect(most!).toBeGreaterThan(expected!);
    }
  });

  it('asks for a slope that grows with the input, and for one alone where the ramp is fixed', async () => {
    const conditions = async (text: string) =>
      new Set(
        benchPlan(await sized(text))
          .rows.filter(({ head }) => head === 'ramp')
          .map(({ cells }) => cells[0]!.text),
      ).size;
    expect(await conditions(oneOutput)).toBe(3);
    expect(await conditions(`${oneOutput}ramp: { law: fixed }\n`)).toBe(1);
  });
});

describe('the comparison of the laws', () => {
  it('has the adaptive law first and says which is built', async () => {
    const heads = async (text: string) =>
      comparisonTable(await sized(text)).columns.map(({ text: head }) => head);
    expect(await heads(oneOutput)).toEqual(['figure', 'adaptive, built', 'fixed']);
    expect(await heads(`${oneOutput}ramp: { law: fixed }\n`)).toEqual(['figure', 'adaptive', 'fixed, built']);
  });

  it('shows that the law for Vin takes the same from a peak limit at every input of a synchronous buck', async () => {
    const [adaptive, fixed] = cellsOf(
      comparisonTable(await sized(oneOutput)),
      'taken from a peak limit that sees the ramp',
    );
    expect(adaptive).not.toContain(' to ');
    expect(fixed).toContain(' to ');
  });
});

describe('the spread of the ramp', () => {
  it('is its causes multiplied', async () => {
    const { bars } = spreadChart(await sized(tolerances));
    const product = (side: 'low' | 'high') =>
      bars.filter(({ isTotal }) => !isTotal).reduce((all, bar) => all * (1 + bar[side]), 1) - 1;
    const total = bars.find(({ isTotal }) => isTotal)!;
    expect(total.low).toBeCloseTo(product('low'), 12);
    expect(total.high).toBeCloseTo(product('high'), 12);
  });
});
