import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { GivenRamp } from './givenRamp.ts';
import type { InductanceWindow } from './inductanceWindow.ts';

/** One line of a data sheet. */
export interface WindowRow {
  /** Null: the output is not known, the row holds for every one that the duties can make. */
  readonly outputVoltage_V: number | null;
  readonly frequency_Hz: number;
  /** Null where the output cannot be regulated at any input. */
  readonly window: InductanceWindow | null;
}

/** Which inductances fit a given ramp. */
export interface Window {
  readonly request: ReadSpecification;
  readonly ramp: GivenRamp;
  readonly rows: readonly WindowRow[];
}
