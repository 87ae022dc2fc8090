import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Chart } from '../../../../generator/report/chart/Chart.ts';
import { formats } from '../../../../generator/report/chart/formats.ts';
import { hatching } from '../../../../generator/report/chart/hatching.ts';
import { layOutChart } from '../../../../generator/report/chart/layOutChart.ts';
import { scaleOf } from '../../../../generator/report/chart/scale.ts';
import { spreadLabels } from '../../../../generator/report/chart/spreadLabels.ts';

const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('an axis', () => {
  it('puts figures between 1 and 1000 under a unit with its prefix', () => {
    const scale = scaleOf({ quantity: 'time', unit: 's', low: 0, high: 2e-6 }, 4);
    expect(scale.caption).toBe('time, µs');
    expect(scale.ticks.map(({ text }) => text)).toEqual(['0', '0.5', '1', '1.5', '2']);
  });

  it('has steps of one, two or five, inside its ends, as many as were wanted or nearly so', () => {
    fc.assert(
      fc.property(finite(-1e3, 1e3), finite(1e-6, 1e6), (low, span) => {
        const { ticks } = scaleOf({ quantity: 'q', unit: '', low, high: low + span }, 5);
        expect(ticks.length).toBeGreaterThanOrEqual(2);
        expect(ticks.length).toBeLessThanOrEqual(12);
        for (const { value } of ticks) {
          expect(value).toBeGreaterThanOrEqual(low - 1e-6 * span);
          expect(value).toBeLessThanOrEqual(low + span * (1 + 1e-6));
        }
      }),
    );
  });

  it('of ratios has equal steps for equal ratios, and the edge of stability among its figures', () => {
    const scale = scaleOf({ quantity: 'x', unit: '', low: 0.35, high: 6, isLogarithmic: true }, 5);
    expect(scale.ticks.map(({ text }) => text)).toEqual(['0.5', '1', '2', '5']);
    expect(scale.position(2) - scale.position(1)).toBeCloseTo(scale.position(1) - scale.position(0.5), 12);
  });

  it('that spans nothing is a mistake', () => {
    expect(() => scaleOf({ quantity: 'q', unit: 'V', low: 5, high: 5 }, 4)).toThrow(RangeError);
  });
});

describe('labels in a column', () => {
  it('keep their order, their distance and their bounds', () => {
    fc.assert(
      fc.property(fc.array(finite(-50, 450), { minLength: 1, maxLength: 8 }), (wanted) => {
        const placed = spreadLabels(wanted, 17, { low: 0, high: 400 });
        const order = wanted.map((_, index) => index).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
        order.slice(1).forEach((index, rank) => {
          expect(placed[index]! - placed[order[rank]!]!).toBeGreaterThanOrEqual(17 - 1e-3);
        });
        for (const height of placed) {
          expect(height).toBeGreaterThanOrEqual(-1e-3);
          expect(height).toBeLessThanOrEqual(400 + 1e-3);
        }
      }),
    );
  });

  it('stay where they are when they do not touch', () => {
    expect(spreadLabels([300, 20, 100], 17, { low: 0, high: 400 })).toEqual([300, 20, 100]);
  });
});

describe('hatching', () => {
  it('keeps inside its rectangle, at 45°', () => {
    const box = { left: 40, right: 300, top: 200, bottom: 250 };
    const lines = [...hatching(box).matchAll(/M(\S+) (\S+)L(\S+) (\S+?)(?=M|$)/g)];
    expect(lines.length).toBeGreaterThan(20);
    for (const [, ...texts] of lines) {
      const [x1, y1, x2, y2] = texts.map(Number) as [number, number, number, number];
      for (const x of [x1, x2]) expect(x >= box.left && x <= box.right).toBe(true);
      for (const y of [y1, y2]) expect(y >= box.top && y <= box.bottom).toBe(true);
      expect(x1 - x2).toBeCloseTo(y2 - y1, 5);
    }
  });

  it('of nothing is nothing', () => {
    expect(hatching({ left: 0, right: 100, top: 50, bottom: 50 })).toBe('');
  });
});

describe('a plot', () => {
  const chart: Chart = {
    id: 'plot',
    title: 'a title',
    description: 'a description',
    x: { quantity: 'time', unit: 's', low: 0, high: 1 },
    y: { quantity: 'voltage', unit: 'V', low: 0, high: 10 },
    marks: [
      {
        kind: 'line',
        ink: 'adaptive',
        points: [
          [0, 0],
          [1, 10],
          [2, 20],
        ],
      },
      { kind: 'rings', ink: 'fixed', points: [] },
    ],
    edgeLabels: [{ y: 10, text: 'end', ink: 'adaptive' }],
    legend: [],
  };

  it('draws from corner to corner, and what lies beyond at its edge', () => {
    const { shapes } = layOutChart(chart, formats.half);
    const { d } = shapes.find(({ className }) => className === 'line adaptive')!;
    expect(d).toBe('M46 280L436 26L436 26');
  });

  it('draws no empty path', () => {
    for (const { d } of layOutChart(chart, formats.narrow).shapes) expect(d).not.toBe('');
  });

  it('names its axes with quantity and unit', () => {
    const texts = layOutChart(chart, formats.wide).texts.map(({ text }) => text);
    expect(texts).toContain('time, s');
    expect(texts).toContain('voltage, V');
    expect(texts).toContain('end');
  });
});
