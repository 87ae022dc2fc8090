import fc from 'fast-check';
import type { Keys } from '../../support/request.ts';

/**
 * Specifications from all over what a buck may be: 2.7 V to 375 V, spans up to 20, 20 kHz to 3 MHz, any
 * maximum duty, outputs known or not, losses, loads, wide and tight regions, tiny and large sense gains.
 *
 * Many of them have no circuit, which the reader and the sizing say; the others have to simulate as sized.
 */
export const randomKeys: fc.Arbitrary<Keys> = fc
  .record({
    lowest: octaves(2.7, 200),
    span: fc.oneof(fc.constant(1), octaves(1, 20)),
    frequency: octaves(20e3, 3e6),
    spread: fc.constantFrom('', ' ± 5 %', ' ± 10 %'),
    duty: fc.constantFrom(0.3, 0.45, 0.5, 0.6, 0.7, 0.8, 0.85, 0.9, 0.95, 0.97),
    output: fc.constantFrom('unknown', 'unknown', 'one', 'range', 'list'),
    share: fc.double({ min: 0.03, max: 1, noNaN: true }),
    ripple: octaves(0.02, 20),
    inductanceSpread: fc.constantFrom('', ' ± 20 %', ' ± 30 %'),
    sense: fc.constantFrom(null, null, '1 mOhm', '5 mOhm', '20 mOhm', '50 mOhm ± 5 %', '300 mOhm', '2 Ohm'),
    load: fc.constantFrom('none', 'one', 'range'),
    drop: fc.constantFrom(null, null, '0.4 V', '0.7 V'),
    lossShare: fc.constantFrom(0, 0, 0.01, 0.05),
    law: fc.constantFrom('vin', 'vin', 'fixed'),
    supply: fc.constantFrom(null, null, '2.7 V', '3.3 V ± 5 %', '5 V ± 5 %', '12 V ± 5 %'),
    index: fc.constantFrom(null, null, 0.6, 1, 1.3),
  })
  .map((drawn) => {
    const highest = Math.min(375, drawn.lowest * drawn.span);
    const lowest = Math.min(drawn.lowest, highest);
    const output_V = drawn.share * drawn.duty * (drawn.output === 'one' ? lowest : highest) * 0.95;
    const inductance_H = (0.2 * highest) / (drawn.frequency * drawn.ripple);
    const load_A = 2 * drawn.ripple;
    const ohm = (drawn.lossShare * lowest) / load_A;
    const keys: Record<string, string | number | readonly string[]> = {
      input: highest > lowest ? `${si(lowest)} V to ${si(highest)} V` : `${si(lowest)} V`,
      frequency: `${si(drawn.frequency / 1e3)} kHz${drawn.spread}`,
      inductance: `${si(inductance_H * 1e6)} uH${drawn.inductanceSpread}`,
      maximumDuty: `${100 * drawn.duty} %`,
      'ramp.law': drawn.law,
    };
    if (drawn.output === 'one') keys.output = `${si(output_V)} V`;
    if (drawn.output === 'range') keys.output = `${si(output_V / 4)} V to ${si(output_V)} V`;
    if (drawn.output === 'list') keys.output = [`${si(output_V / 2)} V`, `${si(output_V)} V`];
    if (drawn.sense !== null) keys.senseGain = drawn.sense;
    if (drawn.load === 'one') keys.load = `${si(load_A)} A`;
    if (drawn.load === 'range') keys.load = `${si(load_A / 10)} A to ${si(load_A)} A`;
    if (drawn.drop !== null) keys['rectifier.drop'] = drawn.drop;
    if (drawn.lossShare > 0 && drawn.load !== 'none') {
      keys['losses.switch'] = `${si(ohm)} Ohm ± 20 %`;
      keys['losses.winding'] = `${si(ohm)} Ohm`;
      keys['losses.rectifier'] = `${si(ohm / 2)} Ohm`;
    }
    if (drawn.supply !== null) keys['ramp.supply'] = drawn.supply;
    if (drawn.index !== null) keys['goal.dampingIndex'] = drawn.index;
    return keys;
  });

function octaves(low: number, high: number): fc.Arbitrary<number> {
  return fc
    .double({ min: Math.log(low), max: Math.log(high), noNaN: true })
    .map((logarithm) => Math.exp(logarithm));
}

function si(value: number): string {
  return String(Number(value.toPrecision(4)));
}
