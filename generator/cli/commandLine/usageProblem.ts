import type { Problem } from '../../base/Problem.ts';

interface Complaint {
  readonly code: string;
  readonly expected: string;
  readonly received: string;
  readonly fix: string;
}

/** A problem of the command line itself; its place is the flag or the word as typed. */
export function usageProblem(path: string, complaint: Complaint): Problem {
  return { severity: 'error', key: null, place: { path, line: null, column: null }, ...complaint };
}
