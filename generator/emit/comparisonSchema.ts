import { z } from 'zod';

/** The shape of `compare --json`; loaded by tests only, the program imports the inferred types. */
const finite = z.number();
const interval = z.tuple([finite, finite]);
const law = z.enum(['fixed', 'vin', 'vout', 'constant-q']);

const comparedLaw = z.strictObject({
  kind: law,
  gain: finite,
  dampingIndexMin: finite,
  dampingIndexMax: finite,
  cycleRatioMin: finite,
  cycleRatioMax: finite,
  settlingCyclesMax: finite.nullable(),
  dampingQMax: finite.nullable(),
  rampShare: interval,
  peakLimit_A: interval.nullable(),
  outputLimit_A: interval.nullable(),
  lineResponse_A_per_V: interval.nullable(),
});

export const comparisonSchema = z.strictObject({
  schema: z.literal('counterslope/comparison/1'),
  laws: z.array(comparedLaw),
  verdict: z.strictObject({ preferred: law.nullable(), reasons: z.array(z.string()) }),
  /** What the figures refer to and what was taken for granted. */
  region: z.strictObject({
    inputVoltage_V: interval,
    outputVoltage_V: interval.nullable(),
    duty: interval,
    cut: z.array(z.looseObject({ reason: z.string() })),
  }),
  lightLoad: z
    .strictObject({ borderLoad_A: interval, reached: z.boolean().nullable(), notes: z.array(z.string()) })
    .nullable(),
  /** The ramp needed as a multiple of the up slope; where no inductance is known this is what can be given. */
  neededRamp: z.array(
    z.strictObject({
      inputVoltage_V: finite,
      outputVoltage_V: finite,
      dutyRatio: finite,
      rampOverUpSlopeRatio: finite,
    }),
  ),
  notes: z.array(z.string()),
  assumptions: z.array(
    z.strictObject({
      key: z.string(),
      value: z.union([finite, z.string()]).nullable(),
      unit: z.string(),
      reason: z.string(),
    }),
  ),
});

export type ComparisonDocument = z.infer<typeof comparisonSchema>;
