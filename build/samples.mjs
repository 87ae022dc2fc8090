// Writes every sample's design again: `npm run samples`. A golden test compares.
import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
export const samplesFolder = join(root, 'out-samples');
const command = join(root, 'dist', 'counterslope.cjs');

/** Names of the samples: folders with a specification. */
export function sampleNames() {
  return readdirSync(samplesFolder).filter((name) => existsSync(join(samplesFolder, name, 'spec.yaml')));
}

/** Designs a sample into a folder and compares the laws there; the specification is named from its own folder. */
export function designSample(name, directory) {
  for (const task of ['design', 'compare'])
    execFileSync(process.execPath, [command, task, 'spec.yaml', '--out', directory, '--force', '--quiet'], {
      cwd: join(samplesFolder, name),
      stdio: ['ignore', 'ignore', 'inherit'],
    });
}

/** Files that differ between two folders, or stand in one only. */
export function differences(expected, actual) {
  const names = (folder) => (existsSync(folder) ? readdirSync(folder) : []);
  const all = [...new Set([...names(expected), ...names(actual)])].sort();
  const text = (folder, name) =>
    existsSync(join(folder, name)) ? readFileSync(join(folder, name), 'utf8') : null;
  return all.filter((name) => text(expected, name) !== text(actual, name));
}

function refresh() {
  for (const name of sampleNames()) {
    designSample(name, join(samplesFolder, name, 'design'));
    console.log(`written: out-samples/${name}/design`);
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) refresh();
