import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { median } from './table.mjs';

/**
 * The cycle engine against the installed ngspice on the same converter: time per cycle, interleaved.
 *
 * The SPICE deck is kinder to SPICE than the emitted ones: an ideal ramp in place of the generator, a step
 * of a thousandth of the period, two vectors saved. Its start-up is taken off by running it short and long.
 */
const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const rounds = Number(process.argv[2] ?? 7);
const wantedRatio = 10_000;
const period_s = 2e-6;
const [shortCycles, longCycles] = [20, 220];
const engineCycles = 5000;
const engineRuns = 60;

function deck(cycles) {
  const step = period_s / 1000;
  return `buck with an ideal ramp
Vin vin 0 12
Vclk clk 0 PULSE(1 0 0 ${step} ${step} ${0.9 * period_s} ${period_s})
Vramp saw 0 PULSE(0 ${3e5 * period_s} 0 ${period_s - 2 * step} ${step} ${step} ${period_s})
Ssw vin sw gate 0 on
Srect 0 sw one gate on
Vone one 0 1
L1 sw out 10u IC=2
Vout out 0 5
Hsense isense 0 Vout 1
Etrip trip 0 sum 0 1000
Esum sum 0 isense lim 1
Elim lim 0 vc saw 1
Vc vc 0 3
Sheld one held trip 0 latch
Cheld held 0 10p
Sclear held 0 clk 0 clear
Egate1 gate gate1 0 held 1
Egate2 gate1 gate2 0 clk 1
Vgate gate2 0 1
.model on SW(vt=0.5 vh=0 ron=1m roff=1meg)
.model latch SW(vt=0 vh=0 ron=10 roff=1g)
.model clear SW(vt=0.5 vh=0 ron=10 roff=1g)
.save i(l1) v(gate)
.tran ${step} ${cycles * period_s} 0 ${step} uic
.end
`;
}

function spiceSeconds(folder, cycles) {
  writeFileSync(join(folder, 'deck.cir'), deck(cycles));
  const start = process.hrtime.bigint();
  const { status, error, stderr } = spawnSync('ngspice', ['-n', '-b', '-r', 'out.raw', 'deck.cir'], {
    cwd: folder,
    encoding: 'utf8',
  });
  const seconds = Number(process.hrtime.bigint() - start) / 1e9;
  if (error) throw new Error(`ngspice could not be run (apt-get install ngspice): ${error.message}`);
  if (status !== 0) throw new Error(`ngspice ends ${status}: ${stderr}`);
  return seconds;
}

async function loadEngine() {
  const { outputFiles } = await build({
    entryPoints: [join(root, 'generator/loop/cycle/runCycles.ts')],
    bundle: true,
    write: false,
    format: 'esm',
  });
  const source = Buffer.from(outputFiles[0].contents).toString('base64');
  return (await import(`data:text/javascript;base64,${source}`)).runCycles;
}

const straight = { kind: 'ideal-output', inductance_H: 10e-6, up_V: 7, down_V: 5, up_ohm: 0, down_ohm: 0 };

/** A buck with 22 µF, 4 mΩ and 1.7 Ω on it. */
function withCapacitor() {
  const interval = (source_V) => ({
    matrix: [
      [-4e-3 / 10e-6, -1 / 10e-6],
      [1 / 22e-6, -1 / (1.7 * 22e-6)],
    ],
    source: [source_V / 10e-6, 0],
    output: { row: [4e-3, 1], constant: 0 },
  });
  return { kind: 'linear', on: interval(12), off: interval(0), idle: null, trip: [1, 0] };
}

const stages = [
  { name: 'ideal output', stage: straight, initial: [2], bound: true },
  {
    name: 'ideal output, 1 mOhm switches',
    stage: { ...straight, up_ohm: 1e-3, down_ohm: 1e-3 },
    initial: [2],
    bound: true,
  },
  { name: 'real output capacitor', stage: withCapacitor(), initial: [2.4, 5], bound: false },
];

function engineSeconds(runCycles, { stage, initial }) {
  const run = {
    stage,
    initial,
    rampSlope_A_per_s: 3e5,
    rampPerOutputVolt_A_per_Vs: 0,
    internalSlope_A_per_s: 0,
    control_A: 3,
    limit: null,
    cycles: engineCycles,
    timing: {
      period_s,
      maximumDuty: 0.9,
      minimumOnTime_s: 0,
      comparatorDelay_s: 0,
      skipsPulses: false,
      rectifies: false,
    },
  };
  const start = process.hrtime.bigint();
  for (let count = 0; count < engineRuns; count += 1) {
    const { edges } = runCycles(run);
    if (!(edges[0][engineCycles] > 1.5 && edges[0][engineCycles] < 3))
      throw new Error('the engine ran astray');
  }
  return Number(process.hrtime.bigint() - start) / 1e9 / (engineCycles * engineRuns);
}

const runCycles = await loadEngine();
const folder = mkdtempSync(join(tmpdir(), 'counterslope-bench-'));
const spice = [];
const own = stages.map(() => []);
try {
  for (const entry of stages) engineSeconds(runCycles, entry);
  for (let round = 0; round < rounds; round += 1) {
    const long_s = spiceSeconds(folder, longCycles);
    spice.push((long_s - spiceSeconds(folder, shortCycles)) / (longCycles - shortCycles));
    for (const [place, entry] of stages.entries()) own[place].push(engineSeconds(runCycles, entry));
  }
} finally {
  rmSync(folder, { recursive: true });
}

console.log(`ngspice at Ts/1000: ${(median(spice) * 1e3).toFixed(2)} ms per cycle, ${rounds} rounds`);
const ratios = own.map((times) => median(times.map((time, round) => spice[round] / time)));
for (const [place, { name, bound }] of stages.entries()) {
  const limit = bound ? ` (wanted: ${wantedRatio})` : '';
  console.log(
    `${name}: ${(median(own[place]) * 1e9).toFixed(0)} ns per cycle, ${Math.round(ratios[place])} times faster${limit}`,
  );
}
process.exitCode = stages.every(({ bound }, place) => !bound || ratios[place] >= wantedRatio) ? 0 : 1;
