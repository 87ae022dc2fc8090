import { readFileSync } from 'node:fs';
import { build } from 'esbuild';
import { XMLParser } from 'fast-xml-parser';
import { describe, expect, it } from 'vitest';
import { ruleDeckEsbuild } from '../../build/ruleCompiler.mjs';
import {
  deckFormat,
  editorAttributes,
  exampleOutcomes,
  longestId,
  longestText,
  severities,
} from '../../generator/rules/deckFormat.ts';
import { functionNames } from '../../generator/rules/Expression.ts';
import { outcomeOf } from '../../generator/rules/evaluateRules.ts';
import { expressionBounds } from '../../generator/rules/parseExpression.ts';
import { isQuantityName, quantities } from '../../generator/rules/quantities.ts';
import { deckBounds } from '../../generator/rules/readXml.ts';
import { shippedDeck } from '../../generator/rules/shippedDeck.ts';

const root = new URL('../../', import.meta.url);
const schemaText = readFileSync(new URL('rules/rule-deck.xsd', root), 'utf8');

describe.each(shippedDeck.rules.map((rule) => [rule.id, rule] as const))('the shipped rule %s', (_, rule) => {
  it('has been seen to pass and to fail, as compiled', () => {
    const outcomes = rule.examples.map((example) => example.outcome);
    expect(outcomes).toEqual(expect.arrayContaining(['passes', 'fails']));
    for (const { outcome, quantities: scope } of rule.examples) expect(outcomeOf(rule, scope)).toBe(outcome);
  });

  it('has an example for its condition, if it has one', () => {
    const outcomes = rule.examples.map((example) => example.outcome);
    if (rule.when !== null) expect(outcomes).toContain('not-applicable');
    expect(rule.uses.every(isQuantityName)).toBe(true);
  });

  it('says what to do, why and on whose word, in short sentences', () => {
    for (const text of [rule.whatToDo, rule.reason]) {
      expect(text).toMatch(/^[A-Z].*[.]$/);
      expect(text.length).toBeLessThanOrEqual(160);
    }
    expect(rule.source).toMatch(/^common practice$|\(from memory\)$/);
  });
});

it('the shipped deck holds at least twelve rules, each with a reason of its own', () => {
  expect(shippedDeck.rules.length).toBeGreaterThanOrEqual(12);
  expect(new Set(shippedDeck.rules.map((rule) => rule.reason)).size).toBe(shippedDeck.rules.length);
});

it('a caution about voltage leaves the decision to local codes and a qualified engineer', () => {
  const caution = shippedDeck.rules.find((rule) => rule.id === 'high-input');
  expect(caution?.whatToDo).toMatch(/qualified engineer.*local codes/);
});

describe('the published schema says what the reader does', () => {
  const parser = new XMLParser({ ignoreAttributes: false, attributeNamePrefix: '@', isArray: () => true });
  type SchemaNode = Readonly<Record<string, unknown>>;
  const nodes: { readonly tag: string; readonly node: SchemaNode; readonly within: string }[] = [];
  const visit = (node: SchemaNode, within: string): void => {
    for (const [tag, children] of Object.entries(node)) {
      if (!Array.isArray(children)) continue;
      for (const child of children) {
        if (typeof child !== 'object' || child === null) continue;
        const node = child as SchemaNode;
        nodes.push({ tag, node, within });
        visit(node, '@name' in node ? attributeOf(node, '@name') : within);
      }
    }
  };
  const attributeOf = (node: SchemaNode, name: string) => {
    const value = node[name];
    return String(Array.isArray(value) ? value[0] : value);
  };
  visit(parser.parse(schemaText), '');
  const namesOf = (tag: string, within: string, attribute = '@name') =>
    nodes
      .filter((each) => each.tag === tag && each.within === within)
      .map(({ node }) => attributeOf(node, attribute));

  it('of elements and attributes', () => {
    for (const [name, { attributes, children }] of Object.entries(deckFormat)) {
      expect(namesOf('xs:attribute', name).sort()).toEqual([...attributes].sort());
      expect(namesOf('xs:element', name)).toEqual(children);
    }
    expect(editorAttributes.every((attribute) => attribute.includes('xsi'))).toBe(true);
  });

  it('of severities, outcomes and quantities', () => {
    expect(namesOf('xs:enumeration', 'severity', '@value')).toEqual(severities);
    expect(namesOf('xs:enumeration', 'outcome', '@value')).toEqual(exampleOutcomes);
    expect(namesOf('xs:enumeration', 'quantity', '@value')).toEqual(Object.keys(quantities));
  });

  it('of units and meanings', () => {
    const written = [
      ...schemaText.matchAll(/<xs:documentation xml:lang="en">(\S+: .*)<\/xs:documentation>/g),
    ];
    const texts = written.map((match) => match[1]!).filter((text) => /^(1|V|A|s|F|Ohm): /.test(text));
    expect(texts).toEqual(Object.values(quantities).map(({ unit, meaning }) => `${unit}: ${meaning}`));
  });

  it('of bounds and functions', () => {
    const { characters, nodes: terms, depth } = expressionBounds;
    expect(schemaText).toContain(`At most ${characters} characters, ${terms} terms, ${depth} levels.`);
    expect(schemaText).toContain(`at most ${deckBounds.characters} characters`);
    expect(schemaText).toContain(`functions ${functionNames.join(' ')}.`);
    const bounds = nodes
      .filter(({ tag }) => tag === 'xs:maxLength')
      .map(({ node }) => attributeOf(node, '@value'));
    expect(bounds).toEqual([longestId, characters, longestText].map(String));
  });
});

describe('judging a design by the shipped rules', () => {
  it.each(['evaluateRules.ts', 'shippedDeck.ts', 'describeRules.ts', 'loadUserDeck.ts', 'testRuleDeck.ts'])(
    '%s starts without the parsers',
    async (file) => {
      const { outputFiles } = await build({
        entryPoints: [new URL(`generator/rules/${file}`, root).pathname],
        outdir: 'unwritten',
        bundle: true,
        splitting: true,
        write: false,
        format: 'esm',
        platform: 'neutral',
        packages: 'external',
        plugins: [ruleDeckEsbuild()],
      });
      const entry = outputFiles.find((output) => output.path.endsWith(file.replace('.ts', '.js')))!;
      const reached = staticallyReached(
        entry.path,
        new Map(outputFiles.map(({ path, text }) => [path, text])),
      );
      expect(reached).not.toMatch(/from\s*"(mathjs|fast-xml-parser)/);
    },
  );

  it('while a deck of the user does load them', async () => {
    const { outputFiles } = await build({
      entryPoints: [new URL('generator/rules/loadUserDeck.ts', root).pathname],
      outdir: 'unwritten',
      bundle: true,
      splitting: true,
      write: false,
      format: 'esm',
      platform: 'neutral',
      packages: 'external',
    });
    const everything = outputFiles.map(({ text }) => text).join('\n');
    expect(everything).toMatch(/from\s*"mathjs/);
    expect(everything).toMatch(/from\s*"fast-xml-parser/);
  });
});

/** The text of a chunk and of every chunk that it imports statically. */
function staticallyReached(
  path: string,
  chunks: ReadonlyMap<string, string>,
  seen = new Set<string>(),
): string {
  if (seen.has(path)) return '';
  seen.add(path);
  const text = chunks.get(path) ?? '';
  const folder = path.slice(0, path.lastIndexOf('/') + 1);
  const imported = [...text.matchAll(/(?:from|import)\s*"\.\/([^"]+)"/g)].map(
    (match) => `${folder}${match[1]}`,
  );
  return [text, ...imported.map((each) => staticallyReached(each, chunks, seen))].join('\n');
}
