import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { flags } from '../../../generator/cli/commandLine/flags.ts';
import { parseArguments } from '../../../generator/cli/commandLine/parseArguments.ts';
import { takeTokens } from '../../../generator/cli/commandLine/takeTokens.ts';

const valueFlags = flags.filter(({ placeholder }) => placeholder !== null).map(({ name }) => name);

const parse = (...argv: string[]) => parseArguments(takeTokens(argv, flags));

describe('a command line', () => {
  it('gives every value flag exactly the next word, also one that begins with a dash', async () => {
    const { values, words } = await parse('design', '--vout', '-12 V', '--vin', '8 V', 'spec.yaml');
    expect(values).toEqual(
      new Map([
        ['vout', ['-12 V']],
        ['vin', ['8 V']],
      ]),
    );
    expect(words).toEqual(['design', 'spec.yaml']);
  });

  it('keeps any value as it was typed, quotes, dots, commas and line ends too', async () => {
    const anyValue = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.constantFrom('"a"', "'8 V'", 'true', '0x10', '1e3'),
    );
    const anyFlag = fc.constantFrom(...valueFlags);
    await fc.assert(
      fc.asyncProperty(anyFlag, anyValue, async (flag, value) => {
        const { values } = await parse('design', `--${flag}=${value}`);
        expect(values.get(flag)).toEqual([value]);
      }),
    );
  });

  it('keeps every word that is no flag as it was typed', async () => {
    const { words, switches } = await parse('design', '-', '007', '--json', '--', '--quiet', '');
    expect(words).toEqual(['design', '-', '007', '--quiet', '']);
    expect(switches).toEqual(new Set(['json']));
  });

  it('collects the values of a flag that may be repeated, in order', async () => {
    const { values } = await parse('--set', 'a=1', '--set=b=2', '--rules', 'x', '--rules', 'y');
    expect(values.get('set')).toEqual(['a=1', 'b=2']);
    expect(values.get('rules')).toEqual(['x', 'y']);
  });

  it('takes -o with its value apart, joined and after an equals sign', async () => {
    for (const words of [['-o', 'dir'], ['-odir'], ['-o=dir']]) {
      expect((await parse(...words)).values.get('out')).toEqual(['dir']);
    }
  });

  it('does not take a flag for the value that was forgotten, unless it is joined', () => {
    expect(takeTokens(['--out', '--json'], flags).problems).toMatchObject([{ code: 'value-missing' }]);
    expect(takeTokens(['--out=--json'], flags).problems).toEqual([]);
  });

  it('does not know properties of objects as flags', () => {
    for (const name of ['constructor', '__proto__', 'toString']) {
      expect(takeTokens([`--${name}`], flags).problems).toMatchObject([{ code: 'unknown-flag' }]);
    }
  });
});
