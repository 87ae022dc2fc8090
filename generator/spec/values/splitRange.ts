/**
 * The ends of a range, or the one value, each still with its tolerance.
 *
 * `to` always parts; a dash does too (a hyphen between spaces), unless it is the minus of `+10 % -20 %`.
 */
export function splitRange(text: string): readonly string[] {
  const ends = text.split(/ to /);
  if (ends.length > 1) return ends.map((end) => end.trim());
  const tolerance = lopsidedTail(text);
  const body = tolerance === null ? text : tolerance.body;
  const parts = body.split(/ ?[–—] ?| - /);
  return parts.map((part, index) =>
    (index === parts.length - 1 ? part + text.slice(body.length) : part).trim(),
  );
}

export interface ToleranceText {
  readonly body: string;
  readonly up: string;
  readonly down: string;
}

const amount = '([^±+–—-]+?)';
const upFirst = new RegExp(`^(.*?\\S) ?(?<![eE])\\+ ?${amount} ?/? ?[-–—] ?${amount}$`);
const downFirst = new RegExp(`^(.*?\\S) ?[-–—] ?${amount} ?/? ?(?<![eE])\\+ ?${amount}$`);

/** `10 uH +10 % -20 %`, in either order, or null. */
function lopsidedTail(text: string): ToleranceText | null {
  const up = upFirst.exec(text);
  if (up !== null) return { body: up[1]!, up: up[2]!, down: up[3]! };
  const down = downFirst.exec(text);
  if (down !== null) return { body: down[1]!, up: down[3]!, down: down[2]! };
  return null;
}

/** One end taken apart into its value and its tolerance, or null where it carries none. */
export function splitTolerance(end: string): ToleranceText | null {
  const even = /^(.*?) ?± ?(.*)$/.exec(end);
  if (even === null) return lopsidedTail(end);
  return { body: even[1]!, up: even[2]!, down: even[2]! };
}
