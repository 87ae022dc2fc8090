import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Expression, ExpressionFault } from '../../../generator/rules/Expression.ts';
import { numberOf } from '../../../generator/rules/evaluateExpression.ts';
import { expressionBounds, parseExpression } from '../../../generator/rules/parseExpression.ts';

function evaluated(text: string, scope = {}): number {
  const parsed = parseExpression(text);
  if (!('kind' in parsed)) throw new Error(JSON.stringify(parsed));
  return numberOf(parsed, scope);
}

function faultsOf(text: string): readonly ExpressionFault[] {
  const parsed = parseExpression(text);
  return 'kind' in parsed ? [] : parsed;
}

describe('a sound expression', () => {
  it.each([
    ['20 mV', 20e-3],
    ['10 uF', 10e-6],
    ['10 µA', 10e-6],
    ['4.7 kOhm', 4700],
    ['4.7 kohm', 4700],
    ['0.3 us', 0.3e-6],
    ['1 %', 0.01],
    ['2 % * 5 V', 0.1],
    ['60 V', 60],
    ['5 V/us', 5e6],
    ['1e-9', 1e-9],
    ['2 + 3 * 4 ^ 2', 50],
    ['-2 ^ 2', -4],
    ['(1 - 3) / -4', 0.5],
    ['max(1, 2, 3) - min(4, 5)', -1],
    ['sqrt(abs(-16))', 4],
    ['log10(1000) + log(exp(2))', 5],
    ['mV', 1e-3],
  ])('%s is %d', (text, value) => {
    expect(evaluated(text)).toBeCloseTo(value, 12);
  });

  it('folds a unit into its number to the last bit', () => {
    for (const digits of ['1', '3', '4.7', '12', '22', '68', '101']) {
      expect(evaluated(`${digits} us`)).toBe(Number(`${digits}e-6`));
      expect(evaluated(`${digits} pF`)).toBe(Number(`${digits}e-12`));
    }
  });

  it('may run over several lines', () => {
    expect(evaluated('dampingIndexMin\n  - 0.5', { dampingIndexMin: 0.8 })).toBeCloseTo(0.3, 12);
  });
});

describe('the gate refuses', () => {
  const hostile = [
    'import("fs")',
    'import(fs)',
    'constructor',
    '__proto__',
    'toString',
    'constructor(1)',
    'cos.constructor("return process")()',
    'f(x) = x',
    'a = 1',
    'dampingIndexMin = 1',
    'a[1]',
    'dampingIndexMin[1]',
    'dampingIndexMin.constructor',
    '"text"',
    "'text'",
    '[1, 2, 3]',
    '1:10',
    '{a: 1}',
    '1 ? 2 : 3',
    '1; 2',
    '5!',
    "dampingIndexMin'",
    'createUnit(V)',
    'createUnit("knot")',
    'evaluate(1)',
    'parse(1)',
    'simplify(1)',
    'derivative(1, 2)',
    'random()',
    'compile(1)',
    'help(1)',
    'config(1)',
    'typed(1)',
    'unit(5)',
    'sin(1)',
    'max(1)',
    'sqrt(1, 2)',
    '7 mod 2',
    '7 % 2',
    '5 V to mV',
    '5 V in mV',
    '1 xor 0',
    '1 | 2',
    '1 & 2',
    '~1',
    '1 << 2',
    '2 .* 3',
    '1 == 1',
    '1 != 2',
    '1 < 2 < 3',
    '2i',
    'i',
    'e',
    'pi',
    'true',
    'null',
    'undefined',
    'NaN',
    'Infinity',
    '1e400',
    '-1e999',
    '1 degC',
    '5 knot',
    '5 gallon',
    '# only a comment',
    '',
    '   \n ',
    '(1',
    '1 +',
    '1 ** 2',
    '1,5',
    '1 000',
    'x -> x',
    'аbs(1)',
    'abs\u200b(1)',
    '\u202e1',
  ];

  it.each(hostile)('%j', (text) => {
    const faults = faultsOf(text);
    expect(faults).not.toEqual([]);
    for (const fault of faults) {
      expect(fault.expected).not.toBe('');
      expect(fault.fix).not.toBe('');
      expect(fault.offset).toBeGreaterThanOrEqual(0);
    }
  });

  it.each([
    ['too many characters', `1${' '.repeat(expressionBounds.characters)}+ 1`],
    ['too many terms', Array.from({ length: expressionBounds.nodes }, () => '1').join('+')],
    ['brackets too deep', `${'('.repeat(150)}1${')'.repeat(150)}`],
    ['signs too deep', `${'-'.repeat(300)}1`],
    ['powers too deep', `2${'^2'.repeat(40)}`],
  ])('%s', (_, text) => {
    expect(faultsOf(text).map((fault) => fault.code)).toEqual(['expression-too-large']);
  });

  it('points at the word that is not known and names the nearest', () => {
    expect(faultsOf('signalFloor + dampingIndxMin')).toEqual([
      expect.objectContaining({ code: 'unknown-quantity', offset: 14, fix: 'did you mean dampingIndexMin?' }),
    ]);
  });

  it('all unknown words at once', () => {
    expect(faultsOf('foo + bar + dampingIndexMin').map((fault) => fault.received)).toEqual(['foo', 'bar']);
  });
});

describe('whatever is thrown at the gate', () => {
  const pieces = fc.constantFrom(
    ...['import', 'constructor', '__proto__', 'createUnit', 'evaluate', 'dampingIndexMin', 'supplyVoltage'],
    ...[
      'max',
      'sqrt',
      'V',
      'mV',
      '1',
      '2e9',
      '^',
      '*',
      '/',
      '+',
      '-',
      '(',
      ')',
      '[',
      ']',
      '{',
      '}',
      '=',
      '==',
    ],
    ...[
      '<',
      '<=',
      '>',
      'and',
      'or',
      'not',
      ',',
      '.',
      ';',
      ':',
      '"',
      "'",
      '%',
      '!',
      '#',
      '\n',
      ' ',
      '?',
      '->',
    ],
  );

  it('it answers, and what it lets through holds eight kinds of node only', () => {
    const kinds = new Set([
      'number',
      'quantity',
      'negation',
      'arithmetic',
      'call',
      'comparison',
      'logic',
      'not',
    ]);
    const visit = (expression: Expression): void => {
      expect(kinds).toContain(expression.kind);
      for (const value of Object.values(expression)) {
        if (typeof value === 'object' && 'kind' in value) visit(value as Expression);
      }
    };
    const soup = fc.array(pieces, { maxLength: 40 }).map((words) => words.join(''));
    fc.assert(
      fc.property(fc.oneof(soup, fc.string({ unit: 'binary', maxLength: 120 })), (text) => {
        const parsed = parseExpression(text);
        if ('kind' in parsed) visit(parsed);
        else expect(parsed.length).toBeGreaterThan(0);
      }),
      { seed: 20260401, numRuns: 3000 },
    );
  });

  it('no prototype and no global changes', () => {
    for (const text of ['__proto__ = 1', 'constructor.x = 1', 'f(x) = x', 'createUnit(foo)'])
      parseExpression(text);
    expect(Object.keys(Object.prototype)).toEqual([]);
    expect(faultsOf('1 foo')).not.toEqual([]);
  });
});
