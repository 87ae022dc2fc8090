import { z } from 'zod';

/** The shape of `window --json`; loaded by tests only, the program imports the inferred types. */
const finite = z.number();

const bound = z.strictObject({
  /** Damping goal or ceiling of the damping index. */
  limit: z.enum(['goal', 'ceiling']),
  /** Null where no inductance is enough. */
  inductance_H: finite.nullable(),
  inputVoltage_V: finite,
  outputVoltage_V: finite,
  dutyRatio: finite,
});

const row = z.strictObject({
  /** Null: the output is not known, the row holds for every one. */
  outputVoltage_V: finite.nullable(),
  frequency_Hz: finite,
  /** Least and largest; 0 and null where nothing binds. The whole is null where none fits. */
  inductance_H: z.tuple([finite, finite.nullable()]).nullable(),
  bound: z.strictObject({ least: bound.nullable(), largest: bound.nullable() }),
});

export const windowSchema = z.strictObject({
  schema: z.literal('counterslope/window/1'),
  rows: z.array(row),
});

export type WindowDocument = z.infer<typeof windowSchema>;
