import { failure, type Outcome, type Problem, success } from './base/Problem.ts';
import { exactly, outerInterval, type Span, spanOf } from './base/Quantity.ts';
import { type GivenRamp, givenRamp } from './loop/givenRamp.ts';
import { inductanceWindow } from './loop/inductanceWindow.ts';
import type { Window, WindowRow } from './loop/Window.ts';
import { buildRegion } from './region/buildRegion.ts';
import { powerStageOf } from './region/powerStages.ts';
import type { ReadSpecification } from './spec/readSpecification.ts';

/** Which inductances fit a given ramp, for each output voltage and frequency. */
export function window(request: ReadSpecification): Outcome<Window> {
  const ramp = givenRamp(request.specification);
  if (ramp === null) return failure(noRamp(request));
  const { output_V, frequency_Hz } = request.specification;
  const whole = buildRegion(request, powerStageOf(request.specification));
  if (!whole.ok) return failure(whole.problems);
  const outputs = output_V === null ? [null] : output_V.flatMap(outputsOf);
  const { low, high } = outerInterval(frequency_Hz);
  const frequencies = [...new Set([low, high])];
  const rows = outputs.flatMap((output) =>
    frequencies.map((frequency) => rowOf(request, ramp, output, frequency)),
  );
  return success({ request, ramp, rows });
}

/** A value stands for itself, a range for its ends and its middle. */
function outputsOf({ from, to }: Span): Span[] {
  if (from.nominal === to.nominal) return [{ from, to }];
  return [spanOf(from), spanOf(exactly((from.nominal + to.nominal) / 2)), spanOf(to)];
}

function rowOf(
  request: ReadSpecification,
  ramp: GivenRamp,
  output: Span | null,
  frequency_Hz: number,
): WindowRow {
  const specification = {
    ...request.specification,
    output_V: output === null ? null : [output],
    frequency_Hz: spanOf(exactly(frequency_Hz)),
  };
  const region = buildRegion({ ...request, specification }, powerStageOf(specification));
  return {
    outputVoltage_V: output?.from.nominal ?? null,
    frequency_Hz,
    window: region.ok ? inductanceWindow(specification, region.value, ramp, frequency_Hz) : null,
  };
}

function noRamp({ specification, place }: ReadSpecification): Problem[] {
  const { ramp, inductance } = specification;
  const lacksReference = ramp.gain !== null && inductance?.kind !== 'value';
  const key = lacksReference ? 'inductance' : 'ramp.gain';
  return [
    {
      code: 'ramp-missing',
      severity: 'error',
      key,
      place: place(key) ?? place('ramp') ?? null,
      expected:
        'a given ramp: controller.internalRamp in volts per second, or ramp.gain with the inductance that it was sized for',
      received: lacksReference ? 'ramp.gain without an inductance that it refers to' : 'neither',
      fix: lacksReference
        ? 'write inductance: 10 uH, the one that the gain refers to'
        : 'write controller.internalRamp: 45 mV/us ± 20 %, or ramp.gain: 0.75 and the inductance that it refers to',
    },
  ];
}
