import { failure, type Outcome, type Problem, success } from '../base/Problem.ts';

/** 1 MB; a specification has some hundred lines. */
const mostBytes = 1_048_576;

/**
 * The text of a document's bytes, without its byte-order mark.
 * @param name as the user gave it, `-` for standard input
 */
export function decodeDocument(bytes: Uint8Array, name: string): Outcome<string> {
  if (bytes.byteLength > mostBytes) return failure([tooLarge(name, `${bytes.byteLength} bytes`)]);
  try {
    return success(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    return failure([notUtf8(bytes, name)]);
  }
}

export function tooLarge(name: string, received: string): Problem {
  return {
    code: 'document-too-large',
    severity: 'error',
    key: null,
    place: { path: name, line: null, column: null },
    expected: 'a specification of at most 1 MB',
    received,
    fix: 'pass the specification only',
  };
}

/** Whether a text is within the limit on bytes, without encoding what cannot be. */
export function isTooLarge(text: string): boolean {
  return text.length > mostBytes || new TextEncoder().encode(text).byteLength > mostBytes;
}

function notUtf8(bytes: Uint8Array, name: string): Problem {
  const { line, column } = firstInvalid(bytes);
  return {
    code: 'not-utf8',
    severity: 'error',
    key: null,
    place: { path: name, line, column },
    expected: 'text in UTF-8',
    received: 'bytes that are not UTF-8',
    fix: 'save the file as UTF-8',
  };
}

/** Where decoding with replacement first replaces something. */
function firstInvalid(bytes: Uint8Array): { line: number; column: number } {
  const lenient = new TextDecoder('utf-8').decode(bytes);
  const before = lenient.slice(0, Math.max(0, lenient.indexOf('\ufffd'))).split('\n');
  return { line: before.length, column: before.at(-1)!.length + 1 };
}
