import type { Quantity } from '../base/Quantity.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { Specification } from '../spec/Specification.ts';
import type { DimensionName } from '../spec/values/dimensions.ts';
import { writeQuantity, writeSpan } from '../spec/values/writeSpan.ts';

type Text = string | number | readonly string[] | null | undefined;

/**
 * How each key is written again from the normalised specification; null where there is nothing to write.
 *
 * Only keys that were given are written: what was assumed is assumed again.
 */
const texts: Readonly<Record<string, (spec: Specification) => Text>> = {
  title: ({ title }) => title,
  converter: ({ converter }) => converter,
  input: ({ input_V }) => writeSpan(input_V, 'voltage'),
  output: ({ output_V }) => outputText(output_V?.map((span) => writeSpan(span, 'voltage'))),
  'inductance.value': ({ inductance }) =>
    inductance?.kind === 'value' ? writeSpan(inductance.value_H, 'inductance') : null,
  'inductance.atPeakLimit': ({ inductance }) =>
    inductance?.kind === 'value' ? quantity(inductance.atPeakLimit_H, 'inductance') : null,
  'inductance.ripple': ({ inductance }) =>
    inductance?.kind === 'ripple' ? writeSpan(inductance.rippleRatio, 'ratio') : null,
  'inductance.of': ({ inductance }) =>
    inductance?.kind === 'ripple' ? quantity(inductance.of_A, 'current') : null,
  frequency: ({ frequency_Hz }) => writeSpan(frequency_Hz, 'frequency'),
  maximumDuty: ({ maximumDutyRatio }) => maximumDutyRatio,
  load: ({ load_A }) => load_A && writeSpan(load_A, 'current'),
  'rectifier.drop': ({ rectifierDrop_V }) => quantity(rectifierDrop_V, 'voltage'),
  'losses.switch': ({ losses }) => quantity(losses?.switch_ohm, 'resistance'),
  'losses.winding': ({ losses }) => quantity(losses?.winding_ohm, 'resistance'),
  'losses.rectifier': ({ losses }) => quantity(losses?.rectifier_ohm, 'resistance'),
  minimumOnTime: ({ minimumOnTime_s }) => quantity(minimumOnTime_s, 'time'),
  senseGain: ({ senseGain_V_per_A }) => quantity(senseGain_V_per_A, 'gain'),
  turnsRatio: ({ turnsRatio }) => quantity(turnsRatio, 'number'),
  magnetizingInductance: ({ magnetizingInductance_H: value }) => value && writeSpan(value, 'inductance'),
  stage: ({ stage }) => stage,
  secondInductance: ({ secondInductance_H: value }) => value && writeSpan(value, 'inductance'),
  couplingCapacitor: ({ couplingCapacitor_F: value }) => value && writeSpan(value, 'capacitance'),
  'outputCapacitor.capacitance': ({ outputCapacitor }) =>
    outputCapacitor && writeSpan(outputCapacitor.capacitance_F, 'capacitance'),
  'outputCapacitor.seriesResistance': ({ outputCapacitor }) =>
    outputCapacitor && writeSpan(outputCapacitor.seriesResistance_ohm, 'resistance'),
  'controller.internalRamp': ({ controller }) => quantity(controller?.internalRamp_V_per_s, 'slope'),
  'controller.senseLimit': ({ controller }) => quantity(controller?.senseLimit_V, 'voltage'),
  'controller.limitSeesRamp': ({ controller }) => (controller?.limitSeesRamp ? 'yes' : 'no'),
  'controller.blankingTime': ({ controller }) => quantity(controller?.blankingTime_s, 'time'),
  'controller.comparatorDelay': ({ controller }) => quantity(controller?.comparatorDelay_s, 'time'),
  'controller.oscillator.valley': ({ controller }) => quantity(controller?.oscillator?.valley_V, 'voltage'),
  'controller.oscillator.peak': ({ controller }) => quantity(controller?.oscillator?.peak_V, 'voltage'),
  'controller.pinCurrent': ({ controller }) => quantity(controller?.pinCurrent_A, 'current'),
  'goal.dampingIndex': ({ goal }) => goal.dampingIndex,
  'goal.ceiling': ({ goal }) => goal.ceilingIndex,
  'goal.signalFloor': ({ goal }) => quantity(exact(goal.signalFloor_V), 'voltage'),
  'ramp.law': ({ ramp }) => ramp.law,
  'ramp.gain': ({ ramp }) => ramp.gain,
  'ramp.build': ({ ramp }) => ramp.build,
  'ramp.injection': ({ ramp }) => ramp.injection,
  'ramp.series.resistor': ({ ramp }) => ramp.series.resistor,
  'ramp.series.capacitor': ({ ramp }) => ramp.series.capacitor,
  'ramp.supply': ({ ramp }) => quantity(ramp.supply_V, 'voltage'),
  'ramp.capacitance': ({ ramp }) => quantity(ramp.capacitance_F, 'capacitance'),
  'ramp.follows': ({ ramp }) => ramp.follows,
  'ramp.reset': ({ ramp }) => ramp.reset,
  'sheet.owner': ({ sheet }) => sheet.owner,
  'sheet.number': ({ sheet }) => sheet.number,
  'sheet.revision': ({ sheet }) => sheet.revision,
  'sheet.author': ({ sheet }) => sheet.author,
  'sheet.approver': ({ sheet }) => sheet.approver,
  'sheet.issued': ({ sheet }) => sheet.issued,
  date: ({ date }) => date,
};

/** A goal given as Q is the same goal as an index, which has no rounding to lose. */
const sameAs: Readonly<Record<string, string>> = { 'goal.dampingIndex': 'goal.dampingQ' };

/** A specification that comes to the same design, as JSON, which YAML is a superset of. */
export function specificationText({ specification, place }: ReadSpecification): string {
  const document = {};
  for (const [path, write] of Object.entries(texts)) {
    if (place(path) === null && place(sameAs[path] ?? path) === null) continue;
    const text = write(specification);
    if (text !== null && text !== undefined && text !== '') put(document, path.split('.'), text);
  }
  return JSON.stringify(document, null, 2);
}

function put(into: Record<string, unknown>, [name = '', ...rest]: readonly string[], text: Text): void {
  if (rest.length === 0) {
    into[name] = text;
    return;
  }
  const group = (into[name] ?? {}) as Record<string, unknown>;
  into[name] = group;
  put(group, rest, text);
}

function quantity(value: Quantity | null | undefined, dimension: DimensionName): string | null {
  return value ? writeQuantity(value, dimension) : null;
}

function exact(value: number): Quantity {
  return { nominal: value, low: value, high: value };
}

function outputText(values: readonly string[] | undefined): Text {
  return values?.length === 1 ? values[0] : values;
}
