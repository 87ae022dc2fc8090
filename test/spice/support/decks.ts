import type { Deck } from '../../../generator/spice/Deck.ts';

const STOP_S = 1e-3;

/** A deck of the given lines under a title, with a transient analysis of 1 ms in steps of 1 µs. */
export function deckOf(lines: readonly string[], overrides: Partial<Deck> = {}): Deck {
  const vectors = overrides.vectors ?? ['v(out)', 'i(v1)'];
  const text = [
    '* test deck',
    ...lines,
    `.print tran ${vectors.join(' ')}`,
    '.tran 1u 1m 0 1u uic',
    '.end',
    '',
  ];
  return {
    file: 'test-deck.cir',
    text: text.join('\n'),
    includes: {},
    vectors,
    stopTime_s: STOP_S,
    ...overrides,
  };
}

/** One volt through 1 kΩ onto 100 nF that begins empty: a time constant of 100 µs. */
export const RC_LINES = ['V1 in 0 1', 'R1 in out 1k', 'C1 out 0 100n ic=0'] as const;
export const RC_TIME_CONSTANT_S = 100e-6;

export const rcDeck: Deck = deckOf(RC_LINES);

/**
 * A bistable of one switch: on above 0.6 V, off below 0.4 V, and in between as it was. Control goes up to
 * 0.5 V, to 1 V, back to 0.5 V, to 0 V and again to 0.5 V, a fifth of a millisecond each.
 */
export const latchDeck: Deck = deckOf(
  [
    'Vs s 0 pwl(0 0.5 200u 0.5 201u 1 400u 1 401u 0.5 600u 0.5 601u 0 800u 0 801u 0.5 1m 0.5)',
    'V1 vdd 0 1',
    'R1 vdd out 1k',
    'S1 out 0 s 0 sw',
    '.model sw sw(vt=0.5 vh=0.1 ron=1 roff=1e9)',
  ],
  { vectors: ['v(out)', 'v(s)'] },
);

/** The RC of `rcDeck` out of an included file, with a comment, a continuation line and mixed case. */
export const subcircuitDeck: Deck = deckOf(['.include rc-block.cir', 'V1 in 0 1', 'X1 in', '+ OUT RcBlock'], {
  includes: {
    'rc-block.cir': [
      '* a resistor and a capacitor',
      '.subckt rcblock a b',
      'R1 a b',
      '+ 1k',
      'C1 b 0 100N',
      '.ends rcblock',
      '',
    ].join('\n'),
  },
  vectors: ['v(out)'],
});
