import type { Problem } from '../base/Problem.ts';
import type { ExpressionFault } from './Expression.ts';
import type { XmlElement } from './readXml.ts';
import { placeAt, plainText, type SourceText } from './SourceText.ts';

/** What a complaint says, without where. */
export interface Complaint {
  readonly code: string;
  readonly expected: string;
  readonly received: string;
  readonly fix: string;
}

/** Text of an element with the index in the file of each of its characters. */
export interface ElementText {
  readonly text: string;
  readonly origins: readonly number[];
  readonly element: XmlElement;
}

/** Gathers the problems of one deck, so that all are reported at once. */
export class DeckFaults {
  readonly problems: Problem[] = [];
  readonly #source: SourceText;

  constructor(source: SourceText) {
    this.#source = source;
  }

  add(at: number, key: string | null, complaint: Complaint): null {
    this.problems.push({ ...complaint, severity: 'error', key, place: placeAt(this.#source, at) });
    return null;
  }

  /** Faults of an expression, placed by the offset in the element's text. */
  addExpression(within: ElementText, key: string, faults: readonly ExpressionFault[]): null {
    for (const { offset, ...complaint } of faults) {
      const first = within.text.search(/\S/);
      // What the parser misses at the end of the text is missing behind its last character.
      const index = Math.min(Math.max(offset, first), within.origins.length - 1);
      this.add(within.origins[index] ?? within.element.start, key, complaint);
    }
    return null;
  }

  /** Index of an attribute's name, for a complaint about it. */
  attributeAt(element: XmlElement, name: string): number {
    const tag = this.#source.text.slice(element.start, element.contentFrom);
    const before = tag.split(/("[^"]*"|'[^']*')/).map((piece, i) => (i % 2 === 0 ? piece : blank(piece)));
    const at = before.join('').search(new RegExp(`(?<=\\s)${name.replace(/\W/g, '\\$&')}(?=[\\s=])`));
    return element.start + Math.max(0, at);
  }

  /** Text between the children of an element that holds elements only. */
  strayText(element: XmlElement): { readonly at: number; readonly text: string } | null {
    let content = this.#source.text.slice(element.contentFrom, element.contentTo);
    for (const child of element.children) {
      const from = child.start - element.contentFrom;
      const to = Math.max(child.contentTo, child.contentFrom) - element.contentFrom;
      content = content.slice(0, from) + blank(content.slice(from, to)) + content.slice(to);
    }
    const bare = content.replace(/<!--[\s\S]*?-->|<\/[^>]*>/g, blank);
    const at = bare.search(/\S/);
    return at < 0
      ? null
      : { at: element.contentFrom + at, text: bare.slice(at).split('\n')[0]!.slice(0, 40).trim() };
  }

  /** The element's text, or null where markup stands in it. */
  textOf(element: XmlElement, key: string): ElementText | null {
    const read = plainText(this.#source.text, element.contentFrom, element.contentTo);
    if ('text' in read) return { ...read, element };
    const fix = 'write &lt; for < and &amp; for &; no elements inside';
    const received = read.markup.slice(0, 40);
    return this.add(read.at, key, { code: 'deck-text', expected: 'plain text', received, fix });
  }
}

/** As long as before, and empty: indices stay true. */
function blank(text: string): string {
  return ' '.repeat(text.length);
}
