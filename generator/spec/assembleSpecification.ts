import { exactly, type Quantity } from '../base/Quantity.ts';
import type { ReadValues } from './forms/ReadValue.ts';
import type {
  BuildKind,
  ControllerSpecification,
  ConverterKind,
  ForwardStage,
  InductanceSpecification,
  LawKind,
  SeriesName,
  SheetFields,
  Specification,
} from './Specification.ts';

/** The specification from values that are all sound and complete. */
export function assembleSpecification(read: ReadValues): Specification {
  const converter = read.word('converter') as ConverterKind;
  const isIsolated = converter === 'flyback' || converter === 'forward';
  const hasTwoInductors = converter === 'sepic' || converter === 'cuk';
  return {
    title: read.word('title') ?? '',
    converter,
    input_V: read.span('input')!,
    output_V: read.spans('output'),
    inductance: inductance(read),
    frequency_Hz: read.span('frequency')!,
    maximumDutyRatio: read.quantity('maximumDuty')!.nominal,
    load_A: read.span('load'),
    rectifierDrop_V: read.quantity('rectifier.drop')!,
    losses: losses(read),
    minimumOnTime_s: read.quantity('minimumOnTime')!,
    senseGain_V_per_A: read.quantity('senseGain')!,
    // A turns ratio given to a stage without a transformer is warned of, and must not enter its equations.
    turnsRatio: (isIsolated ? read.quantity('turnsRatio') : null) ?? exactly(1),
    magnetizingInductance_H: converter === 'forward' ? read.span('magnetizingInductance') : null,
    stage: converter === 'forward' ? (read.word('stage') as ForwardStage) : null,
    secondInductance_H: hasTwoInductors ? read.span('secondInductance') : null,
    couplingCapacitor_F: hasTwoInductors ? read.span('couplingCapacitor') : null,
    outputCapacitor: outputCapacitor(read),
    controller: controller(read),
    goal: goal(read),
    ramp: ramp(read),
    sheet: sheet(read),
    date: read.word('date') ?? '',
  };
}

function inductance(read: ReadValues): InductanceSpecification | null {
  const [value, ripple] = [read.span('inductance.value'), read.span('inductance.ripple')];
  if (value !== null)
    return { kind: 'value', value_H: value, atPeakLimit_H: read.quantity('inductance.atPeakLimit') };
  return ripple && { kind: 'ripple', rippleRatio: ripple, of_A: read.quantity('inductance.of')! };
}

function losses(read: ReadValues): Specification['losses'] {
  const [first, winding, rectifier] = ['switch', 'winding', 'rectifier'].map((name) =>
    read.quantity(`losses.${name}`),
  );
  if (!first || !winding || !rectifier) return null;
  return { switch_ohm: first, winding_ohm: winding, rectifier_ohm: rectifier };
}

function outputCapacitor(read: ReadValues): Specification['outputCapacitor'] {
  const capacitance_F = read.span('outputCapacitor.capacitance');
  const seriesResistance_ohm = read.span('outputCapacitor.seriesResistance');
  return capacitance_F && seriesResistance_ohm && { capacitance_F, seriesResistance_ohm };
}

/** Null where the user says nothing of a controller: an assumed ramp of none is none. */
function controller(read: ReadValues): ControllerSpecification | null {
  const of = (name: string): Quantity | null => read.quantity(`controller.${name}`);
  const [valley_V, peak_V] = [of('oscillator.valley'), of('oscillator.peak')];
  const internalRamp = of('internalRamp');
  const fields = {
    internalRamp_V_per_s: internalRamp?.high === 0 ? null : internalRamp,
    senseLimit_V: of('senseLimit'),
    limitSeesRamp: read.truth('controller.limitSeesRamp') ?? true,
    blankingTime_s: of('blankingTime'),
    comparatorDelay_s: of('comparatorDelay'),
    oscillator: valley_V && peak_V && { valley_V, peak_V },
    pinCurrent_A: of('pinCurrent'),
  };
  const isSilent = Object.values(fields).every((field) => field === null || typeof field === 'boolean');
  return isSilent ? null : fields;
}

/** x = ½ + 1/(πQ): the damping index that gives the double pole at half the switching frequency that Q. */
export function dampingIndexOf(dampingQ: number): number {
  return 0.5 + 1 / (Math.PI * dampingQ);
}

function goal(read: ReadValues): Specification['goal'] {
  const dampingIndex = read.quantity('goal.dampingIndex')?.nominal;
  return {
    dampingIndex: dampingIndex ?? dampingIndexOf(read.quantity('goal.dampingQ')!.nominal),
    ceilingIndex: read.quantity('goal.ceiling')!.nominal,
    signalFloor_V: read.quantity('goal.signalFloor')!.nominal,
  };
}

function ramp(read: ReadValues): Specification['ramp'] {
  const word = (name: string) => read.word(`ramp.${name}`);
  return {
    law: word('law') as LawKind,
    gain: read.number('ramp.gain'),
    build: word('build') as BuildKind,
    injection: word('injection') as 'sense' | 'control',
    series: {
      resistor: word('series.resistor') as SeriesName,
      capacitor: word('series.capacitor') as SeriesName,
    },
    supply_V: read.quantity('ramp.supply')!,
    capacitance_F: read.quantity('ramp.capacitance'),
    follows: word('follows') as 'nothing' | 'frequency',
    reset: word('reset') as 'clock' | 'gate',
  };
}

function sheet(read: ReadValues): SheetFields {
  const of = (name: string) => read.word(`sheet.${name}`) ?? '';
  return {
    owner: of('owner'),
    number: of('number'),
    revision: of('revision'),
    author: of('author'),
    approver: of('approver'),
    issued: of('issued'),
  };
}
