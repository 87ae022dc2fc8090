import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import Handlebars from 'handlebars';
import { expect, onTestFinished, test } from 'vitest';
import { readTemplate, templateEsbuild, templateOptions } from '../../../build/templateCompiler.mjs';

type Template = (view: object) => string;

const hostile = `<script>alert("1")</script> & 'x' {{y}}`;

function folder(files: Record<string, string>): (name: string) => string {
  const made = mkdtempSync(join(tmpdir(), 'templates-'));
  onTestFinished(() => rmSync(made, { recursive: true }));
  for (const [name, text] of Object.entries(files)) writeFileSync(join(made, name), text);
  return (name) => join(made, name);
}

async function compiled(path: string): Promise<Template> {
  const module = join(mkdtempSync(join(tmpdir(), 'compiled-')), 'template.mjs');
  onTestFinished(() => rmSync(join(module, '..'), { recursive: true }));
  await build({
    stdin: { contents: `export { default } from ${JSON.stringify(path)};`, resolveDir: process.cwd() },
    nodePaths: [join(process.cwd(), 'node_modules')],
    bundle: true,
    format: 'esm',
    logLevel: 'silent',
    outfile: module,
    plugins: [templateEsbuild()],
  });
  const { default: template } = (await import(pathToFileURL(module).href)) as { default: Template };
  return template;
}

function interpreted(path: string): Template {
  const engine = Handlebars.create();
  const { text, partials } = readTemplate(path);
  for (const [name, partial] of partials) engine.registerPartial(name, partial.text);
  return engine.compile(text, templateOptions(path)) as Template;
}

/**
 * A view that has whatever a template asks for: every key gives a further view, every list two of them, and
 * each prints its own path with what is dangerous in some file.
 */
function plentifulView(path = 'view'): object {
  const text = () => `${path}: ${hostile}`;
  const child = (key: string) => {
    if (key === 'toString') return text;
    return key === 'toHTML' || key === 'valueOf' ? undefined : plentifulView(`${path}.${key}`);
  };
  return new Proxy(
    {},
    {
      has: (_, key) => typeof key === 'string',
      get: (_, key) => (typeof key === 'string' ? child(key) : undefined),
      ownKeys: () => ['first', 'second'],
      getOwnPropertyDescriptor: (_, key) => ({
        value: child(String(key)),
        configurable: true,
        enumerable: true,
      }),
    },
  );
}

const shipped = readdirSync('templates').filter((name) => name.endsWith('.hbs') && !name.startsWith('_'));

test.each(shipped)('%s compiled at build gives the text that it gives interpreted', async (name) => {
  const path = join(process.cwd(), 'templates', name);
  const view = plentifulView();
  const output = interpreted(path)(view);
  expect((await compiled(path))(view)).toBe(output);
  expect(output).toContain('view.title: ');
});

test('a figure that is not in the view is refused, not left blank', async () => {
  const at = folder({ 'a.cir.hbs': 'R1 in out {{resistance}}\n' });
  const template = await compiled(at('a.cir.hbs'));
  expect(template({ resistance: '10' })).toBe('R1 in out 10\n');
  expect(() => template({})).toThrow(/resistance/);
});

test.each([
  ['page.html.hbs', '<p>&lt;b&gt;</p>'],
  ['drawing.svg.hbs', '<p>&lt;b&gt;</p>'],
  ['deck.cir.hbs', '<p><b></p>'],
  ['table.csv.hbs', '<p><b></p>'],
])('values in %s are escaped if it is markup, untouched if not', async (name, expected) => {
  const at = folder({ [name]: '<p>{{value}}</p>' });
  expect((await compiled(at(name)))({ value: '<b>' })).toBe(expected);
});

test('a partial is found beside its template, also from another partial, and is escaped like it', async () => {
  const at = folder({
    'page.html.hbs': '{{#each rows}}{{> row}}{{/each}}',
    'deck.cir.hbs': '{{#each rows}}{{> row}}{{/each}}',
    '_row.hbs': '[{{> cell}}]',
    '_cell.html.hbs': '<td>{{value}}</td>',
    '_cell.hbs': '{{value}};',
  });
  const view = { rows: [{ value: '<' }, { value: '>' }] };
  expect((await compiled(at('page.html.hbs')))(view)).toBe('[<td>&lt;</td>][<td>&gt;</td>]');
  expect((await compiled(at('deck.cir.hbs')))(view)).toBe('[<;][>;]');
});

test.each([
  ['a helper that decides', '{{#unless a}}b{{/unless}}'],
  ['a helper that looks up', '{{#with a}}b{{/with}}'],
  ['an unknown helper', '{{shout a}}'],
  ['a partial that is not there', '{{> nowhere}}'],
  ['a partial chosen at run time', '{{> (choose a)}}'],
  ['an open block', '{{#if a}}b'],
])('the build stops at %s', async (_, text) => {
  const at = folder({ 'a.cir.hbs': text });
  await expect(compiled(at('a.cir.hbs'))).rejects.toThrow(/Build failed/);
});
