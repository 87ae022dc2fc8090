import type { Interval, Quantity } from '../base/Quantity.ts';
import type { LawKind, SeriesName } from '../spec/Specification.ts';

/**
 * What the law asks of a ramp generator, whatever its circuit.
 *
 * The generator follows one voltage, `track`: the converter's input, or a reference for a ramp that
 * does not move. Slopes are at the sense element, before any summing network.
 */
export interface RampDemand {
  readonly law: LawKind;
  readonly tracks: 'input' | 'reference';
  readonly track_V: Interval;
  /** Spread of the tracked voltage itself; 0 for the input, which the law follows wherever it goes. */
  readonly trackToleranceRatio: number;
  /** Slope per tracked volt that the worst unit must deliver [(V/s)/V]. */
  readonly requiredSlope_per_s: number;
  /** Nominal slope per tracked volt where the designer has fixed the gain [(V/s)/V]; null: the least. */
  readonly givenSlope_per_s: number | null;
  /** Gain of the law per slope per tracked volt: gain = this × slope [s, or V·s for the fixed ramp]. */
  readonly gainPerSlope: number;
  /** Longest time that the ramp rises: maximum duty at the lowest frequency [s]. */
  readonly riseTime_s: number;
  /** Shortest time in which it is reset: the rest of the period at the highest frequency [s]. */
  readonly resetTime_s: number;
  readonly period_s: number;
  readonly supply_V: Quantity;
  readonly series: { readonly resistor: SeriesName; readonly capacitor: SeriesName };
  /** A capacitance that the designer has fixed [F]; null: free. */
  readonly capacitance_F: number | null;
  /** The tolerance that the designer has given it; null: that of the class that is ordered. */
  readonly capacitorToleranceRatio: number | null;
}
