import { createHash } from 'node:crypto';
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { dirname, join, relative } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
const entry = join(root, 'generator/rules/compileRuleDeck.ts');
const cache = join(root, 'node_modules/.cache/counterslope');

let compiler = null;

/**
 * The rule compiler, bundled from its TypeScript once per process.
 *
 * Kept in a file named by its content under node_modules, where its own imports resolve; renamed into
 * place, so that parallel builds never see half of it.
 */
async function loadCompiler() {
  const { outputFiles } = await build({
    entryPoints: [entry],
    bundle: true,
    write: false,
    format: 'esm',
    platform: 'node',
    target: 'node20',
    packages: 'external',
  });
  const source = outputFiles[0].text;
  const name = `ruleCompiler-${createHash('sha256').update(source).digest('hex').slice(0, 16)}.mjs`;
  const file = join(cache, name);
  await mkdir(cache, { recursive: true });
  const draft = `${file}.${process.pid}.${Date.now()}`;
  await writeFile(draft, source);
  await rename(draft, file);
  return import(pathToFileURL(file).href);
}

/** Compiles a rule deck into an ES module; the problems of an unsound one come back as data. */
export async function compileDeck(text, file) {
  compiler ??= loadCompiler();
  const { compileRuleDeck } = await compiler;
  return compileRuleDeck(text, relative(root, file));
}

function inWords({ code, key, place, expected, received, fix }) {
  return {
    text: `${code}: ${key ?? ''}: expected ${expected}; received ${received}. ${fix}`,
    location: { file: place?.path ?? '', line: place?.line ?? 1, column: (place?.column ?? 1) - 1 },
  };
}

/** esbuild plugin: `import rules from './deck.xml'` gives compiled rules. */
export function ruleDeckEsbuild() {
  return {
    name: 'rule-deck',
    setup({ onLoad }) {
      onLoad({ filter: /\.xml$/ }, async ({ path }) => {
        const compiled = await compileDeck(await readFile(path, 'utf8'), path);
        return compiled.ok
          ? { contents: compiled.value, loader: 'js', watchFiles: [path] }
          : { errors: compiled.problems.map(inWords) };
      });
    },
  };
}

/** The same for vite and vitest. */
export function ruleDeckVite() {
  return {
    name: 'rule-deck',
    enforce: 'pre',
    async transform(text, id) {
      if (!id.endsWith('.xml')) return null;
      const compiled = await compileDeck(text, id);
      if (compiled.ok) return { code: compiled.value, map: null };
      const complaints = compiled.problems.map(inWords);
      return this.error(complaints.map(({ text, location }) => `${location.line}: ${text}`).join('\n'));
    },
  };
}
