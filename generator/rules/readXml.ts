import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { failure, type Outcome, type Problem, success } from '../base/Problem.ts';
import { placeAt, type SourceText } from './SourceText.ts';

/** Bounds of a deck file: an honest one is far below each. */
export const deckBounds = { characters: 262_144, depth: 8 } as const;

/** An element with where it stands; its text is read from the source, where positions are true. */
export interface XmlElement {
  readonly name: string;
  readonly attributes: ReadonlyMap<string, string>;
  readonly children: readonly XmlElement[];
  /** Index of its `<`. */
  readonly start: number;
  /** From behind the opening tag to before the closing one. */
  readonly contentFrom: number;
  readonly contentTo: number;
}

/**
 * Reads an XML document into its root element: size and forbidden markup first, then well-formedness,
 * then the tree. Document types and processing instructions are refused, so no entity is ever defined.
 * @returns the root, or the problems that keep it from being read
 */
export function readXml(source: SourceText): Outcome<XmlElement> {
  const forbidden = forbiddenMarkup(source);
  if (forbidden !== null) return failure([forbidden]);
  const verdict = XMLValidator.validate(source.text);
  if (verdict !== true) return failure([illFormed(source, verdict.err)]);
  let nodes: unknown;
  try {
    nodes = parser().parse(source.text);
  } catch (error) {
    return failure([refusedByParser(source, error)]);
  }
  const roots = elementsOf(nodes, source.text);
  const [root, second] = roots;
  if (root === undefined || second !== undefined) {
    const at = second?.start ?? 0;
    return failure([
      problem(source, at, 'xml-ill-formed', 'one root', `${roots.length}`, 'keep one ruleDeck'),
    ]);
  }
  return success(root);
}

function parser(): XMLParser {
  return new XMLParser({
    preserveOrder: true,
    captureMetaData: true,
    ignoreAttributes: false,
    attributeNamePrefix: '',
    parseTagValue: false,
    parseAttributeValue: false,
    trimValues: false,
    processEntities: false,
    maxNestedTags: deckBounds.depth,
  });
}

/** What no deck may hold, found before anything parses it; comments and CDATA are blanked first. */
function forbiddenMarkup(source: SourceText): Problem | null {
  const { text } = source;
  if (text.length > deckBounds.characters) {
    const expected = `at most ${deckBounds.characters} characters`;
    return problem(source, 0, 'xml-too-large', expected, `${text.length}`, 'split the deck');
  }
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
  const control = text.search(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\ufffe\uffff]/);
  if (control >= 0) {
    return problem(source, control, 'xml-ill-formed', 'text', 'a control character', 'remove it');
  }
  const bare = text.replace(/<!--[\s\S]*?-->|<!\[CDATA\[[\s\S]*?\]\]>/g, (whole) => ' '.repeat(whole.length));
  const declaration = bare.indexOf('<!');
  if (declaration >= 0) {
    const received = bare.slice(declaration, declaration + 9);
    return problem(source, declaration, 'xml-refused', 'no document type', received, 'remove it');
  }
  const instruction = bare.search(/<\?(?!xml\s)/);
  const late = instruction >= 0 ? instruction : bare.indexOf('<?', 1);
  if (late < 0) return null;
  return problem(source, late, 'xml-refused', 'no processing instruction', '<?', 'remove it');
}

function illFormed(source: SourceText, error: { msg: string; line: number; col?: number }): Problem {
  const place = { path: source.path, line: error.line, column: error.col ?? 1 };
  const fix = 'mend the markup; in text write &lt; for < and &amp; for &';
  const text = { code: 'xml-ill-formed', expected: 'well-formed XML', received: error.msg, fix };
  return { ...text, severity: 'error', key: null, place };
}

function problem(
  source: SourceText,
  at: number,
  code: string,
  expected: string,
  received: string,
  fix: string,
): Problem {
  return { code, severity: 'error', key: null, place: placeAt(source, at), expected, received, fix };
}

/** The parser throws on elements nested too deep, and on names such as `__proto__`. */
function refusedByParser(source: SourceText, error: unknown): Problem {
  const message = error instanceof Error ? error.message : String(error);
  const reserved = /"(\w+)" is a reserved/.exec(message)?.[1];
  const at = reserved === undefined ? 0 : Math.max(0, source.text.indexOf(reserved));
  const received = reserved === undefined ? message : `the reserved name ${reserved}`;
  return problem(source, at, 'xml-refused', 'a plain rule deck', received, 'keep to its elements');
}

type ParsedNode = Readonly<Record<string | symbol, unknown>>;
const metadataKey = XMLParser.getMetaDataSymbol() as symbol;

function elementsOf(nodes: unknown, text: string): XmlElement[] {
  return (nodes as readonly ParsedNode[]).flatMap((node) => {
    const name = Object.keys(node).find((key) => key !== ':@' && key !== '#text' && key !== '?xml');
    return name === undefined ? [] : [elementOf(node, name, text)];
  });
}

function elementOf(node: ParsedNode, name: string, text: string): XmlElement {
  const { startIndex: start, endIndex: end } = node[metadataKey] as { startIndex: number; endIndex: number };
  const tagEnd = openingTagEnd(text, start);
  const isEmpty = text[tagEnd - 1] === '/';
  return {
    name,
    attributes: new Map(Object.entries((node[':@'] ?? {}) as Record<string, string>)),
    children: elementsOf(node[name], text),
    start,
    contentFrom: tagEnd + 1,
    contentTo: isEmpty ? tagEnd + 1 : text.lastIndexOf('</', end - 1),
  };
}

/** Index of the `>` that ends the tag; one inside a quoted value does not. */
function openingTagEnd(text: string, start: number): number {
  let quote: string | null = null;
  for (let i = start; i < text.length; i++) {
    const character = text[i]!;
    if (quote !== null) quote = character === quote ? null : quote;
    else if (character === '"' || character === "'") quote = character;
    else if (character === '>') return i;
  }
  return text.length - 1;
}
