import { z } from 'zod';

/**
 * The shape of `result.json` and of `design --json`.
 *
 * Loaded at build (JSON Schema for `counterslope schema result`) and by tests only; the rest of the
 * program imports the inferred types, so that the schema library costs nothing at run time.
 */
const finite = z.number();
const interval = z.tuple([finite, finite]);
const operatingPoint = z.strictObject({
  inputVoltage_V: finite,
  outputVoltage_V: finite.nullable(),
});
const worstPoint = operatingPoint.extend({ dutyRatio: finite });

const assumption = z.strictObject({
  key: z.string(),
  value: z.union([finite, z.string()]).nullable(),
  unit: z.string(),
  reason: z.string(),
});

const corner = z.strictObject({ parameter: z.string(), low: finite, high: finite, unit: z.string() });

const regionCut = z.looseObject({ reason: z.string() });

const part = z.strictObject({
  reference: z.string(),
  role: z.string(),
  kind: z.string(),
  value: finite.nullable(),
  unit: z.string(),
  text: z.string(),
  series: z.string().nullable(),
  toleranceRatio: finite.nullable(),
  quantity: z.number().int(),
  rating: z.string(),
});

const circuitFigure = z.strictObject({
  id: z.string(),
  value: finite,
  unit: z.string(),
  limit: finite.nullable(),
  source: z.string(),
});

const ruleOutcome = z.strictObject({
  id: z.string(),
  severity: z.enum(['error', 'warning', 'note']),
  passed: z.boolean(),
  measured: finite.nullable(),
  limit: finite.nullable(),
  unit: z.string(),
  reason: z.string(),
  source: z.string(),
});

const deckCheck = z.strictObject({
  file: z.string(),
  quantity: z.string(),
  at: operatingPoint,
  predicted: finite,
  measured: finite.nullable(),
  unit: z.string(),
  /** (measured − predicted)/predicted; for the cycle ratio the plain difference. */
  errorRatio: finite.nullable(),
  limit: finite,
  passed: z.boolean(),
});

const simulation = z.strictObject({
  engine: z.enum(['embedded', 'installed']),
  version: z.string(),
  passed: z.boolean(),
  decks: z.array(deckCheck),
});

export const resultSchema = z.strictObject({
  schema: z.literal('counterslope/result/1'),
  specification: z.record(z.string(), z.unknown()),
  assumptions: z.array(assumption),
  corners: z.array(corner),
  region: z.strictObject({
    inputVoltage_V: interval,
    outputVoltage_V: interval.nullable(),
    duty: interval,
    cut: z.array(regionCut),
  }),
  law: z.strictObject({
    kind: z.enum(['fixed', 'vin', 'vout', 'constant-q']),
    requiredGain: finite,
    gain: finite,
    realisedGain: finite,
    slope_A_per_s: z.array(operatingPoint.extend({ value: finite })),
  }),
  stability: z.strictObject({
    dampingIndexMin: finite,
    dampingIndexMax: finite,
    at: worstPoint,
    atMax: worstPoint,
    cycleRatioMin: finite,
    cycleRatioMax: finite,
    dampingQMax: finite.nullable(),
    settlingCyclesMax: finite.nullable(),
  }),
  ramp: z.strictObject({
    /** The build that was chosen, where the specification left it open. */
    build: z.string(),
    capacitance_F: finite,
    current_A: interval,
    capacitorSlope_V_per_s: interval,
    comparatorSlope_V_per_s: interval,
    amplitude_V: interval,
    resetTime_s: finite,
    injectionGainRatio: finite,
    senseAttenuationRatio: finite,
    rampAtTrip_V: z.array(finite),
    signalAtTrip_V: z.array(finite.nullable()),
  }),
  parts: z.array(part),
  circuitFigures: z.array(circuitFigure),
  rules: z.array(ruleOutcome),
  simulation: simulation.nullable(),
  files: z.array(z.string()),
});

export type Result = z.infer<typeof resultSchema>;
export type ResultPart = z.infer<typeof part>;
export type RuleOutcome = z.infer<typeof ruleOutcome>;
export type DeckCheck = z.infer<typeof deckCheck>;
export type Simulation = z.infer<typeof simulation>;
export type WorstPoint = z.infer<typeof worstPoint>;
