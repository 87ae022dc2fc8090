import { pathToFileURL } from 'node:url';

/**
 * Where the embedded engine's thread begins: beside this module in the sources, beside the bundle in `dist`.
 *
 * A CommonJS bundle has no `import.meta`, an ES module no `__filename`.
 */
export function embeddedWorkerUrl(): URL {
  const here = typeof __filename === 'string' ? pathToFileURL(__filename).href : import.meta.url;
  return new URL('./embedded-worker.mjs', here);
}
