import { describe, expect, it } from 'vitest';
import { extremeBetween } from '../../../../generator/spice/measure/extremeBetween.ts';
import { slopeBetween } from '../../../../generator/spice/measure/slopeBetween.ts';
import { valueAt } from '../../../../generator/spice/measure/valueAt.ts';

/** Times that crowd near zero, as engines place them around an event. */
const crowded = Float64Array.from({ length: 2001 }, (_, i) => (i / 2000) ** 4);
const sampled = (f: (t: number) => number, time_s = crowded) => time_s.map(f);

describe('the value at a time', () => {
  const time_s = Float64Array.of(0, 1, 3);
  const column = Float64Array.of(10, 20, -20);

  it('is the sample where there is one, the ends included', () => {
    expect([0, 1, 3].map((t) => valueAt(time_s, column, t))).toEqual([10, 20, -20]);
  });

  it('lies on the straight line between two samples', () => {
    expect(valueAt(time_s, column, 0.25)).toBe(12.5);
    expect(valueAt(time_s, column, 2)).toBe(0);
  });

  it.each([-1e-9, 3.001, Number.NaN])('does not exist at %s, outside the samples', (t) => {
    expect(() => valueAt(time_s, column, t)).toThrow(RangeError);
  });

  it('does not exist without samples', () => {
    expect(() => valueAt(new Float64Array(), new Float64Array(), 0)).toThrow(RangeError);
  });

  it('of a jump sampled twice at one time is one of the two', () => {
    expect([0, 5]).toContain(valueAt(Float64Array.of(0, 1, 1, 2), Float64Array.of(0, 0, 5, 5), 1));
  });
});

describe('the slope between two times', () => {
  it('of a straight line is its slope, whatever the samples', () => {
    expect(
      slopeBetween(
        crowded,
        sampled((t) => 7 - 3 * t),
        0.1,
        0.9,
      ),
    ).toBeCloseTo(-3, 9);
  });

  it('of microseconds on a large offset keeps its digits', () => {
    const time_s = crowded.map((t) => 1e-3 + t * 2e-6);
    const column = time_s.map((t) => 1000 + 1e5 * (t - 1e-3));
    expect(slopeBetween(time_s, column, 1.0001e-3, 1.0018e-3) / 1e5).toBeCloseTo(1, 6);
  });

  it('of a parabola is the derivative at the middle, not where the samples crowd', () => {
    expect(
      slopeBetween(
        crowded,
        sampled((t) => t * t),
        0.2,
        0.6,
      ),
    ).toBeCloseTo(0.8, 5);
  });

  it('of an exponential is the closed form of the least-squares line', () => {
    const expected = 12 * (0.5 - 1.5 * Math.exp(-1));
    expect(
      slopeBetween(
        crowded,
        sampled((t) => Math.exp(-t)),
        0,
        1,
      ),
    ).toBeCloseTo(expected, 5);
  });

  it('averages a ripple away over whole periods', () => {
    const fine = Float64Array.from({ length: 20001 }, (_, i) => i / 20000);
    const ripple = fine.map((t) => 5 * t + 0.01 * Math.cos(2 * Math.PI * 200 * t));
    expect(slopeBetween(fine, ripple, 0, 1)).toBeCloseTo(5, 4);
  });

  it('does not exist where no time passes or no samples are', () => {
    expect(() => slopeBetween(crowded, crowded, 0.5, 0.5)).toThrow(RangeError);
    expect(() => slopeBetween(crowded, crowded, 0.5, 0.4)).toThrow(RangeError);
    expect(() => slopeBetween(crowded, crowded, 0.5, 1.1)).toThrow(RangeError);
  });
});

describe('the extremes between two times', () => {
  const wave = sampled((t) => Math.sin(2 * Math.PI * t));

  it('of a sine are its crest and trough', () => {
    const { low, lowAt_s, high, highAt_s } = extremeBetween(crowded, wave, 0, 1);
    expect(high).toBeCloseTo(1, 5);
    expect(highAt_s).toBeCloseTo(0.25, 2);
    expect(low).toBeCloseTo(-1, 5);
    expect(lowAt_s).toBeCloseTo(0.75, 2);
  });

  it('of a rising stretch are its interpolated ends, though no sample lies there', () => {
    const extremes = extremeBetween(Float64Array.of(0, 1), Float64Array.of(0, 10), 0.25, 0.75);
    expect(extremes).toEqual({ low: 2.5, lowAt_s: 0.25, high: 7.5, highAt_s: 0.75 });
  });

  it('leave out what lies beyond', () => {
    expect(extremeBetween(crowded, wave, 0, 0.5).low).toBeGreaterThan(-1e-6);
  });
});
