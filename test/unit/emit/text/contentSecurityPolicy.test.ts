import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { contentSecurityPolicy } from '../../../../generator/emit/text/contentSecurityPolicy.ts';

const hashOf = (text: string) => `'sha256-${createHash('sha256').update(text, 'utf8').digest('base64')}'`;

test('our own code is allowed by its hash, images as data, nothing else', async () => {
  expect(
    await contentSecurityPolicy({ scripts: ['let Ω = 1;', 'second()'], styles: ['p { margin: 0 }'] }),
  ).toBe(
    [
      "default-src 'none'",
      'img-src data:',
      `script-src ${hashOf('let Ω = 1;')} ${hashOf('second()')}`,
      `style-src ${hashOf('p { margin: 0 }')}`,
      "base-uri 'none'",
      "form-action 'none'",
    ].join('; '),
  );
});

test('a page without code allows none', async () => {
  const policy = await contentSecurityPolicy({ scripts: [], styles: [] });
  expect(policy).toContain("script-src 'none'");
  expect(policy).toContain("style-src 'none'");
});

test.each(['x</script>', 'x</SCRIPT ', 'x\r\ny'])('%j would not be read as it was hashed', async (script) => {
  await expect(contentSecurityPolicy({ scripts: [script], styles: [] })).rejects.toThrow(RangeError);
});
