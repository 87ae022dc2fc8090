import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { median, timeTable } from './table.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const command = join(root, 'dist/counterslope.cjs');
const flags = ['--vin', '8 V to 36 V', '--l', '10 uH', '--fs', '500 kHz', '--json'];
const sample = join(root, 'out-samples/greenhouse-valve/spec.yaml');

const bare = { name: `node -e ''`, words: ['-e', ''] };
const tasks = [
  { name: '--version', words: [command, '--version'], limit: 2 },
  { name: '--help', words: [command, '--help'], limit: 2 },
  { name: 'design --help', words: [command, 'design', '--help'], limit: 2 },
  {
    name: 'design FLAGS --engine none',
    words: [command, 'design', ...flags, '--engine', 'none'],
    limit: 2.5,
  },
  {
    name: 'design FILE --engine none',
    words: [command, 'design', sample, '--json', '--engine', 'none'],
    limit: 2.5,
  },
  { name: 'compare FLAGS --json', words: [command, 'compare', ...flags], limit: 2.5 },
  { name: 'design, whole simulation', words: [command, 'design', ...flags], limit: 60, slow: true },
].filter(({ words }) => !words.includes(sample) || existsSync(sample));

const rounds = Number(process.argv[2] ?? 31);
const slowRounds = Number(process.argv[3] ?? 15);

/** Milliseconds until the process has ended; one that fails has no time to speak of. */
function time({ name, words }) {
  const start = process.hrtime.bigint();
  const { status, stderr } = spawnSync(process.execPath, words, { cwd: root, encoding: 'utf8' });
  const end = process.hrtime.bigint();
  if (status !== 0) throw new Error(`${name} ends ${status}: ${stderr}`);
  return Number(end - start) / 1e6;
}

/**
 * Interleaved and paired: each time is divided by that of the bare start just before it, so that a machine
 * that gets slower or faster meanwhile moves both.
 */
function measure(task, times) {
  const base = time(bare);
  const own = time(task);
  times.bare.push(base);
  times.own.push(own);
  times.ratios.push(own / base);
}

const results = tasks.map((task) => ({ task, times: { bare: [], own: [], ratios: [] }, failure: null }));
for (let round = 0; round < Math.max(rounds, slowRounds); round += 1) {
  for (const result of results) {
    if (result.failure !== null || round >= (result.task.slow ? slowRounds : rounds)) continue;
    try {
      measure(result.task, result.times);
    } catch (error) {
      result.failure = error.message;
    }
  }
}

console.log(timeTable(results));
for (const { failure } of results) if (failure !== null) console.error(failure);
const good = ({ task, times, failure }) => failure === null && median(times.ratios) <= task.limit;
process.exitCode = results.every(good) ? 0 : 1;
