import type { Problem } from '../../base/Problem.ts';
import { isSystemError } from '../../emit/write/machineOutcome.ts';

/** What nobody expected: the machine's fault where the system says so, else the program's own. */
export function unforeseen(error: unknown): Problem {
  const message = error instanceof Error ? error.message : String(error);
  const common = { severity: 'error', key: null, place: null, received: firstLine(message) } as const;
  if (isSystemError(error)) {
    const fix = 'look at disk, memory and rights, and run the command again';
    return { ...common, code: 'system-error', expected: 'the system to do as it was asked', fix };
  }
  const fix =
    'a fault of counterslope: run the command with COUNTERSLOPE_DEBUG=1 for the trace, and report it';
  return { ...common, code: 'internal-fault', expected: 'no exception', fix };
}

function firstLine(text: string): string {
  return text.split('\n', 1)[0] || 'an exception without words';
}
