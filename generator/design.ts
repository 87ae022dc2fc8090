import type { Assumption } from './base/Assumption.ts';
import type { Outcome, Place } from './base/Problem.ts';
import type { Result, Simulation } from './emit/resultSchema.ts';
import type { SpiceEngine, Waveforms } from './spice/Deck.ts';
import type { Specification } from './spec/Specification.ts';

export interface DesignRequest {
  readonly specification: Specification;
  readonly assumptions: readonly Assumption[];
  /** Where a key stands in the user's words; null when it was not given. */
  readonly place: (key: string) => Place | null;
}
