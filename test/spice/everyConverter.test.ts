import { describe, expect, test } from 'vitest';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import { simulateDesign } from '../../generator/simulateDesign.ts';
import { openEmbeddedEngine } from '../../generator/spice/engine/embedded.ts';
import { type Keys, requestOf } from '../support/request.ts';

/** Invented scenarios, with losses, a controller's ramp and a transformer's magnetizing current among them. */
const converters: Record<string, Keys> = {
  boost: {
    converter: 'boost',
    input: '6 V to 12 V',
    output: '24 V',
    inductance: '22 uH',
    frequency: '300 kHz',
    load: '0.2 A to 1 A',
    'rectifier.drop': '0.4 V',
    'losses.switch': '40 mOhm',
    'losses.winding': '25 mOhm',
    'controller.internalRamp': '20 mV/us ± 20 %',
  },
  'buck-boost': {
    converter: 'buck-boost',
    input: '6 V to 24 V',
    output: '12 V',
    inductance: '22 uH',
    frequency: '300 kHz',
  },
  sepic: {
    converter: 'sepic',
    input: '8 V to 30 V',
    output: '12 V',
    inductance: '15 uH',
    frequency: '250 kHz',
  },
  flyback: {
    converter: 'flyback',
    input: '18 V to 75 V',
    output: '12 V',
    inductance: '40 uH',
    frequency: '200 kHz',
    turnsRatio: '2',
    maximumDuty: '75 %',
  },
  forward: {
    converter: 'forward',
    stage: 'two-switch',
    input: '36 V to 75 V',
    output: '5 V',
    inductance: '10 uH',
    frequency: '250 kHz',
    turnsRatio: '2',
    magnetizingInductance: '400 uH',
    maximumDuty: '48 %',
    'goal.dampingIndex': '0.95',
  },
};

describe('the decks of every converter show the damping that the closed form promises', () => {
  test.each(Object.entries(converters))('%s: α within 0.02 at three points of each law', async (_, keys) => {
    const opening = await openEmbeddedEngine();
    if (!opening.ok) throw new Error(opening.reason);
    const sized = sizeDesign(await requestOf(keys));
    if (!sized.ok) throw new Error(JSON.stringify(sized.problems));
    const { simulation, failures } = await simulateDesign(sized.value, opening.engine, { timeout_s: 60 });
    await opening.engine.end();
    expect([...failures]).toEqual([]);
    const ratios = simulation.decks.filter(({ quantity }) => quantity === 'cycle ratio');
    expect(ratios).toHaveLength(6);
    for (const { measured, predicted } of ratios) expect(Math.abs(measured! - predicted)).toBeLessThan(0.02);
    expect(simulation.passed).toBe(true);
  });
});
