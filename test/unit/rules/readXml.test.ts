import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readRuleDeck } from '../../../generator/rules/readRuleDeck.ts';
import { deckBounds, readXml } from '../../../generator/rules/readXml.ts';
import { placeAt } from '../../../generator/rules/SourceText.ts';
import { deckOf, ruleText } from './deckText.ts';

function problemsOf(text: string) {
  const deck = readRuleDeck(text, 'own.xml');
  return deck.ok ? [] : deck.problems;
}

describe('the XML reader refuses', () => {
  it.each([
    ['an unclosed element', '<ruleDeck version="1"><rule></ruleDeck>', 'xml-ill-formed'],
    ['an attribute twice', '<ruleDeck version="1" version="1"/>', 'xml-ill-formed'],
    ['an attribute without quotes', '<ruleDeck version=1/>', 'xml-ill-formed'],
    ['two roots', '<ruleDeck version="1"/><ruleDeck version="1"/>', 'xml-ill-formed'],
    ['nothing', '', 'xml-ill-formed'],
    ['text that is no XML', 'rules: []', 'xml-ill-formed'],
    ['a control character', '<ruleDeck version="1">\u0001</ruleDeck>', 'xml-ill-formed'],
    ['a document type', '<!DOCTYPE ruleDeck><ruleDeck version="1"/>', 'xml-refused'],
    [
      'an entity definition',
      '<!DOCTYPE a [<!ENTITY x "y">]><ruleDeck version="1">&x;</ruleDeck>',
      'xml-refused',
    ],
    ['an external entity', '<!DOCTYPE a SYSTEM "file:///etc/passwd"><ruleDeck version="1"/>', 'xml-refused'],
    ['a processing instruction', '<?php x?><ruleDeck version="1"/>', 'xml-refused'],
    ['a late declaration', '<ruleDeck version="1"><?xml version="1.0"?></ruleDeck>', 'xml-refused'],
    ['elements too deep', `${'<a>'.repeat(5000)}${'</a>'.repeat(5000)}`, 'xml-refused'],
    ['a prototype key as element', '<ruleDeck version="1"><__proto__/></ruleDeck>', 'xml-refused'],
    ['a prototype key as attribute', '<ruleDeck version="1" __proto__="1"/>', 'xml-refused'],
    ['constructor as element', '<ruleDeck version="1"><constructor/></ruleDeck>', 'xml-refused'],
    ['a file too large', `<!--${' '.repeat(deckBounds.characters)}-->`, 'xml-too-large'],
  ])('%s', (_, text, code) => {
    expect(problemsOf(text).map((problem) => problem.code)).toEqual([code]);
  });

  it('a doctype, but not the word in a comment or a CDATA section', () => {
    const reason = '<!-- <!DOCTYPE x> --><![CDATA[It is no <!DOCTYPE x>.]]>';
    expect(problemsOf(deckOf(ruleText({ reason })))).toEqual([]);
  });

  it('an entity that is not predefined, where it stands', () => {
    const text = deckOf(ruleText({ reason: 'It rings &nbsp; loudly.' }));
    const [problem] = problemsOf(text);
    expect(problem).toMatchObject({ code: 'deck-text', received: '&nbsp;', key: 'own-rule.reason' });
    expect(problem?.place).toEqual(placeAt({ path: 'own.xml', text }, text.indexOf('&nbsp;')));
  });
});

describe('a place', () => {
  it('counts CR LF, LF and CR as one line break each', () => {
    const source = { path: 'x', text: 'a\r\nb\nc\rd' };
    expect(placeAt(source, source.text.indexOf('d'))).toEqual({ path: 'x', line: 4, column: 1 });
  });

  it('of an element is its opening bracket', () => {
    const source = { path: 'x', text: '<a>\n  <b c=">"/>\r\n <d>t</d>\n</a>' };
    const read = readXml(source);
    const places = read.ok ? read.value.children.map((child) => placeAt(source, child.start)) : [];
    expect(places.map(({ line, column }) => [line, column])).toEqual([
      [2, 3],
      [3, 2],
    ]);
  });
});

describe('whatever markup is thrown at the reader', () => {
  const pieces = fc.constantFrom(
    ...[
      '<ruleDeck version="1">',
      '</ruleDeck>',
      '<rule id="a" severity="error">',
      '</rule>',
      '<reason>',
      '</reason>',
    ],
    ...[
      '<requirement>',
      '</requirement>',
      '<',
      '>',
      '/',
      '&',
      '&lt;',
      '&x;',
      '<!--',
      '-->',
      '<![CDATA[',
      ']]>',
      '"',
    ],
    ...[
      '<__proto__>',
      '<constructor/>',
      '<toString>',
      ' a="1"',
      '=',
      '<?',
      '?>',
      '<!DOCTYPE',
      'text',
      '\n',
      '\r',
    ],
  );

  it('it answers with a deck or with placed problems, and changes no prototype', () => {
    const soup = fc.array(pieces, { maxLength: 30 }).map((words) => words.join(''));
    fc.assert(
      fc.property(
        fc.oneof(
          soup,
          soup.map((inner) => deckOf(inner)),
          fc.string({ unit: 'binary' }),
        ),
        (text) => {
          const deck = readRuleDeck(text, 'own.xml');
          if (!deck.ok)
            expect(deck.problems.every(({ place }) => place !== null && place.line! >= 1)).toBe(true);
          expect(deck.ok || deck.problems.length > 0).toBe(true);
          expect(Object.keys(Object.prototype)).toEqual([]);
        },
      ),
      { seed: 20260402, numRuns: 3000 },
    );
  });
});
