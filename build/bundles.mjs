import { isBuiltin } from 'node:module';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { builtDataEsbuild } from './builtData.mjs';
import { ruleDeckEsbuild } from './ruleCompiler.mjs';
import { templateEsbuild } from './templateCompiler.mjs';

const shared = {
  bundle: true,
  target: 'node20',
  metafile: true,
  legalComments: 'none',
  logLevel: 'warning',
  // Large, and loaded for few tasks: they stay packages of their own.
  external: ['eecircuit-engine', 'mathjs'],
  plugins: [templateEsbuild(), ruleDeckEsbuild(), builtDataEsbuild(), leanYargs()],
};

/**
 * The command as one script, a function of `require`, `__filename` and `__dirname`.
 *
 * CommonJS, for a script takes a code cache and a graph of ES modules none. What is imported dynamically
 * starts when it is first asked for.
 */
export function bundleCommand(root, folder, { write = true } = {}) {
  return build({
    ...shared,
    write,
    absWorkingDir: root,
    entryPoints: { cli: join(root, 'generator/cli/entry.ts') },
    outdir: folder,
    outExtension: { '.js': '.cjs' },
    format: 'cjs',
    platform: 'node',
    charset: 'ascii',
    minifyWhitespace: true,
    minifySyntax: true,
    banner: { js: '(function(require,__filename,__dirname){var module={exports:{}};' },
    footer: { js: '})' },
    // Read in ES modules only: see workerLocation.ts.
    define: { 'import.meta.url': '""' },
  });
}

/** The library as ES modules; what needs Node lies in chunks that only `main` asks for. */
export function bundleLibrary(root, folder, { write = true } = {}) {
  return build({
    ...shared,
    write,
    absWorkingDir: root,
    entryPoints: { index: join(root, 'generator/index.ts') },
    outdir: folder,
    format: 'esm',
    platform: 'neutral',
    mainFields: ['module', 'main'],
    splitting: true,
    chunkNames: 'library/[name]-[hash]',
    plugins: [nodeAtRunTime(), ...shared.plugins],
  });
}

/**
 * Takes Node's own modules from the process that runs, if it is Node, in place of importing them: so a
 * browser's bundler finds nothing that it cannot resolve.
 */
function nodeAtRunTime() {
  return {
    name: 'node-at-run-time',
    setup({ onResolve, onLoad }) {
      onResolve({ filter: /.*/ }, ({ path }) => (isBuiltin(path) ? { path, namespace: 'node' } : undefined));
      onLoad({ filter: /.*/, namespace: 'node' }, ({ path }) => ({
        contents: `module.exports = globalThis.process?.getBuiltinModule?.(${JSON.stringify(path)}) ?? {};`,
        loader: 'js',
      }));
    },
  };
}

/** yargs on our own platform in place of its usual one. */
export function leanYargs() {
  return {
    name: 'lean-yargs',
    setup({ onResolve }) {
      onResolve({ filter: /platform-shims\/esm\.mjs$/ }, () => ({
        path: fileURLToPath(new URL('yargsPlatform.mjs', import.meta.url)),
      }));
    },
  };
}

/**
 * The same script in ASCII alone, which is read without decoding and takes half the memory.
 *
 * The bundler escapes what stands in texts, but leaves regular expressions as they are.
 */
export function inAscii(script) {
  const escapedAlready = script.match(/\\[\u0080-\uffff].*/);
  if (escapedAlready !== null)
    throw new Error(`a backslash before a letter beyond ASCII: ${escapedAlready[0]}`);
  return script.replace(
    /[\u0080-\uffff]/g,
    (unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}
