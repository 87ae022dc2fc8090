import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { comparisonSchema } from '../../../generator/emit/comparisonSchema.ts';
import { newFolder, run } from './session.ts';

const figures = ['--vin', '6 V to 36 V', '--fs', '500 kHz', '--ri', '50 mOhm'];
const known = [...figures, '--vout', '5 V', '--l', '10 uH', '--set', 'controller.senseLimit=250 mV'];
const customer = [...figures, '--vout', '0.8 V to 30 V', '--l', '10 uH', '--dmax', '85 %'];
const unknownInductance = [...figures, '--vout', '5 V to 12 V'];

describe('compare on the terminal', () => {
  it('begins with the verdict, and has the laws side by side below it', async () => {
    const { code, stdout, stderr } = await run(['compare', ...known]);
    expect([code, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(/^verdict +A fixed ramp does as well for damping/);
    await expect(stdout).toMatchFileSnapshot('../../golden/cli/comparison-view.txt');
  });

  it.each([
    ['a known output', known],
    ['an output set by the customer', customer],
    ['no inductance', unknownInductance],
    ['a title of wide signs', [...known, '--set', `title=${'斜'.repeat(300)}`]],
  ])('stays within 80 columns with %s', async (_, flags) => {
    const { stdout } = await run(['compare', ...flags]);
    const widths = stdout.split('\n').map((line) => [...line].length);
    expect(Math.max(...widths)).toBeLessThanOrEqual(80);
  });

  it('tells ringing and sluggishness apart', async () => {
    const { stdout } = await run(['compare', ...known]);
    expect(stdout).toMatch(/^α ringing +−0\.222 +−0\.222 +−0\.222 +−0\.222$/m);
    expect(stdout).toMatch(/^α sluggish +none +0\.339 +none +none$/m);
  });

  it('without an inductance gives the needed ramp, and says what cannot be given', async () => {
    const { stdout } = await run(['compare', ...unknownInductance]);
    expect(stdout).toMatch(/^needed ramp +as a multiple of the sensed up slope/m);
    // x_goal·Vin/(Vin − Vout) − 1 at 6 V in, 5 V out.
    expect(stdout).toMatch(/^ {2}5 V +3\.91 /m);
    expect(stdout.replace(/\s+/g, ' ')).toContain('the slope itself in V/s');
    expect(stdout).not.toMatch(/^line/m);
  });
});

describe('compare --json', () => {
  it.each([
    ['a known output', known],
    ['an output set by the customer', customer],
    ['no inductance', unknownInductance],
    ['a boost', [...figures, '--converter', 'boost', '--vout', '48 V', '--l', '22 uH ± 20 %']],
  ])('keeps to its schema with %s', async (_, flags) => {
    const { code, stdout } = await run(['compare', ...flags, '--json']);
    expect(code).toBe(0);
    const document = comparisonSchema.parse(JSON.parse(stdout));
    expect(document.laws.map(({ kind }) => kind)).toEqual(['fixed', 'vin', 'vout', 'constant-q']);
  });

  it('has the reference figures of a known output to three digits', async () => {
    const { laws, verdict } = JSON.parse((await run(['compare', ...known, '--json'])).stdout);
    const rounded = laws.map(
      (law: { gain: number; dampingIndexMax: number; cycleRatioMin: number; cycleRatioMax: number }) =>
        [law.gain, law.dampingIndexMax, law.cycleRatioMin, law.cycleRatioMax].map((value) =>
          Number(value.toFixed(3)),
        ),
    );
    expect(rounded.slice(0, 3)).toEqual([
      [3.91, 0.97, -0.222, -0.031],
      [0.652, 1.513, -0.222, 0.339],
      [0.782, 0.97, -0.222, -0.031],
    ]);
    expect(verdict.preferred).toBe('fixed');
  });

  it('has null for what does not exist', async () => {
    const { laws, lightLoad } = JSON.parse((await run(['compare', ...unknownInductance, '--json'])).stdout);
    expect(laws[0]).toMatchObject({ peakLimit_A: null, outputLimit_A: null, lineResponse_A_per_V: null });
    expect(lightLoad).toBeNull();
  });

  it('refuses an inductance of a ripple that there is none of', async () => {
    const ripple = ['--set', 'inductance.ripple=20 % to 40 %', '--set', 'inductance.of=3 A'];
    const { code, stdout } = await run(['compare', ...figures, ...ripple, '--json']);
    expect(code).toBe(2);
    expect(JSON.parse(stdout).problems[0].code).toBe('inductance-undetermined');
  });
});

describe('compare --out', () => {
  it('writes the page and the document, and joins a design that is there', async () => {
    const cwd = await newFolder();
    const design = ['design', '--vin', '6 V to 36 V', '--vout', '5 V', '--l', '10 uH', '--fs', '500 kHz'];
    expect((await run([...design, '--engine', 'none', '--out', 'd'], { cwd })).code).toBe(0);
    const before = await disk.readdir(join(cwd, 'd'));
    const compared = await run(['compare', ...known, '--out', 'd'], { cwd });
    expect([compared.code, compared.stderr]).toEqual([0, '']);
    expect(compared.stdout).toMatch(/^files +comparison\.html, comparison\.json in d$/m);
    expect((await disk.readdir(join(cwd, 'd'))).sort()).toEqual(
      [...before, 'comparison.html', 'comparison.json'].sort(),
    );
    const { stdout } = await run(['compare', ...known, '--json'], { cwd });
    expect(await disk.readFile(join(cwd, 'd/comparison.json'), 'utf8')).toBe(stdout);
    const simulated = await run(['simulate', 'd', '--engine', 'none'], { cwd });
    expect([simulated.code, simulated.stderr]).toEqual([0, '']);
  });

  it('refuses what was edited by hand, unless forced', async () => {
    const cwd = await newFolder();
    await run(['compare', ...known, '--out', 'd'], { cwd });
    await disk.appendFile(join(cwd, 'd/comparison.html'), '<!-- mine -->');
    const refused = await run(['compare', ...known, '--out', 'd'], { cwd });
    expect(refused.code).toBe(2);
    expect(refused.stderr).toContain('d/comparison.html');
    expect((await run(['compare', ...known, '--out', 'd', '--force'], { cwd })).code).toBe(0);
    expect(await disk.readFile(join(cwd, 'd/comparison.html.bak'), 'utf8')).toContain('<!-- mine -->');
  });
});

describe('window', () => {
  const chip = [...figures, '--set', 'controller.internalRamp=45 mV/us ± 20 %'];

  it('prints a table for a data sheet within 80 columns', async () => {
    const { code, stdout, stderr } = await run(['window', ...chip, '--vout', '[3.3 V, 5 V, 12 V]']);
    expect([code, stderr]).toEqual([0, '']);
    expect(Math.max(...stdout.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(80);
    await expect(stdout).toMatchFileSnapshot('../../golden/cli/window-view.txt');
  });

  it('says where nothing fits, and what asks for how much', async () => {
    const { stdout } = await run(['window', ...chip]);
    expect(stdout).toMatch(/^window +no inductance fits at any row/);
    expect(stdout).toMatch(/none +goal asks .*, ceiling allows /);
  });

  it('adds its table to a set, as CSV too', async () => {
    const cwd = await newFolder();
    expect((await run(['window', ...chip, '--vout', '5 V', '--out', 'd'], { cwd })).code).toBe(0);
    const csv = await disk.readFile(join(cwd, 'd/window.csv'), 'utf8');
    expect(csv.split('\r\n')).toHaveLength(3);
    expect(csv).toMatch(/^output voltage \[V\],frequency \[Hz\],least inductance \[H\]/);
  });

  it('without a ramp ends with 2 and names both keys', async () => {
    const { code, stderr } = await run(['window', ...figures]);
    expect(code).toBe(2);
    expect(stderr).toContain('controller.internalRamp');
    expect(stderr).toContain('ramp.gain');
  });
});
