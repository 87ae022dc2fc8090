import { exitCodes } from '../exitCodes.ts';
import { ending, going, type Step } from '../Step.ts';

/** UTF-8 bytes as text, or the problem that they are none. */
export function decodeText(bytes: Uint8Array, path: string): Step<string> {
  try {
    return going(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    return ending(exitCodes.refused, {
      code: 'not-utf-8',
      severity: 'error',
      key: null,
      place: { path, line: null, column: null },
      expected: 'text in UTF-8',
      received: 'bytes that are none',
      fix: 'save the file as UTF-8',
    });
  }
}
