import { expect, test } from 'vitest';
import { htmlAttribute, htmlText } from '../../../../generator/emit/text/html.ts';
import { hostileTitles } from './hostileTitles.ts';

/** What a browser would show. */
function decoded(html: string): string {
  const names: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"' };
  return html.replace(/&(?:#(\d+)|(\w+));/g, (_, code: string, name: string) =>
    code === undefined ? names[name]! : String.fromCharCode(Number(code)),
  );
}

test.each(hostileTitles)('opens no element and is shown as written: %j', (title) => {
  expect(htmlText(title)).not.toMatch(/[<>"'`]/);
  expect(decoded(htmlText(title))).toBe(title);
});

test.each(hostileTitles)('stays inside its attribute: %j', (title) => {
  const [, value] = /^title="([^"<>\r\n\t]*)"$/.exec(htmlAttribute('title', title))!;
  expect(decoded(value!)).toBe(title);
});

test('text that looks escaped is shown, not decoded', () => {
  expect(htmlText('&lt;b&gt;')).toBe('&amp;lt;b&amp;gt;');
});

test.each(['onclick', 'ONLOAD', 'a b', 'x=', ''])('%j is no attribute for data', (name) => {
  expect(() => htmlAttribute(name, 'x')).toThrow(RangeError);
});
