/** Text of a deck with one rule, for tests; each part can be replaced or, with null, left out. */
export interface RuleParts {
  readonly id?: string;
  readonly severity?: string;
  readonly requirement?: string | null;
  readonly when?: string | null;
  readonly whatToDo?: string | null;
  readonly reason?: string | null;
  readonly source?: string | null;
  readonly more?: string;
}

export function deckOf(...rules: readonly string[]): string {
  return `<ruleDeck version="1">\n${rules.join('\n')}\n</ruleDeck>\n`;
}

export function ruleText(parts: RuleParts = {}): string {
  const texts = {
    requirement: 'dampingIndexMin > 0.5',
    when: null,
    whatToDo: 'Raise the gain.',
    reason: 'It rings.',
    source: 'common practice',
    ...parts,
  };
  const element = (name: 'requirement' | 'when' | 'whatToDo' | 'reason' | 'source') =>
    texts[name] === null ? [] : [`  <${name}>${texts[name]}</${name}>`];
  return [
    `<rule id="${parts.id ?? 'own-rule'}" severity="${parts.severity ?? 'error'}">`,
    ...element('requirement'),
    ...element('when'),
    ...element('whatToDo'),
    ...element('reason'),
    ...element('source'),
    `${parts.more ?? ''}</rule>`,
  ].join('\n');
}
