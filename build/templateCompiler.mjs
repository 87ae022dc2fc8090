import { existsSync, readFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import handlebars from 'handlebars';

/** Templates of these kinds become markup, so every value in them is escaped; in all others none is. */
const markup = /\.(html|svg)\.hbs$/;

/** Only `if` and `each` may be used: a template lays out, code prepares every string. */
const knownHelpers = {
  helperMissing: false,
  blockHelperMissing: false,
  unless: false,
  with: false,
  log: false,
  lookup: false,
};

/** How every template is compiled, here and by the test that holds compiled and interpreted equal. */
export function templateOptions(path) {
  return { strict: true, noEscape: !markup.test(path), knownHelpers, knownHelpersOnly: true };
}

/** Names of the partials that a template calls, each once, in their order. */
class PartialNames extends handlebars.Visitor {
  names = new Set();

  PartialStatement(statement) {
    if (statement.name.type !== 'PathExpression') throw new Error('a partial is called by its name');
    this.names.add(statement.name.original);
    super.PartialStatement(statement);
  }
}

/**
 * A template's text with those of all its partials, theirs included.
 *
 * The partial `name` of `report.html.hbs` is `_name.html.hbs` or `_name.hbs` in the same folder; it is
 * escaped as the template that calls it.
 * @returns {{ text: string, partials: Map<string, { text: string, path: string }> }}
 */
export function readTemplate(path, text = readFileSync(path, 'utf8')) {
  const partials = new Map();
  const queue = [text];
  for (let next = queue.shift(); next !== undefined; next = queue.shift()) {
    const visitor = new PartialNames();
    visitor.accept(handlebars.parse(next));
    for (const name of visitor.names) {
      if (partials.has(name)) continue;
      const partial = readPartial(path, name);
      partials.set(name, partial);
      queue.push(partial.text);
    }
  }
  return { text, partials };
}

function readPartial(path, name) {
  const kind = basename(path).split('.').slice(1, -1).join('.');
  const places = [`_${name}.${kind}.hbs`, `_${name}.hbs`].map((file) => join(dirname(path), file));
  const found = places.find((place) => existsSync(place));
  if (found === undefined) throw new Error(`partial ${name}: none of ${places.join(', ')} is there`);
  return { text: readFileSync(found, 'utf8'), path: found };
}

/** An ES module whose default export fills the template; it needs the handlebars runtime only. */
export function compileTemplate(path, source) {
  const { text, partials } = readTemplate(path, source);
  const options = templateOptions(path);
  const entries = [...partials].map(
    ([name, partial]) =>
      `${JSON.stringify(name)}: runtime.template(${handlebars.precompile(partial.text, options)})`,
  );
  const code = [
    `import runtime from 'handlebars/runtime.js';`,
    `const partials = { ${entries.join(',\n')} };`,
    `const template = runtime.template(${handlebars.precompile(text, options)});`,
    `export default (view) => template(view, { partials });`,
    '',
  ].join('\n');
  return { code, files: [...partials.values()].map((partial) => partial.path) };
}

/** esbuild plugin: `import template from './name.cir.hbs'` gives a function from a view to text. */
export function templateEsbuild() {
  return {
    name: 'template',
    setup({ onLoad }) {
      onLoad({ filter: /\.hbs$/ }, ({ path }) => {
        try {
          const { code, files } = compileTemplate(path);
          return { contents: code, loader: 'js', resolveDir: dirname(path), watchFiles: [path, ...files] };
        } catch (problem) {
          return { errors: [{ text: problem.message, location: { file: path } }] };
        }
      });
    },
  };
}

/**
 * The same for vite and vitest.
 * @returns {import('vite').Plugin}
 */
export function templateVite() {
  return {
    name: 'template',
    enforce: 'pre',
    transform(text, id) {
      const path = id.split('?')[0];
      if (!path.endsWith('.hbs')) return null;
      const { code, files } = compileTemplate(path, text);
      for (const file of files) this.addWatchFile(file);
      return { code, map: null };
    },
  };
}
