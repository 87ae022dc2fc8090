// Writes every sample's design again: `npm run samples`. With `--check` it only compares.
import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
const samples = join(root, 'out-samples');
const command = join(root, 'dist', 'counterslope.cjs');

/** Names of the samples: folders with a specification. */
export function sampleNames() {
  return readdirSync(samples).filter((name) => existsSync(join(samples, name, 'spec.yaml')));
}

/** Designs a sample into a folder. The specification is named from the sample's own folder. */
export function designSample(name, directory) {
  execFileSync(process.execPath, [command, 'design', 'spec.yaml', '--out', directory, '--force', '--quiet'], {
    cwd: join(samples, name),
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
    designSample(name, join(samples, name, 'design'));
    console.log(`written: out-samples/${name}/design`);
  }
}

function check() {
  const stale = sampleNames().flatMap((name) => {
    const folder = mkdtempSync(join(tmpdir(), 'counterslope-sample-'));
    try {
      designSample(name, join(folder, 'design'));
      return differences(join(samples, name, 'design'), join(folder, 'design')).map(
        (file) => `out-samples/${name}/design/${file}`,
      );
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
  for (const file of stale) console.log(`stale: ${file}`);
  process.exitCode = stale.length > 0 ? 1 : 0;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  if (process.argv.includes('--check')) check();
  else refresh();
}
