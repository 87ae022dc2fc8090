/** Longest text in one comment line: well inside the line buffers of old SPICE readers. */
const LONGEST_TEXT = 120;
const ELLIPSIS = '...';

/** What an engineer would type for a sign that ASCII lacks. */
const SPELLED_OUT: ReadonlyMap<string, string> = new Map([
  ['µ', 'u'],
  ['μ', 'u'],
  ['Ω', 'Ohm'],
  ['°', 'deg'],
  ['±', '+/-'],
  ['×', 'x'],
  ['·', '*'],
  ['÷', '/'],
  ['≤', '<='],
  ['≥', '>='],
  ['≈', '~'],
  ['→', '->'],
  ['‐', '-'],
  ['‑', '-'],
  ['–', '-'],
  ['—', '-'],
  ['−', '-'],
  ['‘', "'"],
  ['’', "'"],
  ['“', '"'],
  ['”', '"'],
  ['ß', 'ss'],
  ['Æ', 'AE'],
  ['æ', 'ae'],
  ['Ø', 'O'],
  ['ø', 'o'],
  ['Œ', 'OE'],
  ['œ', 'oe'],
  ['Ł', 'L'],
  ['ł', 'l'],
  ['Đ', 'D'],
  ['đ', 'd'],
]);

/**
 * A user's words as one complete comment line of a netlist, without the line end.
 *
 * Plain ASCII: accents are folded, technical signs spelled out, everything else is written as its code
 * point, `\u{6e29}`. Readers have traps behind the asterisk, hence the blank and the escaped backslash:
 * `*#` and `*ng_script` are commands to ngspice, `*>` switches the comment off in gnucap, and gnucap
 * joins the next line to one that ends in a backslash.
 */
export function netlistComment(text: string): string {
  // Composed first: U+2126 becomes the Greek omega, a letter and its accent one sign.
  const signs = [...text.normalize('NFC')].map(asciiFor);
  return `* ${shortened(signs)}`.trimEnd();
}

/** Cut between signs, never inside an escape. */
function shortened(signs: readonly string[]): string {
  const whole = signs.join('');
  if (whole.length <= LONGEST_TEXT) return whole;
  let kept = '';
  for (const sign of signs) {
    if (kept.length + sign.length + ELLIPSIS.length > LONGEST_TEXT) break;
    kept += sign;
  }
  return kept + ELLIPSIS;
}

function asciiFor(sign: string): string {
  if (/^[ -[\]-~]$/.test(sign)) return sign;
  const spelled = SPELLED_OUT.get(sign);
  if (spelled !== undefined) return spelled;
  if (/^[\s\p{Cc}]$/u.test(sign)) return ' ';
  const folded = sign.normalize('NFKD').replace(/\p{M}/gu, '').replaceAll('⁄', '/');
  if (/^[ -[\]-~]+$/.test(folded)) return folded;
  return `\\u{${sign.codePointAt(0)?.toString(16)}}`;
}
