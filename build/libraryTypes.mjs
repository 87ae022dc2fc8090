import { copyFileSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';

const specifier = /(\bfrom\s+|\bimport\()(['"])([^'"]+)\2/g;

/**
 * Makes the declarations that tsc wrote fit for a user of the library: only those that `index.d.ts` leads
 * to, under the names of the compiled modules, and without the schema library, which is not installed there.
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
    writeFileSync(
      path,
      text.replace(specifier, (_, before, quote, target) => before + quote + finished(target, file) + quote),
    );
  }
  for (const file of readdirSync(folder, { recursive: true })) {
    if (file.endsWith('.d.ts') && !kept.has(file)) rmSync(join(folder, file));
  }
  copyFileSync(new URL('schemaTypes.d.ts', import.meta.url), join(folder, 'schemaTypes.d.ts'));
}

function finished(target, file) {
  if (target === 'zod') return `${relative(dirname(file), '.').split(sep).join('/') || '.'}/schemaTypes.js`;
  return target.startsWith('.') ? target.replace(/\.ts$/, '.js') : target;
}
