import type { LoopCorners } from '../law/loopCorners.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { LawKind, Specification } from '../spec/Specification.ts';
import { contestOf } from './Contest.ts';
import type { ComparedLaw } from './compareLaws.ts';
import { limitReasons, lineReasons } from './limitReasons.ts';
import { adaptiveReasons, fixedReasons, noRampReasons } from './preferenceReasons.ts';
import { overCompensationReasons } from './spreadReasons.ts';

/** Which law to build, and why, in sentences that stand by themselves. */
export interface Verdict {
  /** Null where no ramp is needed at all. */
  readonly preferred: LawKind | null;
  /** The first is the verdict in one sentence. */
  readonly reasons: readonly string[];
}

export function verdict(
  specification: Specification,
  region: OperatingRegion,
  corners: LoopCorners,
  compared: readonly ComparedLaw[],
): Verdict {
  const contest = contestOf(specification, region, corners, compared);
  const { preferred, fixed } = contest;
  const others = [...limitReasons(compared), ...lineReasons(compared, region)];
  if (compared.every(({ required }) => required.gain === 0))
    return { preferred: null, reasons: [...noRampReasons(contest), ...others] };
  return {
    preferred: preferred.law.kind,
    reasons: [
      ...overCompensationReasons(contest),
      ...(preferred === fixed ? fixedReasons(contest) : adaptiveReasons(contest)),
      ...others,
    ],
  };
}
