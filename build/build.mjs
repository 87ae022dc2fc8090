import { spawnSync } from 'node:child_process';
import { chmodSync, copyFileSync, mkdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { renderAnswers } from './answers.mjs';
import { bundleCommand, bundleLibrary } from './bundles.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
// Built aside and put in its place whole: a command that starts meanwhile finds one build, not half of two.
const folder = join(root, `.tmp/dist-${process.pid}`);
const place = join(root, 'dist');
const old = `${folder}-old`;

const worker = 'embedded-worker.mjs';
const representative = [
  'design',
  '--vin',
  '8 V to 36 V',
  '--l',
  '10 uH',
  '--fs',
  '500 kHz',
  '--engine',
  'none',
  '--json',
];

try {
  mkdirSync(folder, { recursive: true });
  await Promise.all([bundleCommand(root, folder), bundleLibrary(root, folder)]);
  // Beside each module that starts it: the command and a chunk of the library.
  for (const beside of ['.', 'library']) {
    copyFileSync(join(root, 'generator/spice/engine', worker), join(folder, beside, worker));
  }
  copyFileSync(join(root, 'build/launcher.cjs'), join(folder, 'counterslope.cjs'));
  chmodSync(join(folder, 'counterslope.cjs'), 0o755);
  writeFileSync(join(folder, 'answers.json'), '{}');
  writeFileSync(join(folder, 'answers.json'), JSON.stringify(renderAnswers(folder)));
  node(join(root, 'build/codeCache.cjs'), folder, ...representative);
  node(
    join(root, 'node_modules/typescript/bin/tsc'),
    '-p',
    'tsconfig.types.json',
    '--outDir',
    join(folder, 'types'),
  );
  replace();
} finally {
  rmSync(folder, { recursive: true, force: true });
  rmSync(old, { recursive: true, force: true });
}

function node(...words) {
  const { status, stdout, stderr } = spawnSync(process.execPath, words, { cwd: root, encoding: 'utf8' });
  if (status !== 0 && !words.includes('design'))
    throw new Error(`node ${words.join(' ')} ends ${status}\n${stdout}${stderr}`);
}

function replace() {
  try {
    renameSync(place, old);
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
  }
  renameSync(folder, place);
}
