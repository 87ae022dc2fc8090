/** No line of a view is wider. */
export const viewWidth = 80;

export const labelWidth = 13;
const textWidth = viewWidth - labelWidth - 1;

/** A label and what it says, continued below itself. */
export function row(
  label: string,
  text: string,
  paintLabel: (label: string) => string = (same) => same,
): string[] {
  const head = `${paintLabel(label)}${' '.repeat(labelWidth - label.length + 1)}`;
  const [first = '', ...rest] = wrapped(text, textWidth);
  return [`${head}${first}`.trimEnd(), ...rest.map((line) => `${' '.repeat(labelWidth + 1)}${line}`)];
}

/** Lines with a head before the first, and as much space before the others. */
export function hanging(head: string, [first = '', ...rest]: readonly string[]): string[] {
  return [`${head}${first}`, ...rest.map((line) => `${' '.repeat(head.length)}${line}`)];
}

export const rule = '─'.repeat(viewWidth);

/** One line of the user's words, cut where the line ends. */
export function oneLine(text: string, width = viewWidth): string {
  let used = 0;
  let kept = '';
  for (const sign of text) {
    used += signWidth(sign);
    if (used > width - 1) return `${kept}…`;
    kept += sign;
  }
  return kept;
}

/** A terminal gives two columns to signs of East Asian scripts and to pictures. */
function signWidth(sign: string): number {
  if (/\p{M}|\p{Cf}/u.test(sign)) return 0;
  const isWide =
    /[\u1100-\u115f\u2e80-\ua4cf\uac00-\ud7a3\uf900-\ufaff\ufe30-\ufe6f\uff00-\uff60\uffe0-\uffe6]/u.test(
      sign,
    );
  return isWide || sign.codePointAt(0)! >= 0x1f000 ? 2 : 1;
}

/** Lines of at most so many signs; no-break spaces keep a figure with its unit. */
export function wrapped(text: string, width: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if ([...longer].length > width && line !== '') {
      lines.push(line);
      line = word;
    } else {
      line = longer;
    }
  }
  return [...lines, line].map((whole) => whole.replace(/\u00a0/g, ' '));
}

/** A phrase that no line end may part. */
export function together(text: string): string {
  return text.replace(/ /g, '\u00a0');
}
