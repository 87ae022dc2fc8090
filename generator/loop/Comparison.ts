import type { LoopCorners } from '../law/loopCorners.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { ComparedLaw } from './compareLaws.ts';
import type { LightLoad } from './lightLoad.ts';
import type { NeededRamp } from './neededRamp.ts';
import type { Verdict } from './verdict.ts';

/** Every law over the region, and the verdict. */
export interface Comparison {
  readonly request: ReadSpecification;
  readonly region: OperatingRegion;
  readonly corners: LoopCorners;
  /** Those that can meet the goal, in the order of what they have to sense. */
  readonly laws: readonly ComparedLaw[];
  readonly verdict: Verdict;
  /** Null without an inductance. */
  readonly lightLoad: LightLoad | null;
  readonly neededRamp: readonly NeededRamp[];
  /** What the figures do not say by themselves. */
  readonly notes: readonly string[];
}
