import type { Assumed, GivenKeys, SpecKey } from './SpecKey.ts';

/** What a controller's data sheet says, and what the design is to reach. */
export const controllerKeys: readonly SpecKey[] = [
  {
    path: 'controller.internalRamp',
    form: { kind: 'value', dimension: 'slope', tolerance: true, zero: true },
    doc: 'Compensation already inside the controller; it counts in the damping and in the limit.',
    example: '45 mV/us ± 20 %',
    assumed: { text: '0 V/s', reason: 'internal ramp not given: the controller is taken to have none' },
  },
  {
    path: 'controller.senseLimit',
    form: { kind: 'value', dimension: 'voltage', tolerance: true, bounds: [1e-3, 100] },
    doc: 'Peak limit at the comparator.',
    example: '250 mV ± 5 %',
  },
  {
    path: 'controller.limitSeesRamp',
    form: { kind: 'yes-no' },
    doc: 'Whether the peak limit compares the sum of current signal and ramp.',
    example: 'yes',
    assumed: withLimit('yes', 'not given: the limit compares the same sum as the loop does'),
  },
  {
    path: 'controller.blankingTime',
    form: { kind: 'value', dimension: 'time', tolerance: true, zero: true },
    doc: 'Leading-edge blanking.',
    example: '40 ns',
  },
  {
    path: 'controller.comparatorDelay',
    form: { kind: 'value', dimension: 'time', tolerance: true, zero: true },
    doc: 'Delay from the comparator input to the switch.',
    example: '30 ns',
    assumed: withLimit('0 s', 'not given: the peak limit is that of a comparator without delay'),
  },
  {
    path: 'controller.oscillator.valley',
    form: { kind: 'value', dimension: 'voltage', tolerance: true, zero: true, bounds: [1e-3, 100] },
    doc: 'Lower turning point of the oscillator sawtooth.',
    example: '1.2 V',
  },
  {
    path: 'controller.oscillator.peak',
    form: { kind: 'value', dimension: 'voltage', tolerance: true, bounds: [1e-3, 100] },
    doc: 'Upper turning point of the oscillator sawtooth.',
    example: '2.8 V ± 5 %',
  },
  {
    path: 'controller.pinCurrent',
    form: { kind: 'value', dimension: 'current', tolerance: true, bounds: [1e-9, 1] },
    doc: 'Ramp current that the controller drives out of its sense pin, peak at a full period.',
    example: '40 uA ± 20 %',
  },
];

function withLimit(text: string, reason: string): (given: GivenKeys) => Assumed | null {
  return ({ has }) => (has('controller.senseLimit') ? { text, reason } : null);
}
