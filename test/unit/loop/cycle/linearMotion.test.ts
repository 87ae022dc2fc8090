import { describe, expect, it } from 'vitest';
import type { LinearInterval, LinearStage } from '../../../../generator/loop/cycle/CycleRun.ts';
import { capacitorStage } from '../../../../generator/loop/cycle/capacitorStage.ts';
import { linearMotion } from '../../../../generator/loop/cycle/linearMotion.ts';
import { capacitorElements } from './runs.ts';
import { exactState } from './saltation.ts';

const stageOf = (interval: LinearInterval): LinearStage => ({
  kind: 'linear',
  on: interval,
  off: interval,
  idle: null,
  trip: interval.source.map((_, place) => Number(place === 0)),
});

const interval = (matrix: number[][], source: number[]): LinearInterval => ({
  matrix,
  source,
  output: { row: source, constant: 0 },
});

const motionOf = (law: LinearInterval) => linearMotion(stageOf(law), law);

/** The buck's is oscillating, the others are what breaks closed forms. */
const laws: readonly (readonly [string, LinearInterval])[] = [
  ['a lossy LC', capacitorStage(capacitorElements('buck')).on],
  [
    'a singular one',
    interval(
      [
        [0, 0],
        [0, 0],
      ],
      [7e5, -3e4],
    ),
  ],
  [
    'a defective one',
    interval(
      [
        [-2e5, 1e6],
        [0, -2e5],
      ],
      [1, 2],
    ),
  ],
  [
    'a stiff one',
    interval(
      [
        [-1e3, -1e5],
        [2.5e4, -4e7],
      ],
      [7e5, 3],
    ),
  ],
  [
    'an undamped one',
    interval(
      [
        [0, -1e6],
        [1e6, 0],
      ],
      [0, 1e6],
    ),
  ],
];

describe('a linear motion', () => {
  it.each(laws)('moves %s as the matrix exponential does', (_, law) => {
    for (const time of [1e-9, 3e-7, 2e-6, 2e-5]) {
      const state = Float64Array.of(2.5, 4.8);
      motionOf(law).advance(state, time, new Float64Array(2));
      const exact = exactState(law, [2.5, 4.8], time);
      for (const place of [0, 1])
        expect(Math.abs(state[place]! - exact[place]!)).toBeLessThan(
          1e-12 * Math.max(1, Math.abs(exact[place]!)),
        );
    }
  });

  it('adds the integral of the state: A·∫x + b·t is what the state has gained', () => {
    for (const [, law] of laws) {
      const state = Float64Array.of(2.5, 4.8);
      const integral = new Float64Array(2);
      motionOf(law).advance(state, 3e-6, integral);
      for (const [row, coefficients] of law.matrix.entries()) {
        const gained = coefficients.reduce((sum, value, place) => sum + value * integral[place]!, 0);
        expect(gained + law.source[row]! * 3e-6).toBeCloseTo(state[row]! - [2.5, 4.8][row]!, 10);
      }
    }
  });

  it('finds the first of many crossings, however slight', () => {
    const motion = motionOf(
      interval(
        [
          [0, -1e6],
          [1e6, 0],
        ],
        [0, 0],
      ),
    );
    const sine = Float64Array.of(0, -1);
    expect(motion.timeToReach(sine, 'trip', 0, 1 - 1e-9, 0, 1e-4)).toBeCloseTo(
      1e-6 * Math.asin(1 - 1e-9),
      15,
    );
    expect(motion.timeToReach(sine, 'trip', 0, 1 + 1e-9, 0, 1e-4)).toBe(Number.POSITIVE_INFINITY);
    expect(motion.timeToReach(sine, 'trip', 0, 0.5, 4e-6, 1e-4)).toBeCloseTo(
      1e-6 * (2 * Math.PI + Math.PI / 6),
      15,
    );
    expect(motion.timeToReach(sine, 'trip', 1e4, 1.01, 0, 1e-4)).toBeLessThan(1e-6 * (Math.PI / 2));
  });

  it('finds where the current falls to zero, and that a current at rest stays there', () => {
    const motion = motionOf(
      interval(
        [
          [0, -1e6],
          [1e6, 0],
        ],
        [0, 0],
      ),
    );
    expect(motion.timeToZero(Float64Array.of(1, 0), 1e-5)).toBeCloseTo(1e-6 * (Math.PI / 2), 15);
    expect(motion.timeToZero(Float64Array.of(0, 1), 1e-5)).toBe(0);
    expect(motion.timeToZero(Float64Array.of(0, -1), 1e-5)).toBeCloseTo(1e-6 * Math.PI, 14);
  });
});
