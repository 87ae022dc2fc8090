import { dimensions } from './dimensions.ts';
import { parseLiteral } from './Literal.ts';
import { readMagnitude } from './readMagnitude.ts';
import { asRange, rangeExample } from './screenForm.ts';
import { splitTolerance } from './splitRange.ts';
import { readTolerance, type Tolerance } from './tolerance.ts';
import { type Reading, read, refuse } from './ValueFault.ts';
import type { ValueForm } from './ValueForm.ts';

/** One end of a range, or the whole of a value that is none. */
export interface End {
  readonly text: string;
  /** SI, never negative. */
  readonly value: number;
  readonly negative: boolean;
  readonly tolerance: Tolerance | null;
}

export function unitOf(end: string): string {
  return parseLiteral(splitTolerance(end)?.body ?? end)?.unit ?? '';
}

export function readEnd(text: string, unitOfRange: string, form: ValueForm): Reading<End> {
  const parted = splitTolerance(text);
  const body = parted?.body ?? text;
  const magnitude = readMagnitude(body, unitOfRange, form);
  if (!magnitude.ok) return closeHyphen(text, form) ?? magnitude;
  const { value, negative, toleranceRatio } = magnitude.value;
  if (negative && form.negative !== true && value !== 0) {
    const remedy = `write ${text.replace('-', '')}`;
    return refuse('negative', `${dimensions[form.dimension].noun} above zero`, text, remedy);
  }
  const coded =
    toleranceRatio === null ? null : { up: { ratio: toleranceRatio }, down: { ratio: toleranceRatio } };
  if (parted === null) return read({ text, value, negative, tolerance: coded });
  if (coded !== null)
    return refuse('tolerance-form', 'one tolerance', text, "drop the code's last letter, or the ±");
  const tolerance = readTolerance(parted, form.dimension);
  return tolerance.ok ? read({ text, value, negative, tolerance: tolerance.value }) : tolerance;
}

/** `8-36 V` could be a range, a subtraction or a part of a tolerance: only spaced dashes and `to` make ranges. */
function closeHyphen(text: string, form: ValueForm): Reading<never> | null {
  const oneSided = /^(.*?[\dA-Za-z%]) ?([+-]) ?([\d.]+ ?[%A-Za-z]+)$/.exec(text);
  const hyphen = /^([\d.]+ ?[A-Za-z%/]*) ?-([\d.]+ ?[A-Za-z%/]*)$/.exec(text);
  if (hyphen !== null && !hyphen[2]!.includes('%')) {
    const range = asRange([hyphen[1]!, hyphen[2]!], form);
    return refuse('range-form', `a range written with "to": ${rangeExample(form)}`, text, `write ${range}`);
  }
  if (oneSided === null) return null;
  const [, body, sign, amount] = oneSided;
  const both = sign === '+' ? `+${amount} -0 %` : `+0 % -${amount}`;
  return refuse('tolerance-form', 'a tolerance with both sides: +10 % -20 %', text, `write ${body} ${both}`);
}
