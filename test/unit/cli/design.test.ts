import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Stages } from '../../../generator/cli/Stages.ts';
import type { Result } from '../../../generator/emit/resultSchema.ts';
import type { SpiceEngine } from '../../../generator/spice/Deck.ts';
import { newFolder, run } from './session.ts';

const figures = ['--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz'];
const sizing = ['design', ...figures, '--engine', 'none'];

/** Files without the report, which has tests of its own. */
const fewFiles: Pick<Stages, 'files'> = {
  files: async (_design, result) => new Map([['result.json', `${JSON.stringify(result)}\n`]]),
};

describe('design', () => {
  it('prints nothing but the result as JSON, and writes no file, when only asked for it', async () => {
    const cwd = await newFolder();
    const { code, stdout, stderr } = await run([...sizing, '--json', '--quiet'], { cwd });
    expect([code, stderr]).toEqual([0, '']);
    const result: Result = JSON.parse(stdout);
    expect(result.schema).toBe('counterslope/result/1');
    expect(result.simulation).toBeNull();
    expect(await disk.readdir(cwd)).toEqual([]);
  });

  it('says to people that every duty is assumed possible where the output is not known', async () => {
    const { code, stdout } = await run(sizing);
    expect(code).toBe(0);
    expect(stdout.replace(/\s+/g, ' ')).toContain('output not known: each is assumed possible');
    expect(stdout.split('\n').length).toBeLessThanOrEqual(25);
  });

  it('reads the same from a file, from standard input and from flags', async () => {
    const cwd = await newFolder();
    const text = 'input: 8 V to 36 V\ninductance: 10uH\nfrequency: 500kHz\n';
    await disk.writeFile(join(cwd, 'rail.yaml'), `\ufeff${text.replaceAll('\n', '\r\n')}`);
    const ask = (...source: string[]) =>
      run(['design', ...source, '--engine', 'none', '--json'], { cwd, stdin: text });
    const fromFlags = (await ask(...figures)).stdout;
    expect((await ask('rail.yaml')).stdout).toBe(fromFlags);
    expect((await ask('-')).stdout).toBe(fromFlags);
    expect((await ask('rail.yaml', '--set', 'frequency=300kHz')).stdout).not.toBe(fromFlags);
  });

  it('tells every problem of specification, rule deck, time limit and folder at once', async () => {
    const argv = ['design', '--vin', '8', '--rules', 'none.xml', '--timeout', 'soon', '--out', '.'];
    const { code, stderr } = await run(argv);
    expect(code).toBe(2);
    for (const place of ['--vin', 'none.xml', '--timeout', '.:']) expect(stderr).toContain(`error: ${place}`);
  });

  it('ends with 1 for a sound specification without a circuit, and says which inequality fails', async () => {
    const stages = { ...fewFiles, design: async () => ({ ok: false as const, problems: [noCircuit] }) };
    const cwd = await newFolder();
    const { code, stdout, stderr } = await run([...sizing, '--out', 'set', '--json'], { cwd, stages });
    expect(code).toBe(1);
    expect(stderr).toMatch(/^error: expected amplitude ≤ 3\.1 V, received 4\.2 V/);
    expect(JSON.parse(stdout).problems).toMatchObject([{ code: 'no-circuit', path: null }]);
    expect(await disk.readdir(cwd)).toEqual([]);
  });

  it('writes the set and ends with 1 when a rule of severity error fails', async () => {
    const cwd = await newFolder();
    const stages = {
      ...fewFiles,
      ruleQuantities: async () => ({ dampingIndexMin: 0.4 }),
    };
    const { code, stdout } = await run([...sizing, '--out', 'set'], { cwd, stages });
    expect(code).toBe(1);
    expect(stdout).toMatch(/^failed +rule stability/m);
    expect((await disk.readdir(join(cwd, 'set'))).sort()).toEqual(['manifest.json', 'result.json']);
  });

  it('holds a design to the rules of a deck of the user too', async () => {
    const cwd = await newFolder();
    await disk.writeFile(join(cwd, 'house.xml'), houseDeck);
    const { code, stdout } = await run([...sizing, '--rules', 'house.xml'], { cwd });
    expect(code).toBe(1);
    expect(stdout).toMatch(/^failed +rule house-input: 36\.0 V, limit 20\.0 V/m);
  });

  it('refuses a file that was edited by hand, before the long work, unless forced', async () => {
    const cwd = await newFolder();
    const write = (...more: string[]) => run([...sizing, '--out', 'set', ...more], { cwd, stages: fewFiles });
    expect((await write()).code).toBe(0);
    await disk.appendFile(join(cwd, 'set/result.json'), ' ');
    const stages = { ...fewFiles, design: async () => Promise.reject(new Error('too late')) };
    const refused = await run([...sizing, '--out', 'set'], { cwd, stages });
    expect(refused.code).toBe(2);
    expect(refused.stderr).toContain('error: set/result.json: expected the file as an earlier run wrote it');
    expect((await write('--force')).code).toBe(0);
    expect(await disk.readdir(join(cwd, 'set'))).toContain('result.json.bak');
  });

  it('takes the date of the sheet from SOURCE_DATE_EPOCH where the specification has none', async () => {
    const dateOf = async (argv: readonly string[], epoch: string) => {
      const { code, stdout } = await run([...argv, '--json'], { env: { SOURCE_DATE_EPOCH: epoch } });
      return code === 0 ? JSON.parse(stdout).specification.date : code;
    };
    expect(await dateOf(sizing, '1767225600')).toBe('2026-01-01');
    expect(await dateOf([...sizing, '--set', 'date=2025-05-05'], '1767225600')).toBe('2025-05-05');
    expect(await dateOf(sizing, 'yesterday')).toBe(2);
  });

  it('tells users of a fault of its own in one line, and shows the trace to who asks', async () => {
    const stages = { design: async () => Promise.reject(new Error('split\nin two')) };
    const plain = await run([...sizing, '--json'], { stages });
    expect(plain.code).toBe(3);
    expect(plain.stderr).toMatch(/^error: expected no exception, received split\n.*COUNTERSLOPE_DEBUG=1/);
    expect(plain.stderr).not.toMatch(/^ +at /m);
    expect(JSON.parse(plain.stdout).problems[0].code).toBe('internal-fault');
    const asked = await run(sizing, { stages, env: { COUNTERSLOPE_DEBUG: '1' } });
    expect(asked.stderr).toMatch(/^ +at /m);
  });
});

describe('the simulation of a design', () => {
  it('that says no is written, and ends with 1', async () => {
    const cwd = await newFolder();
    const stages = { ...fewFiles, ...simulating({ passed: false }) };
    const { code } = await run(['design', ...figures, '--out', 'set'], { cwd, stages });
    expect(code).toBe(1);
    expect(await disk.readdir(join(cwd, 'set'))).toContain('result.json');
  });

  it('that breaks down ends with 3, names the deck, and writes nothing', async () => {
    const cwd = await newFolder();
    const stages = { ...fewFiles, ...simulating({ failures: new Map([['ramp-test.cir', 'time limit']]) }) };
    const { code, stderr } = await run(['design', ...figures, '--out', 'set'], { cwd, stages });
    expect(code).toBe(3);
    expect(stderr).toContain('error: ramp-test.cir: expected a run to the end, received time limit');
    expect(await disk.readdir(cwd)).toEqual([]);
  });

  it('without an engine ends with 3 and says how to go without', async () => {
    const { code, stderr } = await run(['design', ...figures, '--engine', 'installed'], {
      env: { PATH: '' },
    });
    expect(code).toBe(3);
    expect(stderr).toMatch(/^error: --engine: expected the installed engine, .*\n.*--engine none/);
  });

  it('ends its engine however it ends', async () => {
    for (const outcome of [{ passed: true }, { passed: false }, { fault: new Error('bug') }]) {
      let ended = 0;
      const stages = simulating(outcome, async () => {
        ended += 1;
      });
      await run(['design', ...figures], { stages });
      expect(ended).toBe(1);
    }
  });

  it('gives way to a signal at once, and leaves nothing behind', async () => {
    for (const [name, code] of [
      ['SIGINT', 130],
      ['SIGTERM', 143],
    ] as const) {
      const cwd = await newFolder();
      const interruption = new AbortController();
      const stages = { ...fewFiles, ...simulating({ hangs: () => interruption.abort(name) }) };
      const ended = await run(['design', ...figures, '--out', 'set'], {
        cwd,
        stages,
        signal: interruption.signal,
      });
      expect(ended.code).toBe(code);
      expect(await disk.readdir(cwd)).toEqual([]);
    }
  });

  it('shows progress on a terminal only', async () => {
    const stages = simulating({ passed: true });
    expect((await run(['design', ...figures], { stages, isTTY: true })).stderr).toContain(
      'simulating a.cir (0 of 1',
    );
    expect((await run(['design', ...figures, '--quiet'], { stages, isTTY: true })).stderr).toBe('');
    expect((await run(['design', ...figures], { stages })).stderr).not.toContain('simulating');
  });
});

interface Course {
  readonly passed?: boolean;
  readonly failures?: ReadonlyMap<string, string>;
  readonly fault?: Error;
  /** Called once the simulation runs; it then never ends. */
  readonly hangs?: () => void;
}

/** An engine and a simulation that take the given course. */
function simulating(course: Course, end = async () => {}): Pick<Stages, 'openEngine' | 'simulate'> {
  const run = async () => ({ ok: false as const, reason: 'not asked for', log: '' });
  const engine: SpiceEngine = { kind: 'embedded', version: '0', run, end };
  return {
    openEngine: async () => ({ ok: true, engine }),
    simulate: async (_design, _engine, { onProgress }) => {
      onProgress({ done: 0, total: 1, file: 'a.cir' });
      if (course.fault !== undefined) throw course.fault;
      if (course.hangs !== undefined) {
        setImmediate(course.hangs);
        await new Promise(() => {});
      }
      const simulation = {
        engine: 'embedded' as const,
        version: '0',
        passed: course.passed ?? true,
        decks: [],
      };
      return { simulation, waveforms: null, failures: course.failures ?? new Map() };
    },
  };
}

const noCircuit = {
  code: 'no-circuit',
  severity: 'error' as const,
  key: null,
  place: null,
  expected: 'amplitude ≤ 3.1 V',
  received: '4.2 V',
  fix: 'raise the supply',
};

const houseDeck = `<?xml version="1.0"?>
<ruleDeck version="1">
  <rule id="house-input" severity="error">
    <requirement>inputVoltageMax &lt;= 20 V</requirement>
    <whatToDo>Ask.</whatToDo>
    <reason>House rule.</reason>
    <source>common practice</source>
    <example outcome="passes">inputVoltageMax = 12 V</example>
    <example outcome="fails">inputVoltageMax = 48 V</example>
  </rule>
</ruleDeck>
`;
