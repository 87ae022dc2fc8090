/** No line of help is wider. */
export const helpWidth = 80;

/** Words set in lines of at most the given width; a longer word stands alone. */
export function wrap(text: string, width: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/\s+/).filter((part) => part !== '')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (longer.length > width && line !== '') {
      lines.push(line);
      line = word;
    } else {
      line = longer;
    }
  }
  return line === '' ? lines : [...lines, line];
}

/** Two columns, the first as wide as its widest entry, the second wrapped beside it. */
export function columns(rows: readonly (readonly [string, string])[]): readonly string[] {
  const first = Math.max(...rows.map(([left]) => left.length));
  return rows.flatMap(([left, right]) => {
    const [head = '', ...rest] = wrap(right, helpWidth - first - 4);
    return [
      `  ${left.padEnd(first)}  ${head}`.trimEnd(),
      ...rest.map((line) => `${' '.repeat(first + 4)}${line}`),
    ];
  });
}

/** A heading with its lines, and an empty line before it. */
export function section(heading: string, lines: readonly string[]): readonly string[] {
  return lines.length === 0 ? [] : ['', heading, ...lines];
}
