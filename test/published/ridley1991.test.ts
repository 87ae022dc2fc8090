/**
 * R. B. Ridley, A new, continuous-time model for current-mode control, IEEE Transactions on Power
 * Electronics 6(2), 1991. From memory.
 *
 * Tolerance: half of the last digit printed in each published figure.
 */
import { describe, expect, test } from 'vitest';
import { dampingIndex, dampingQ } from '../../generator/law/innerLoop.ts';

/** The example converter: 11 V to 5 V, 37.5 µH, 50 kHz, Ri 0.33 V/A. */
const input_V = 11;
const output_V = 5;
const duty = output_V / input_V;

/** mc = 1 + Se/Sn, so that ma·L = (mc − 1)·(Vin − Vout). */
function indexOf(rampFactor: number): number {
  const up_V = input_V - output_V;
  return dampingIndex(up_V, input_V, (rampFactor - 1) * up_V);
}

test('the damping index is mc·D′', () => {
  for (const rampFactor of [1, 1.5, 2, 4, 10])
    expect(indexOf(rampFactor)).toBeCloseTo(rampFactor * (1 - duty), 12);
});

describe('Q of the double pole at half the switching frequency, of the example', () => {
  test.each([
    [1, 7.0, 0.005],
    [1.5, 1.0, 0.0005],
    [2, 0.539, 0.0005],
    [4, 0.189, 0.0005],
  ])('mc = %f gives Q = %f', (rampFactor, published, halfDigit) => {
    const derived = 1 / (Math.PI * (rampFactor * (1 - duty) - 0.5));
    expect(Math.abs(derived - published)).toBeLessThanOrEqual(halfDigit);
    expect(Math.abs(dampingQ(indexOf(rampFactor))! - published)).toBeLessThanOrEqual(halfDigit);
  });
});

test('Q grows without bound towards a damping index of one half and does not exist at or below it', () => {
  expect(dampingQ(0.5 + 1e-9)!).toBeGreaterThan(1e8);
  expect(dampingQ(0.5)).toBeNull();
  expect(dampingQ(0.3)).toBeNull();
});

test('Q of one is a damping index of ½ + 1/π', () => {
  expect(dampingQ(0.5 + 1 / Math.PI)).toBeCloseTo(1, 12);
});

/**
 * The model's second-order term, 1 + s/(Q·ωn) + s²/ωn² with ωn = π/Ts, stands for the sampled pole at
 * z = α. At low damping both must agree in the decay at fs/2: |z| = e^(−π/(2Q)) against |α| = 1/x − 1.
 * To first order in (x − ½) the model gives 1 − π²(x − ½)/2 and the samples 1 − 4(x − ½): 4.93 against 4,
 * the known price of a double pole for an exponential; hence 25 %.
 */
test('a slightly damped loop decays as the double pole says, within what the approximation costs', () => {
  for (const index of [0.501, 0.505, 0.51]) {
    const sampled = -Math.log(1 / index - 1);
    const model = Math.PI / (2 * dampingQ(index)!);
    expect(model / sampled).toBeGreaterThan(1);
    expect(model / sampled).toBeLessThan(1.25);
  }
});
