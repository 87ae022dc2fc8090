import { type Reading, read, refuse } from '../values/ValueFault.ts';

const newlines = /\s*(?:\r\n|[\n\r\u0085\u2028\u2029])\s*/g;
/** Controls of terminals (C0, C1), of writing direction, and what is no character at all. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is refused
const controls = /[\u0000-\u001f\u007f-\u009f\u202a-\u202e\u2066-\u2069\ud800-\udfff\ufffe\uffff]/u;

/** Anything printable, in one line. What it may mean to a netlist or a page is for those who write these. */
export function readText(text: string): Reading<string> {
  const line = text.trim().replace(newlines, ' ');
  const control = controls.exec(line);
  if (control === null) return read(line);
  const code = control[0].charCodeAt(0).toString(16).toUpperCase().padStart(4, '0');
  return refuse('control-character', 'printable text', line, `remove the control character U+${code}`);
}

/** An ISO 8601 calendar date, or nothing. */
export function readDate(text: string): Reading<string> {
  const date = text.trim();
  if (date === '' || isCalendarDate(date)) return read(date);
  return refuse(
    'date-form',
    'a calendar date such as 2026-12-01',
    date,
    'write year-month-day, a day that exists',
  );
}

function isCalendarDate(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false;
  const time = new Date(`${text}T00:00:00Z`);
  return !Number.isNaN(time.getTime()) && time.toISOString().startsWith(text);
}
