import { fixedNumber } from './fixedNumber.ts';

/** A number of ours, which stays a number, or words, which stay words. */
export type Cell = { readonly number: number } | { readonly text: string };

/** First characters that make a spreadsheet evaluate a cell instead of showing it. */
const FORMULA_START = /^[=+\-@\t\r\n]/;
/** A semicolon and a tab separate cells too where the spreadsheet's locale says so. */
const NEEDS_QUOTES = /[",;\t\r\n]|^\s|\s$/;

/**
 * A table after RFC 4180: CRLF at the end of each row, quotes where needed.
 *
 * Text that a spreadsheet would take for a formula gets a leading apostrophe, which shows it as text.
 * @throws RangeError when rows differ in length or a number is not finite
 */
export function csvDocument(rows: readonly (readonly Cell[])[]): string {
  const width = rows[0]?.length ?? 0;
  if (rows.some((row) => row.length !== width)) throw new RangeError('rows of a table differ in length');
  return rows.map((row) => `${row.map(written).join(',')}\r\n`).join('');
}

function written(cell: Cell): string {
  if ('number' in cell) return fixedNumber(cell.number);
  const text = FORMULA_START.test(cell.text) ? `'${cell.text}` : cell.text;
  return NEEDS_QUOTES.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
