import { copyFileSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';

const specifier = /(\bfrom\s+|\bimport\()(['"])([^'"]+)\2/g;

/**
 * Makes the declarations that tsc wrote fit for a user of the library: only those that `index.d.ts` leads
 * to, under the names of the compiled modules, and without what is not installed there: the schema
 * library, and, in a browser's project, the types of Node.
 */
export function finishTypes(folder) {
  const kept = new Set();
  const queue = ['index.d.ts'];
  for (let file = queue.pop(); file !== undefined; file = queue.pop()) {
    if (kept.has(file)) continue;
    kept.add(file);
    const path = join(folder, file);
    const text = readFileSync(path, 'utf8');
    for (const [, , , target] of text.matchAll(specifier)) {
      if (target.startsWith('.')) queue.push(join(dirname(file), target).replace(/\.[jt]s$/, '.d.ts'));
    }
    writeFileSync(path, finished(text, file));
  }
  for (const file of readdirSync(folder, { recursive: true })) {
    if (file.endsWith('.d.ts') && !kept.has(file)) rmSync(join(folder, file));
  }
  for (const standIn of ['schemaTypes.d.ts', 'nodeTypes.d.ts']) {
    copyFileSync(new URL(standIn, import.meta.url), join(folder, standIn));
  }
}

function finished(text, file) {
  const up = relative(dirname(file), '.').split(sep).join('/') || '.';
  const resolved = text.replace(specifier, (_, before, quote, target) => {
    const found = target === 'zod' ? `${up}/schemaTypes.js` : target;
    return before + quote + (found.startsWith('.') ? found.replace(/\.ts$/, '.js') : found) + quote;
  });
  if (!/\bBuffer\b/.test(resolved)) return resolved;
  return `import type { Buffer } from '${up}/nodeTypes.js';\n${resolved}`;
}
