import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import fc from 'fast-check';
import { afterAll, expect, test } from 'vitest';
import { leanYargs } from '../../../build/bundles.mjs';
import { takesValue } from '../../../generator/cli/commandLine/Flag.ts';
import { flags } from '../../../generator/cli/commandLine/flags.ts';
import { parseArguments } from '../../../generator/cli/commandLine/parseArguments.ts';

const folder = mkdtempSync(join(tmpdir(), 'yargs-'));
afterAll(() => rmSync(folder, { recursive: true }));

async function bundledParser(): Promise<typeof parseArguments> {
  const outfile = join(folder, 'parser.mjs');
  await build({
    entryPoints: ['generator/cli/commandLine/parseArguments.ts'],
    bundle: true,
    format: 'esm',
    platform: 'node',
    outfile,
    plugins: [leanYargs()],
  });
  return (await import(pathToFileURL(outfile).href)).parseArguments;
}

const text = fc.oneof(
  fc.string({ unit: 'binary', maxLength: 12 }),
  fc.constantFrom(
    '-12 V',
    '--help',
    '',
    '--',
    '=',
    '"quoted"',
    '0x10',
    '1e3',
    'a.b',
    'no-color',
    '__proto__',
  ),
);
const given = fc.array(
  fc.record({ flag: fc.constantFrom(...flags), value: text }).map(({ flag, value }) => ({
    flag,
    value: takesValue(flag) ? value : null,
  })),
  { maxLength: 6 },
);

test('yargs on the platform of the bundle reads every line as yargs on its own does', async () => {
  const bundled = await bundledParser();
  await fc.assert(
    fc.asyncProperty(fc.array(text, { maxLength: 3 }), given, async (words, tokens) => {
      const line = { words, given: tokens, problems: [] };
      expect(await bundled(line)).toEqual(await parseArguments(line));
    }),
    { numRuns: 200 },
  );
});
