import type { Deck, Waveforms } from '../Deck.ts';

/** One figure that a deck has to show. */
export interface Check {
  readonly quantity: string;
  readonly at: { readonly inputVoltage_V: number; readonly outputVoltage_V: number | null };
  readonly predicted: number;
  readonly unit: string;
  /** Largest error that counts as agreement. */
  readonly limit: number;
  /** What the error is divided by; 1 where the plain difference counts. */
  readonly errorScale: number;
  measure(waveforms: Waveforms): number;
}

/** A deck with everything that is read from its run. */
export interface CheckedDeck {
  readonly deck: Deck;
  readonly checks: readonly Check[];
}
