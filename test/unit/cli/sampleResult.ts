import type { DeckCheck, Result } from '../../../generator/emit/resultSchema.ts';

const slopeCheck: DeckCheck = {
  file: 'ramp-test.cir',
  quantity: 'comparator slope',
  at: { inputVoltage_V: 36, outputVoltage_V: null },
  predicted: 149_000,
  measured: 149_600,
  unit: 'V/s',
  errorRatio: 0.004,
  limit: 0.02,
  passed: true,
};

const ratioCheck: DeckCheck = {
  file: 'converter-adaptive.cir',
  quantity: 'cycle ratio',
  at: { inputVoltage_V: 8, outputVoltage_V: 5 },
  predicted: -0.216,
  measured: -0.218,
  unit: '1',
  errorRatio: -0.002,
  limit: 0.02,
  passed: true,
};

/** A result with plausible figures; what a test is about it changes itself. */
export const sampleResult: Result = {
  schema: 'counterslope/result/1',
  specification: {
    title: 'greenhouse valve controller, auxiliary rail',
    goal: { dampingIndex: 0.8183 },
    ramp: { build: 'board-opamp', injection: 'sense' },
    date: '',
  },
  assumptions: [{ key: 'senseGain', value: 0.1, unit: 'V/A', reason: 'not given' }],
  corners: [],
  region: { inputVoltage_V: [8, 36], outputVoltage_V: null, duty: [0, 0.9], cut: [] },
  law: { kind: 'vin', requiredGain: 0.7, gain: 0.731, realisedGain: 0.742, slope_A_per_s: [] },
  stability: {
    dampingIndexMin: 0.8226,
    dampingIndexMax: 1.64,
    at: { inputVoltage_V: 8, outputVoltage_V: 7.2, dutyRatio: 0.9 },
    atMax: { inputVoltage_V: 36, outputVoltage_V: 0, dutyRatio: 0 },
    cycleRatioMin: -0.216,
    cycleRatioMax: 0.391,
    dampingQMax: 0.987,
    settlingCyclesMax: 5,
  },
  ramp: {
    build: 'board-opamp',
    capacitance_F: 470e-12,
    current_A: [55.2e-6, 248e-6],
    capacitorSlope_V_per_s: [117_000, 528_000],
    comparatorSlope_V_per_s: [33_100, 149_000],
    amplitude_V: [0.211, 0.95],
    resetTime_s: 2e-7,
    injectionGainRatio: 0.282,
    senseAttenuationRatio: 0.9,
    rampAtTrip_V: [0.06, 0.268],
    signalAtTrip_V: [null, null],
  },
  parts: [
    part('R1', 'resistor', '110 kΩ'),
    part('R2', 'resistor', '10 kΩ'),
    part('C1', 'capacitor', '470 pF'),
    part('U1', 'opamp', 'rail-to-rail'),
  ],
  circuitFigures: [],
  rules: [
    {
      id: 'stability',
      severity: 'error',
      passed: true,
      measured: 0.8226,
      limit: 0.5,
      unit: '1',
      reason: 'Below one half perturbations grow.',
      source: 'common practice',
    },
  ],
  simulation: { engine: 'embedded', version: '45.2', passed: true, decks: [slopeCheck, ratioCheck] },
  files: ['bom.csv', 'ramp.cir', 'result.json'],
};

function part(reference: string, kind: string, text: string): Result['parts'][number] {
  const rest = {
    role: '',
    value: null,
    unit: '',
    series: null,
    toleranceRatio: null,
    quantity: 1,
    rating: '',
  };
  return { reference, kind, text, ...rest };
}
