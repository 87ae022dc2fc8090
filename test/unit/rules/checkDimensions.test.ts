import { describe, expect, it } from 'vitest';
import { typeOf } from '../../../generator/rules/checkDimensions.ts';
import { type Dimension, unitSymbol } from '../../../generator/rules/Dimension.ts';
import type { ExpressionFault } from '../../../generator/rules/Expression.ts';
import { parseExpression } from '../../../generator/rules/parseExpression.ts';

function check(text: string) {
  const parsed = parseExpression(text);
  if (!('kind' in parsed)) throw new Error(JSON.stringify(parsed));
  return typeOf(parsed);
}

function faultOf(text: string): ExpressionFault {
  const type = check(text);
  if (!Array.isArray(type)) throw new Error(`${text} was let through`);
  return type[0];
}

describe('the unit of an expression', () => {
  it.each([
    ['supplyVoltage', 'V'],
    ['rampAmplitudeMax / injectionResistance', 'A'],
    ['chargingCurrentHigh / timingCapacitance', 'V/s'],
    ['timingCapacitance * rampAmplitudeMax / chargingCurrentLow', 's'],
    ['injectionResistance * timingCapacitance', 's'],
    ['1 / switchingPeriod', 'Hz'],
    ['supplyVoltage ^ 2 / dividerResistance', 'W'],
    ['sqrt(supplyVoltage ^ 2)', 'V'],
    ['rampAmplitudeMax / (5 V)', '1'],
    ['max(1 mV, signalFloor)', 'V'],
    ['supplyVoltage ^ 2', 'V^2'],
    ['1 H * 1 A / (1 s)', 'V'],
    ['1 J / (1 W)', 's'],
    ['1 S * 1 V', 'A'],
    ['residualRatio ^ dampingIndexMin', '1'],
  ])('%s is in %s', (text, unit) => {
    expect(unitSymbol(check(text) as Dimension)).toBe(unit);
  });
});

describe('the dimension check refuses', () => {
  it('volts against amperes, and names both', () => {
    expect(faultOf('signalAtTripMin >= chargingCurrentLow')).toMatchObject({
      code: 'dimension-mismatch',
      received: 'voltage (V) >= current (A)',
    });
  });

  it('volts against a bare number, zero included', () => {
    expect(faultOf('signalAtTripMin >= 0').received).toBe('voltage (V) >= a plain number');
  });

  it.each([
    'signalAtTripMin + chargingCurrentLow > 1 V',
    'max(signalAtTripMin, resetTime) > 1 V',
    'log(supplyVoltage) > 1',
    'exp(resetTime) > 1',
    '2 ^ supplyVoltage > 1',
    'sqrt(supplyVoltage) > 1 V',
    'timingCapacitance > 1 pF and residualRatio > 1 V',
  ])('%s', (text) => {
    expect(faultOf(text).code).toBe('dimension-mismatch');
  });

  it.each([
    ['not dampingIndexMin > 1', 'a condition is not a number'],
    ['dampingIndexMin and dampingIndexMax', 'a number is not a condition'],
    ['(dampingIndexMin > 1) + 1', 'nor can it be added'],
    ['max(dampingIndexMin > 1, 2)', 'nor passed to a function'],
  ])('%s: %s', (text) => {
    expect(faultOf(text).code).toBe('expression-type');
  });

  it.each(['9 ^ 9 ^ 9', '10 ^ 400', 'supplyVoltage ^ 9', 'supplyVoltage ^ dampingIndexMin', '2 ^ (0 / 0)'])(
    'the power %s',
    (text) => {
      expect(faultOf(text).code).toBe('expression-exponent');
    },
  );
});
