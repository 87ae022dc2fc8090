import type { Severity } from '../base/Problem.ts';

export type Comparison = '<=' | '>=' | '<' | '>';

/**
 * The quantities as an evaluator sees them: the ones that the rule uses are all there, in SI.
 *
 * Looser than {@link DesignQuantities}, so that compiled decks need no casts.
 */
export type Scope = Readonly<Record<string, number | null | undefined>>;

/** What an example of a rule must come to. */
export type ExampleOutcome = 'passes' | 'fails' | 'not-applicable';

/** A case that the author of a rule worked out by hand; every deck is held to its own examples. */
export interface RuleExample {
  readonly outcome: ExampleOutcome;
  /** SI values; null: the figure does not exist. */
  readonly quantities: Readonly<Record<string, number | null>>;
}

/** One rule, ready to be applied: `measured comparison limit`, where `applies`. */
export interface Rule {
  /** Kebab-case, unique in a deck. */
  readonly id: string;
  readonly severity: Severity;
  /** As its author wrote it, white space collapsed. */
  readonly requirement: string;
  /** The condition of applicability as written, or null: always. */
  readonly when: string | null;
  readonly whatToDo: string;
  readonly reason: string;
  /** A published source, or `common practice`. */
  readonly source: string;
  /** Unit of measured value and limit, SI; `1` for a plain number. */
  readonly unit: string;
  /** Quantities that requirement and condition speak of, in the order of the table. */
  readonly uses: readonly string[];
  readonly comparison: Comparison;
  readonly measured: (scope: Scope) => number;
  readonly limit: (scope: Scope) => number;
  readonly applies: (scope: Scope) => boolean;
  readonly examples: readonly RuleExample[];
}

export interface RuleDeck {
  /** File name, or `ramp` for the shipped deck. */
  readonly name: string;
  readonly rules: readonly Rule[];
}
