import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { runInNewContext } from 'node:vm';
import { build } from 'esbuild';
import { beforeAll, expect, test } from 'vitest';
import { bundledOutputs, noticesFor } from '../../build/notices.mjs';

let outputs: Awaited<ReturnType<typeof bundledOutputs>> = [];

beforeAll(async () => {
  outputs = await bundledOutputs();
});

test('NOTICES.md names every package that is bundled, with its version and licence, and no other', () => {
  expect(readFileSync('NOTICES.md', 'utf8')).toBe(noticesFor(outputs));
});

test('what is large or needed at build only is in no bundle', () => {
  const inputs = outputs.flatMap(({ inputs }) => Object.keys(inputs));
  expect(inputs.length).toBeGreaterThan(100);
  expect(
    inputs.filter((path) => /node_modules\/(zod|ajv|mathjs|eecircuit-engine|esbuild)\//.test(path)),
  ).toEqual([]);
});

test('no module of the library imports one of Node', () => {
  const modules = [
    'dist/index.js',
    ...readdirSync('dist/library')
      .filter(isModule)
      .map((name) => join('dist/library', name)),
  ];
  expect(modules.length).toBeGreaterThan(1);
  for (const path of modules)
    expect(readFileSync(path, 'utf8')).not.toMatch(/(from|import\(?|require\()\s*["']node:/);
});

function isModule(name: string): boolean {
  return name.endsWith('.js');
}

test('the library is bundled for a browser by a bundler that knows nothing of Node, and starts there', async () => {
  const { outputFiles } = await build({
    stdin: { contents: `export * from './dist/index.js';`, resolveDir: process.cwd() },
    bundle: true,
    write: false,
    format: 'iife',
    globalName: 'counterslope',
    platform: 'browser',
    external: ['eecircuit-engine', 'mathjs'],
    // A script has no address of its own; only the engine's thread asks for it.
    define: { 'import.meta.url': '""' },
  });
  const page: { counterslope?: Record<string, unknown> } = {};
  runInNewContext(outputFiles[0]!.text, page);
  expect(page.counterslope).toMatchObject({ main: expect.any(Function) });
});
