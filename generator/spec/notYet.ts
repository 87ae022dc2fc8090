import { failure, type Outcome, type Problem, success } from '../base/Problem.ts';
import type { ReadSpecification } from './readSpecification.ts';
import type { Specification } from './Specification.ts';

/** A choice or key that is understood but that no circuit is built for yet. */
interface Gap {
  readonly key: string;
  readonly wanted: (specification: Specification) => string | null;
  readonly instead: string;
}

const gaps: readonly Gap[] = [
  {
    key: 'ramp.law',
    wanted: ({ ramp }) => (ramp.law === 'vin' || ramp.law === 'fixed' ? null : ramp.law),
    instead: 'vin (needs no output sensing) or fixed',
  },
  {
    key: 'ramp.build',
    wanted: ({ ramp }) => (ramp.build === 'board-opamp' || ramp.build === 'auto' ? null : ramp.build),
    instead: 'board-opamp',
  },
  {
    key: 'ramp.injection',
    wanted: ({ ramp }) => (ramp.injection === 'sense' ? null : ramp.injection),
    instead: 'sense',
  },
  {
    key: 'ramp.reset',
    wanted: ({ ramp }) => (ramp.reset === 'clock' ? null : ramp.reset),
    instead: 'clock',
  },
  {
    key: 'ramp.follows',
    wanted: ({ ramp }) => (ramp.follows === 'nothing' ? null : ramp.follows),
    instead: 'nothing',
  },
];

/** Refuses by name what the circuit stages cannot do yet, all at once. */
export function refuseGaps(request: ReadSpecification): Outcome<null> {
  const problems = gaps.flatMap(({ key, wanted, instead }): Problem[] => {
    const received = wanted(request.specification);
    if (received === null) return [];
    return [
      {
        code: 'not-yet-available',
        severity: 'error',
        key,
        place: request.place(key),
        expected: instead,
        received,
        fix: `not yet available: choose ${instead}`,
      },
    ];
  });
  return problems.length > 0 ? failure(problems) : success(null);
}
