import type { Quantity, Span } from '../base/Quantity.ts';

export type ConverterKind = 'buck' | 'boost' | 'buck-boost' | 'sepic' | 'cuk' | 'flyback' | 'forward';
export type ForwardStage = 'single' | 'two-switch' | 'half-bridge' | 'push-pull' | 'full-bridge';
export type LawKind = 'fixed' | 'vin' | 'vout' | 'constant-q';
export type BuildKind =
  | 'auto'
  | 'board-rc'
  | 'board-mirror'
  | 'board-opamp'
  | 'board-follower'
  | 'board-gate'
  | 'board-pin'
  | 'chip';
export type SeriesName = 'E6' | 'E12' | 'E24' | 'E48' | 'E96' | 'E192';

/** What is known of the inductor: a value, the customer's range, a ripple, and what saturation leaves. */
export type InductanceSpecification =
  | { readonly kind: 'value'; readonly value_H: Span; readonly atPeakLimit_H: Quantity | null }
  | { readonly kind: 'ripple'; readonly rippleRatio: Span; readonly of_A: Quantity };

export interface ControllerSpecification {
  readonly internalRamp_V_per_s: Quantity | null;
  readonly senseLimit_V: Quantity | null;
  readonly limitSeesRamp: boolean;
  readonly blankingTime_s: Quantity | null;
  readonly comparatorDelay_s: Quantity | null;
  readonly oscillator: { readonly valley_V: Quantity; readonly peak_V: Quantity } | null;
  readonly pinCurrent_A: Quantity | null;
}

export interface SheetFields {
  readonly owner: string;
  readonly number: string;
  readonly revision: string;
  readonly author: string;
  readonly approver: string;
  readonly issued: string;
}

/**
 * The normalised specification: every key filled in, SI base units, tolerances as intervals.
 * What was not given and assumed instead is listed beside it as {@link Assumption}s.
 */
export interface Specification {
  readonly title: string;
  readonly converter: ConverterKind;
  readonly input_V: Span;
  /** Null: not known. A list has one span for each output voltage (or range) asked for. */
  readonly output_V: readonly Span[] | null;
  readonly inductance: InductanceSpecification | null;
  readonly frequency_Hz: Span;
  readonly maximumDutyRatio: number;
  readonly load_A: Span | null;
  readonly rectifierDrop_V: Quantity;
  /** Null: not given, the duty is that of a lossless stage. */
  readonly losses: {
    readonly switch_ohm: Quantity;
    readonly winding_ohm: Quantity;
    readonly rectifier_ohm: Quantity;
  } | null;
  readonly minimumOnTime_s: Quantity;
  readonly senseGain_V_per_A: Quantity;
  readonly turnsRatio: Quantity;
  readonly magnetizingInductance_H: Span | null;
  readonly stage: ForwardStage | null;
  readonly secondInductance_H: Span | null;
  readonly couplingCapacitor_F: Span | null;
  readonly outputCapacitor: {
    readonly capacitance_F: Span;
    readonly seriesResistance_ohm: Span;
  } | null;
  readonly controller: ControllerSpecification | null;
  readonly goal: {
    readonly dampingIndex: number;
    readonly ceilingIndex: number;
    readonly signalFloor_V: number;
  };
  readonly ramp: {
    readonly law: LawKind;
    /** Null: the least gain that meets the goal. k or p or x, dimensionless; for `fixed`, S·L in volts. */
    readonly gain: number | null;
    readonly build: BuildKind;
    readonly injection: 'sense' | 'control';
    readonly series: { readonly resistor: SeriesName; readonly capacitor: SeriesName };
    readonly supply_V: Quantity;
    readonly capacitance_F: Quantity | null;
    readonly follows: 'nothing' | 'frequency';
    readonly reset: 'clock' | 'gate';
  };
  readonly sheet: SheetFields;
  /** ISO 8601 calendar date as given, or empty. */
  readonly date: string;
}
