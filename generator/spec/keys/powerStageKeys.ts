import type { Assumed, GivenKeys, SpecKey, ValueKeyForm } from './SpecKey.ts';

const isolated = ['flyback', 'forward'];
const twoInductors = ['sepic', 'cuk'];

function value(form: Omit<ValueKeyForm, 'kind'>): ValueKeyForm {
  return { kind: 'value', tolerance: true, ...form };
}

/** Title, converter, and what is known of its power stage. */
export const powerStageKeys: readonly SpecKey[] = [
  {
    path: 'title',
    form: { kind: 'text' },
    doc: 'What this design is for; any printable text.',
    example: 'auxiliary rail',
    starter: true,
  },
  {
    path: 'converter',
    form: { kind: 'choice', choices: ['buck', 'boost', 'buck-boost', 'sepic', 'cuk', 'flyback', 'forward'] },
    doc: 'The power stage.',
    example: 'buck',
    flag: '--converter',
    starter: true,
    assumed: { text: 'buck', reason: 'no converter given: a step-down stage is the usual case' },
  },
  {
    path: 'input',
    form: value({ dimension: 'voltage', range: true, limits: true, bounds: [0.1, 1e4] }),
    doc: 'Input voltage, or its range.',
    example: '8 V to 36 V',
    flag: '--vin',
    required: true,
    starter: true,
  },
  {
    path: 'output',
    form: value({ dimension: 'voltage', range: true, limits: true, list: true, bounds: [0.01, 1e4] }),
    doc: 'Output voltage: a value, a range, a list, or left out when not known. Inverting stages: its magnitude.',
    example: '5 V',
    flag: '--vout',
    starter: true,
    assumed: { text: null, reason: 'output not known: every duty up to the maximum is taken as possible' },
    remedies: { negative: 'only buck-boost and cuk invert' },
  },
  {
    path: 'inductance.value',
    form: value({ dimension: 'inductance', range: true }),
    doc: 'Inductance at rated load; a range where the customer chooses.',
    example: '10 uH ± 20 %',
    flag: '--l',
    starter: true,
    replaces: ['inductance.ripple', 'inductance.of', 'inductance.atPeakLimit'],
  },
  {
    path: 'inductance.atPeakLimit',
    form: value({ dimension: 'inductance' }),
    doc: 'What saturation leaves of the inductance at the peak current limit.',
    example: '7 uH',
    assumed: ({ has }) => (has('inductance.value') ? noSaturation : null),
  },
  {
    path: 'inductance.ripple',
    form: value({ dimension: 'ratio', range: true, tolerance: false, limits: true, bounds: [0.001, 2] }),
    doc: 'Instead of a value: peak-to-peak ripple current as a share of `of`.',
    example: '20 % to 40 %',
    replaces: ['inductance.value', 'inductance.atPeakLimit'],
  },
  {
    path: 'inductance.of',
    form: value({ dimension: 'current' }),
    doc: 'The current of which the ripple is a share.',
    example: '3 A',
  },
  {
    path: 'frequency',
    form: value({ dimension: 'frequency', range: true }),
    doc: 'Switching frequency; for the forward family that of the ripple in the output inductor.',
    example: '500 kHz ± 10 %',
    flag: '--fs',
    required: true,
    starter: true,
  },
  {
    path: 'maximumDuty',
    form: value({ dimension: 'ratio', tolerance: false, bounds: [0.01, 1] }),
    doc: 'Maximum duty of the controller.',
    example: '90 %',
    flag: '--dmax',
    starter: true,
    assumed: maximumDuty,
    remedies: { zero: 'the switch must be able to turn on', magnitude: 'the duty is the share of a period' },
  },
  {
    path: 'load',
    form: value({ dimension: 'current', range: true, limits: true }),
    doc: 'Output current, or its range.',
    example: '0.3 A to 3 A',
    flag: '--load',
    starter: true,
    assumed: {
      text: null,
      reason: 'load not given: continuous conduction is taken, without drops that grow with it',
    },
  },
  {
    path: 'rectifier.drop',
    form: value({ dimension: 'voltage', zero: true, bounds: [1e-3, 100] }),
    doc: 'Forward drop of the rectifier; 0 V for a synchronous one.',
    example: '0.4 V',
    flag: '--drop',
    assumed: { text: '0 V', reason: 'rectifier drop not given: a synchronous rectifier' },
  },
  loss('switch', 'On-resistance of the switch.', '40 mOhm'),
  loss('winding', 'Resistance of the inductor winding.', '25 mOhm'),
  loss('rectifier', 'Resistance of the rectifier.', '20 mOhm'),
  {
    path: 'minimumOnTime',
    form: value({ dimension: 'time', zero: true }),
    doc: 'Shortest on-time that the controller can make.',
    example: '60 ns',
    assumed: { text: '0 s', reason: 'minimum on-time not given: no pulse is too short' },
  },
  {
    path: 'senseGain',
    form: value({ dimension: 'gain' }),
    doc: 'Current-sense gain at the sense element or amplifier, before any summing network.',
    example: '50 mOhm ± 5 %',
    flag: '--ri',
    starter: true,
    assumed: {
      text: '100 mV/A',
      reason: 'sense gain not given: a customary value; it scales the ramp, not the damping',
    },
  },
  {
    path: 'turnsRatio',
    form: value({ dimension: 'number', bounds: [1e-3, 1e3] }),
    doc: 'Primary turns over secondary turns.',
    example: '4',
    flag: '--turns',
    converters: isolated,
    assumed: ({ converter }) =>
      isolated.includes(converter) ? { text: '1', reason: 'turns ratio not given: equal turns' } : null,
  },
  {
    path: 'magnetizingInductance',
    form: value({ dimension: 'inductance', range: true }),
    doc: "The transformer's magnetizing inductance, seen from the primary.",
    example: '1 mH',
    flag: '--lm',
    converters: ['forward'],
  },
  {
    path: 'stage',
    form: { kind: 'choice', choices: ['single', 'two-switch', 'half-bridge', 'push-pull', 'full-bridge'] },
    doc: 'The primary side of a forward converter.',
    example: 'two-switch',
    converters: ['forward'],
    assumed: ({ converter }) =>
      converter === 'forward'
        ? { text: 'single', reason: 'stage not given: one switch, reset by equal turns' }
        : null,
  },
  {
    path: 'secondInductance',
    form: value({ dimension: 'inductance', range: true }),
    doc: 'The second inductor.',
    example: '15 uH',
    converters: twoInductors,
  },
  {
    path: 'couplingCapacitor',
    form: value({ dimension: 'capacitance', range: true }),
    doc: 'The coupling capacitor.',
    example: '4.7 uF',
    converters: twoInductors,
  },
  {
    path: 'outputCapacitor.capacitance',
    form: value({ dimension: 'capacitance', range: true }),
    doc: 'Output capacitance.',
    example: '100 uF ± 20 %',
    flag: '--cout',
  },
  {
    path: 'outputCapacitor.seriesResistance',
    form: value({ dimension: 'resistance', range: true, zero: true }),
    doc: 'Equivalent series resistance of the output capacitor.',
    example: '5 mOhm',
    flag: '--esr',
    assumed: ({ has }) =>
      has('outputCapacitor.capacitance')
        ? { text: '0 Ohm', reason: 'series resistance not given: the capacitor is taken as ideal' }
        : null,
  },
];

const noSaturation: Assumed = {
  text: null,
  reason: 'inductance at the peak limit not given: the inductor is taken not to saturate there',
};

function maximumDuty({ converter, stage }: GivenKeys): Assumed {
  if (converter === 'forward' && (stage === 'single' || stage === 'two-switch')) {
    return {
      text: '50 %',
      reason: 'maximum duty not given: the core needs as long to reset as it was driven',
    };
  }
  return { text: '90 %', reason: 'maximum duty not given: a customary limit of controllers' };
}

/** Losses left out altogether are one assumption, made in the group's name; one of three left out is its own. */
function loss(name: string, doc: string, example: string): SpecKey {
  return {
    path: `losses.${name}`,
    form: value({ dimension: 'resistance', zero: true, bounds: [1e-6, 100] }),
    doc,
    example,
    assumed: ({ has }) =>
      has('losses') ? { text: '0 Ohm', reason: 'not given beside the other losses: taken as none' } : null,
  };
}
