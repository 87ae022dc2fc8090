/**
 * The elements and attributes of a rule deck, as `rules/rule-deck.xsd` publishes them.
 *
 * A test holds this table and the schema together.
 */
export interface ElementFormat {
  readonly attributes: readonly string[];
  readonly children: readonly string[];
}

const leaf: ElementFormat = { attributes: [], children: [] };

export const deckFormat = {
  ruleDeck: { attributes: ['version'], children: ['rule'] },
  rule: {
    attributes: ['id', 'severity'],
    children: ['requirement', 'when', 'whatToDo', 'reason', 'source', 'example'],
  },
  requirement: leaf,
  when: leaf,
  whatToDo: leaf,
  reason: leaf,
  source: leaf,
  example: { attributes: ['outcome'], children: [] },
} as const satisfies Readonly<Record<string, ElementFormat>>;

export type ElementName = keyof typeof deckFormat;

/** Attributes with which an editor finds the schema; they carry nothing for us. */
export const editorAttributes: readonly string[] = ['xmlns:xsi', 'xsi:noNamespaceSchemaLocation'];

export const requiredParts = ['requirement', 'whatToDo', 'reason', 'source'] as const;
export const severities = ['error', 'warning', 'note'] as const;
export const exampleOutcomes = ['passes', 'fails', 'not-applicable'] as const;

export const idPattern = /^[a-z][a-z0-9]*(?:-[a-z0-9]+)*$/;
export const longestId = 64;
/** Characters of one sentence or two; longer texts belong in a document that the source names. */
export const longestText = 600;
