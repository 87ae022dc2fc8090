import type { Place } from '../base/Problem.ts';

/** Text of a file that turns an index into a place that a person can find. */
export interface SourceText {
  readonly path: string;
  readonly text: string;
}

/** One-based line and column; a CR LF pair is one line break. */
export function placeAt({ path, text }: SourceText, index: number): Place {
  const before = text.slice(0, Math.max(0, index)).split(/\r\n|\r|\n/);
  return { path, line: before.length, column: before.at(-1)!.length + 1 };
}

/** Text with its markup taken away, and for each of its characters the index it came from. */
export interface PlainText {
  readonly text: string;
  readonly origins: readonly number[];
}

const predefined: ReadonlyMap<string, string> = new Map([
  ['&lt;', '<'],
  ['&gt;', '>'],
  ['&amp;', '&'],
  ['&quot;', '"'],
  ['&apos;', "'"],
]);

/** A stretch of content: a CDATA section, a comment, an entity reference, an element, or one character. */
const stretch = /<!\[CDATA\[([\s\S]*?)\]\]>|<!--[\s\S]*?-->|&[^;\s<&]*;?|<[^>]*>|[\s\S]/gu;

/**
 * Reads the content of an element between two indices.
 *
 * Only the five predefined entities are known: a deck cannot define any, so nothing can expand.
 * @returns the text, or the index and wording of the first markup that does not belong in it
 */
export function plainText(source: string, from: number, to: number): PlainText | UnexpectedMarkup {
  const pieces: string[] = [];
  const origins: number[] = [];
  const put = (piece: string, origin: number, step: 0 | 1) => {
    pieces.push(piece);
    for (let i = 0; i < piece.length; i++) origins.push(origin + i * step);
  };
  for (const match of source.slice(from, to).matchAll(stretch)) {
    const [whole, section] = match;
    const at = from + match.index;
    if (section !== undefined) put(section, at + '<![CDATA['.length, 1);
    else if (whole.startsWith('&')) {
      const character = predefined.get(whole);
      if (character === undefined) return { at, markup: whole };
      put(character, at, 0);
    } else if (whole.startsWith('<!--')) put(' ', at, 0);
    else if (whole.startsWith('<')) return { at, markup: whole };
    else put(whole, at, 1);
  }
  return { text: pieces.join(''), origins };
}

export interface UnexpectedMarkup {
  readonly at: number;
  readonly markup: string;
}
