import { describe, expect, it } from 'vitest';
import { acceptRun } from '../../../../generator/spice/engine/acceptRun.ts';
import { complaintsIn } from '../../../../generator/spice/engine/complaints.ts';
import { prepareDeck } from '../../../../generator/spice/engine/prepareDeck.ts';
import { readRawFile } from '../../../../generator/spice/engine/rawFile.ts';
import { rcDeck } from '../../../spice/support/decks.ts';

const NAMES = ['time', 'v(OUT)', 'i(v1)'];
const POINTS = [
  [0, 0, -1e-3],
  [5e-4, 0.9, -1e-4],
  [1e-3, 1, -1e-9],
];

function header(points: number, format: string, flags = 'real'): string {
  const rows = NAMES.map((name, i) => `\t${i}\t${name}\t${i === 0 ? 'time' : 'voltage'}\n`).join('');
  return (
    `Title: run one\nDate: some day\nPlotname: Transient Analysis\nFlags: ${flags}\n` +
    `No. Variables: ${NAMES.length}\nNo. Points: ${points}       \nVariables:\n${rows}${format}:\n`
  );
}

function binary(points = POINTS, flags = 'real'): Uint8Array {
  const head = new TextEncoder().encode(header(points.length, 'Binary', flags));
  const bytes = new Uint8Array(head.length + 8 * points.flat().length);
  bytes.set(head);
  const view = new DataView(bytes.buffer);
  points.flat().forEach((value, i) => {
    view.setFloat64(head.length + 8 * i, value, true);
  });
  return bytes;
}

function ascii(points = POINTS): Uint8Array {
  const rows = points.map(
    (point, i) => ` ${i}\t${point.map((value) => value.toExponential(15)).join('\n\t')}\n`,
  );
  return new TextEncoder().encode(header(points.length, 'Values') + rows.join('\n'));
}

const run = (raw: Uint8Array | null, standardError = '', problem: string | null = null) =>
  acceptRun(rcDeck, { runTitle: 'run one', raw, standardError, log: '', problem });

describe('a raw file', () => {
  it.each([
    ['binary', binary()],
    ['ascii', ascii()],
  ])('in %s gives its title, lower-case names and one column for each', (_format, bytes) => {
    const file = readRawFile(bytes);
    expect(file?.title).toBe('run one');
    expect(file?.names).toEqual(['time', 'v(out)', 'i(v1)']);
    expect(file?.columns.map((column) => [...column])).toEqual(
      [0, 1, 2].map((i) => POINTS.map((point) => point[i])),
    );
  });

  it.each([
    ['cut short', binary().subarray(0, -1)],
    ['of complex numbers', binary(POINTS, 'complex')],
    ['without a body', new TextEncoder().encode('Title: x\n')],
    ['of no bytes', new Uint8Array()],
  ])('%s is none', (_title, bytes) => {
    expect(readRawFile(bytes)).toBeNull();
  });
});

describe('a run counts', () => {
  it('with every wanted vector, under the name by which it was wanted', () => {
    const outcome = run(binary());
    if (!outcome.ok) throw new Error(outcome.reason);
    expect([...outcome.waveforms.time_s]).toEqual([0, 5e-4, 1e-3]);
    expect(Object.keys(outcome.waveforms.vectors)).toEqual(['v(out)', 'i(v1)']);
    expect([...outcome.waveforms.vectors['v(out)']!]).toEqual([0, 0.9, 1]);
  });

  it('though rounding keeps it a millionth short of the stop time', () => {
    expect(run(binary([...POINTS.slice(0, 2), [1e-3 * (1 - 5e-7), 1, 0]])).ok).toBe(true);
  });
});

describe('a run does not count', () => {
  it.each([
    ['without a raw file', run(null), /no waveforms/],
    ['whose time stops early', run(binary(POINTS.slice(0, 2))), /ended at 0.0005 s/],
    ['without a point', run(binary([])), /ended at 0 s/],
    [
      'with a value that is no number',
      run(binary([[0, Number.NaN, 0], ...POINTS.slice(1)])),
      /v\(out\) is not finite at 0 s/,
    ],
    ['with an infinite value', run(binary([[0, 0, -Infinity], ...POINTS.slice(1)])), /i\(v1\) is not finite/],
    [
      'that the engine complained about',
      run(binary(), 'Warning: r2: resistance to low, set to 1 mOhm'),
      /resistance to low/,
    ],
    ['of an engine that came to grief', run(binary(), '', 'the engine ended with exit 1'), /exit 1/],
  ])('%s', (_title, outcome, reason) => {
    expect(outcome).toMatchObject({ ok: false, reason: expect.stringMatching(reason) });
  });

  it('that bears the title of another run', () => {
    const outcome = acceptRun(rcDeck, {
      runTitle: 'run two',
      raw: binary(),
      standardError: '',
      log: '',
      problem: null,
    });
    expect(outcome).toMatchObject({ ok: false, reason: expect.stringContaining('an earlier one') });
  });
});

describe('complaints', () => {
  it('are no notes, progress or steps towards an operating point', () => {
    const harmless = [
      'Note: Starting dynamic gmin stepping',
      'Trying gmin =   1.0000E-03 Note: One successful gmin step',
      'Supplies reduced to   0.0000% ',
      'Warning: source stepping failed',
      "Warning: can't find the initialization file spinit.",
      'Using SPARSE 1.3 as Direct Linear Solver',
      ' Reference value :  5.91710e-05\r Reference value :  1.19207e-04',
      '',
    ].join('\n');
    expect(complaintsIn(harmless)).toEqual([]);
  });

  it.each([
    "Warning: 'r2 in' is not a valid resistor instance line, ignored!",
    'Warning: singular matrix:  check node yy',
    'Trying gmin =   1.0000E-03 Warning: singular matrix:  check node yy',
    'run simulation(s) aborted',
    'something that no version said before',
  ])('include: %s', (line) => {
    expect(complaintsIn(`Note: x\n${line}\n`)).toEqual([line]);
  });
});

describe('a deck is prepared', () => {
  it('with a title of the run and a save line below its own title, and otherwise as it was', () => {
    const prepared = prepareDeck(rcDeck);
    if (!prepared.ok) throw new Error(prepared.reason);
    const lines = prepared.text.split('\n');
    expect(lines.slice(1, 3)).toEqual([`.title ${prepared.runTitle}`, '.save v(out) i(v1)']);
    expect([lines[0], ...lines.slice(3)].join('\n')).toBe(rcDeck.text);
  });

  it('with another title each time', () => {
    const titles = [prepareDeck(rcDeck), prepareDeck(rcDeck)].map(
      (prepared) => prepared.ok && prepared.runTitle,
    );
    expect(titles[0]).not.toBe(titles[1]);
  });

  it.each([
    ['an include outside the folder', { ...rcDeck, includes: { '../x.cir': '' } }],
    ['an include under an absolute name', { ...rcDeck, includes: { '/etc/x': '' } }],
    ['an include that is an option', { ...rcDeck, includes: { '-r': '' } }],
    ['an include under the name of the deck of the engine', { ...rcDeck, includes: { 'test.cir': '' } }],
    ['a control block', { ...rcDeck, text: `* t\n  .CONTROL\nshell x\n.endc\n` }],
    ['a control block in an include', { ...rcDeck, includes: { 'a.cir': '.control\n' } }],
    ['a script in place of a title', { ...rcDeck, text: '*ng_script\nshell x\n' }],
    ['a vector that is a directive', { ...rcDeck, vectors: ['v(out)\n.control'] }],
  ])('never with %s', (_title, deck) => {
    expect(prepareDeck(deck).ok).toBe(false);
  });
});
