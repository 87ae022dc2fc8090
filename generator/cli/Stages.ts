import type { Outcome } from '../base/Problem.ts';
import type { ComparisonDocument } from '../emit/comparisonSchema.ts';
import type { Result, RuleOutcome, Simulation } from '../emit/resultSchema.ts';
import type { WindowDocument } from '../emit/windowSchema.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { EngineOpening, SpiceEngine } from '../spice/Deck.ts';

/** The law that a design is compared with, and what it would do over the same region. */
export interface Alternative {
  readonly kind: string;
  readonly dampingIndexMin: number;
  readonly dampingIndexMax: number;
  readonly cycleRatioMin: number;
  readonly cycleRatioMax: number;
}

/** Where a specification comes from. */
export interface SpecificationSource {
  /** Null: flags only. */
  readonly document: { readonly name: string; readonly text: string } | null;
  /** Flag with its dashes. */
  readonly flags: readonly { readonly flag: string; readonly value: string }[];
  /** `KEY=VALUE` */
  readonly sets: readonly string[];
}

export interface SimulationOptions {
  readonly timeout_s: number;
  readonly onProgress: (progress: {
    readonly done: number;
    readonly total: number;
    readonly file: string;
  }) => void;
  /** Deck texts to run instead of the design's own, by file name. */
  readonly texts?: ReadonlyMap<string, string>;
}

export interface SimulationRun<Waves> {
  readonly simulation: Simulation;
  readonly waveforms: Waves;
  /** Why decks did not run to their end, by file. */
  readonly failures: ReadonlyMap<string, string>;
}

/**
 * The stages of the pipeline as the commands use them; each is loaded when it is first called.
 *
 * Tests put stages of their own in the place of those that fail only on a broken machine.
 */
export interface Stages<Design = unknown, Waves = unknown, Compared = unknown, Found = unknown> {
  decodeDocument(bytes: Uint8Array, name: string): Promise<Outcome<string>>;
  readSpecification(source: SpecificationSource): Promise<Outcome<ReadSpecification>>;
  starterSpecification(): Promise<string>;
  specificationSchema(): Promise<object>;
  resultSchema(): Promise<object>;
  design(request: ReadSpecification): Promise<Outcome<Design>>;
  alternative(design: Design): Promise<Alternative | null>;
  ruleQuantities(design: Design): Promise<Readonly<Record<string, number | null>>>;
  openEngine(
    kind: 'embedded' | 'installed',
    env: Readonly<Record<string, string | undefined>>,
  ): Promise<EngineOpening>;
  simulate(design: Design, engine: SpiceEngine, options: SimulationOptions): Promise<SimulationRun<Waves>>;
  result(design: Design, rules: readonly RuleOutcome[], simulation: Simulation | null): Promise<Result>;
  files(design: Design, result: Result, waveforms: Waves | null): Promise<ReadonlyMap<string, string>>;
  compare(request: ReadSpecification): Promise<Outcome<Compared>>;
  comparison(compared: Compared): Promise<ComparisonDocument>;
  comparisonFiles(compared: Compared): Promise<ReadonlyMap<string, string>>;
  window(request: ReadSpecification): Promise<Outcome<Found>>;
  windowDocument(found: Found): Promise<WindowDocument>;
  windowFiles(found: Found): Promise<ReadonlyMap<string, string>>;
}
