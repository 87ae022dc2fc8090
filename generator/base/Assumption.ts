/** Something the spec left open, what was taken instead, and why. */
export interface Assumption {
  /** The spec's key, dotted (`senseGain`, `ramp.supply`). */
  readonly key: string;
  readonly value: number | string | null;
  readonly unit: string;
  readonly reason: string;
}
