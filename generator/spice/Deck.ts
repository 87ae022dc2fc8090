/** What one run of a deck has to deliver, and how its vectors are called. */
export interface Deck {
  /** File name, `converter-adaptive.cir`. */
  readonly file: string;
  /** The whole netlist as written to disk. */
  readonly text: string;
  /** Other files of the set that the deck includes by bare name, name → text. */
  readonly includes: Readonly<Record<string, string>>;
  /** Vectors to save, as SPICE writes them: `v(ramp)`, `i(l1)`; lower case. */
  readonly vectors: readonly string[];
  /** A run that ends before this time has failed [s]. */
  readonly stopTime_s: number;
}

/** One simulated run: equally long columns, time first. */
export interface Waveforms {
  readonly time_s: Float64Array;
  /** Keyed by the deck's vector names. */
  readonly vectors: Readonly<Record<string, Float64Array>>;
}

/** A run that counts, or why it does not. */
export type RunOutcome =
  | { readonly ok: true; readonly waveforms: Waveforms }
  | { readonly ok: false; readonly reason: string; readonly log: string };

/** A SPICE engine with a lifetime: many decks one after the other, then `end`. */
export interface SpiceEngine {
  readonly kind: 'embedded' | 'installed';
  readonly version: string;
  run(deck: Deck, options: { readonly timeout_s: number }): Promise<RunOutcome>;
  end(): Promise<void>;
}

/** Opens an engine, or says why there is none (exit 3 of the command line). */
export type EngineOpening =
  | { readonly ok: true; readonly engine: SpiceEngine }
  | { readonly ok: false; readonly reason: string };
