import { expect, it } from 'vitest';
import { plainPaint } from '../../../generator/cli/terminal/paint.ts';
import { simulationView } from '../../../generator/cli/view/simulation.ts';
import { sampleResult } from './sampleResult.ts';

const options = { directory: 'ramp', paint: plainPaint };
const simulation = sampleResult.simulation!;

it('shows every figure under its deck, and the largest deviation last', async () => {
  await expect(simulationView(sampleResult, options)).toMatchFileSnapshot(
    '../../golden/cli/simulation-view.txt',
  );
});

it('begins the line of each figure that disagrees, or that could not be read, with the word', () => {
  const [slope, ratio] = simulation.decks;
  const decks = [{ ...slope!, measured: null, errorRatio: null, passed: false }, ratio!];
  const text = simulationView(
    { ...sampleResult, simulation: { ...simulation, passed: false, decks } },
    options,
  );
  expect(text).toMatch(/^failed +comparator slope at 36 V in: no figure, predicted 149 mV\/µs$/m);
  expect(text).toMatch(/^agrees +cycle ratio/m);
  expect(text).toMatch(/^failed +simulation: 1 of 2 figures disagree/m);
});

it('does not call a simulation without any figure an agreement', () => {
  const text = simulationView({ ...sampleResult, simulation: { ...simulation, decks: [] } }, options);
  expect(text).toMatch(/^failed +simulation: nothing was measured/m);
});
