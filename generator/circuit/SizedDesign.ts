import type { Law } from '../law/Law.ts';
import type { IndexExtremes, LeastGain } from '../law/leastGain.ts';
import type { KnownCorners } from '../law/loopCorners.ts';
import type { RampDemand } from '../ramp/RampDemand.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { BoardOpampSizing } from './boardOpamp/candidate.ts';
import type { Circuit } from './Circuit.ts';

/** A law with its gain and what it does over the region with everything at its worst. */
export interface SizedLaw {
  readonly law: Law;
  readonly required: LeastGain;
  /** Nominal design gain: larger than required by the ramp circuit's own spread. */
  readonly gain: number;
  /** What the standard parts give nominally. */
  readonly realisedGain: number;
  readonly extremes: IndexExtremes;
}

/** A design before anything is written or simulated. */
export interface SizedDesign {
  readonly request: ReadSpecification;
  readonly region: OperatingRegion;
  readonly corners: KnownCorners;
  /** The law that is built. */
  readonly chosen: SizedLaw;
  /** The law that it is compared with, by the same block fed from the other voltage. */
  readonly alternative: SizedLaw;
  readonly demand: RampDemand;
  readonly sizing: BoardOpampSizing;
  readonly circuit: Circuit;
}
