/**
 * A JSON document: keys in the order given, two blanks of indentation, a line end at the end.
 *
 * @throws RangeError on a number that is not finite, TypeError on what JSON would drop or turn into
 *   null without a word (undefined, functions, symbols): a figure that does not exist is null
 */
export function jsonDocument(value: unknown): string {
  return `${JSON.stringify(value, onlyPlainData, 2)}\n`;
}

/**
 * The same for a `<script type="application/json">` element: no sign in it can end the element or
 * open a comment, and it parses back to the same value.
 */
export function embeddedJson(value: unknown): string {
  return JSON.stringify(value, onlyPlainData).replace(
    /[<>&\u2028\u2029]/g,
    (sign) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

function onlyPlainData(key: string, value: unknown): unknown {
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new RangeError(`${key || 'the document'} is not a finite number`);
    return value === 0 ? 0 : value;
  }
  if (value === undefined || typeof value === 'function' || typeof value === 'symbol') {
    throw new TypeError(`${key || 'the document'} is ${typeof value}; what does not exist is null`);
  }
  return value;
}
