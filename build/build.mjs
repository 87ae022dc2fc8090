import { spawnSync } from 'node:child_process';
import { chmodSync, copyFileSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { renderAnswers } from './answers.mjs';
import { bundleCommand, bundleLibrary, inAscii } from './bundles.mjs';
import { finishTypes } from './libraryTypes.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
// Built aside and put in its place whole: a command that starts meanwhile finds one build, not half of two.
const folder = join(root, `.tmp/dist-${process.pid}`);
const place = join(root, 'dist');
const old = `${folder}-old`;

/** What most runs do, from a file and with flags; the functions that they call are in the code cache. */
const flags = '--vin|8 V to 36 V|--l|10 uH|--json'.split('|');
const representative = [
  ['design', 'out-samples/greenhouse-valve/spec.yaml', ...flags, '--engine', 'none'],
  ['compare', ...flags, '--fs', '500 kHz'],
];

try {
  mkdirSync(folder, { recursive: true });
  await Promise.all([bundleCommand(root, folder), bundleLibrary(root, folder)]);
  const script = join(folder, 'cli.cjs');
  writeFileSync(script, inAscii(readFileSync(script, 'utf8')));
  placeWorker();
  placeLauncher();
  makeCodeCache();
  node('node_modules/typescript/bin/tsc', '-p', 'tsconfig.types.json', '--outDir', join(folder, 'types'));
  finishTypes(join(folder, 'types'));
  replace();
} finally {
  rmSync(folder, { recursive: true, force: true });
  rmSync(old, { recursive: true, force: true });
}

/** Beside each module that starts it: the command, and a chunk of the library. */
function placeWorker() {
  const worker = 'embedded-worker.mjs';
  for (const beside of ['.', 'library']) {
    copyFileSync(join(root, 'generator/spice/engine', worker), join(folder, beside, worker));
  }
}

function placeLauncher() {
  const launcher = join(folder, 'counterslope.cjs');
  copyFileSync(join(root, 'build/launcher.cjs'), launcher);
  chmodSync(launcher, 0o755);
  const answers = join(folder, 'answers.json');
  writeFileSync(answers, '{}');
  writeFileSync(answers, JSON.stringify(renderAnswers(folder)));
}

/** A run that goes wrong still leaves a cache, and the command to find out why with. */
function makeCodeCache() {
  try {
    node('build/codeCache.cjs', folder, JSON.stringify(representative));
  } catch (error) {
    console.warn(`the run for the code cache: ${error.message}`);
  }
}

function node(script, ...words) {
  const { status, stdout, stderr } = spawnSync(process.execPath, [join(root, script), ...words], {
    cwd: root,
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(`node ${script} ${words.join(' ')} ends ${status}\n${stdout}${stderr}`);
}

function replace() {
  try {
    renameSync(place, old);
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
  }
  renameSync(folder, place);
}
