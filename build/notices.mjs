import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { argv } from 'node:process';
import { fileURLToPath } from 'node:url';
import { bundleCommand, bundleLibrary } from './bundles.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');

const opening = `# Notices

counterslope's own licence is MIT: see LICENSE. Its files in \`dist\` contain code of the packages below, each
under its own licence. \`npm run notices\` writes this file anew; a test holds it to what is bundled.
`;

/**
 * The notices for what two bundles contain, with the full text of every licence.
 *
 * @param {readonly { inputs: Record<string, { bytesInOutput?: number }> }[]} outputs of esbuild's metafiles
 */
export function noticesFor(outputs) {
  const packages = [...new Set(outputs.flatMap(({ inputs }) => Object.keys(inputs)).map(packageOf))];
  const bundled = packages.filter((name) => name !== null).sort();
  const described = bundled.map((name) => ({ name, ...describe(name) }));
  return [
    opening,
    ['| package | version | licence |', '|---|---|---|', ...described.map(row), ''].join('\n'),
    ...described.map(licenceSection),
    readFileSync(join(root, 'build/noticesOfEngines.md'), 'utf8'),
  ].join('\n');
}

/** The package a bundled file is of; null for our own. */
function packageOf(file) {
  const parts = file.split('node_modules/').at(-1).split('/');
  if (!file.includes('node_modules/')) return null;
  return parts[0].startsWith('@') ? `${parts[0]}/${parts[1]}` : parts[0];
}

function describe(name) {
  const folder = join(root, 'node_modules', name);
  const { version, license, author } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
  const file = readdirSync(folder).find((entry) => /^licen[cs]e/i.test(entry));
  const text = file === undefined ? null : readFileSync(join(folder, file), 'utf8').replaceAll('\r\n', '\n');
  return { version, license, author, text };
}

function row({ name, version, license }) {
  return `| ${name} | ${version} | ${license} |`;
}

function licenceSection({ name, license, author, text }) {
  const words =
    text?.trim() ?? `The package has no licence text. Its package.json says: ${license}, ${holder(author)}.`;
  return `## ${name}\n\n${text === null ? words : `\`\`\`\n${words}\n\`\`\``}\n`;
}

function holder(author) {
  return typeof author === 'string' ? author : (author?.name ?? 'author not named');
}

/** Every file that the two bundles would have, without writing any. */
export async function bundledOutputs() {
  const bundles = await Promise.all([
    bundleCommand(root, join(root, 'dist'), { write: false }),
    bundleLibrary(root, join(root, 'dist'), { write: false }),
  ]);
  return bundles.flatMap(({ metafile }) => Object.values(metafile.outputs));
}

if (argv[1] === fileURLToPath(import.meta.url)) {
  const text = noticesFor(await bundledOutputs());
  const file = join(root, 'NOTICES.md');
  if (!existsSync(file) || readFileSync(file, 'utf8') !== text) writeFileSync(file, text);
}
