import type { Span } from '../../base/Quantity.ts';
import { assembleSpan } from './assembleSpan.ts';
import { normaliseText } from './normaliseText.ts';
import { type End, readEnd, unitOf } from './readEnd.ts';
import { asRange, rangeExample, screenForm } from './screenForm.ts';
import { splitRange } from './splitRange.ts';
import { displayed, type Reading, refuse } from './ValueFault.ts';
import { type ValueForm, wanted } from './ValueForm.ts';

export interface ReadSpan {
  readonly span: Span;
  /** Whether the text is a range. */
  readonly isRange: boolean;
  /** Whether a tolerance was written, be it ± 0 %. */
  readonly hasTolerance: boolean;
}

/**
 * A value, a range, either with tolerances, from text as users write it.
 * @returns SI; the first fault otherwise, with the user's own text
 */
export function readSpan(original: string, form: ValueForm): Reading<ReadSpan> {
  const reading = readNormalised(normaliseText(original), form);
  if (reading.ok) return reading;
  // Only a part may be at fault, and normalised at that: users look for what they typed.
  return { ok: false, fault: { ...reading.fault, received: displayed(original.trim()) } };
}

function readNormalised(text: string, form: ValueForm): Reading<ReadSpan> {
  const screened = screenForm(text, form);
  if (!screened.ok) return screened;
  const texts = splitRange(text);
  if (texts.length > 2) {
    const remedy = `write ${asRange([texts[0]!, texts.at(-1)!], form)}`;
    return refuse('range-form', `a range with two ends: ${rangeExample(form)}`, text, remedy);
  }
  if (texts.length === 2 && form.range !== true) {
    return refuse('range-not-allowed', `one value: ${wanted(form)}`, text, 'give one value, perhaps with ±');
  }
  return readEnds(text, texts, form);
}

function readEnds(text: string, texts: readonly string[], form: ValueForm): Reading<ReadSpan> {
  const unitOfRange = texts.length === 2 ? unitOf(texts[1]!) : '';
  const ends: End[] = [];
  for (const end of texts) {
    const reading = readEnd(end, unitOfRange, form);
    if (!reading.ok) return unitMissingInRange(reading, texts, form);
    ends.push(reading.value);
  }
  return assembleSpan(text, ends, form);
}

/** `8 to 36` and `8 V to 36` are mended as a range, not end by end. */
function unitMissingInRange(
  reading: Reading<never>,
  texts: readonly string[],
  form: ValueForm,
): Reading<never> {
  if (reading.ok || reading.fault.code !== 'unit-missing' || texts.length < 2) return reading;
  if (texts.some((text) => text.includes('±'))) return reading;
  return { ok: false, fault: { ...reading.fault, fix: `give the unit: ${asRange(texts, form)}` } };
}
