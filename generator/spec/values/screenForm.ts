import { dimensions } from './dimensions.ts';
import { type Reading, read, refuse } from './ValueFault.ts';
import { exampleOf, likelyUnit, type ValueForm, wanted } from './ValueForm.ts';

/** No value needs more; the patterns of this folder stay quick on what is shorter. */
const longestValue = 200;

/** Refuses what is no number in any locale that the grammar knows, before it is taken apart. */
export function screenForm(text: string, form: ValueForm): Reading<string> {
  if (text === '') return refuse('value-missing', wanted(form), text, `write ${exampleOf(form)}`);
  if (text.length > longestValue) return refuse('value-too-long', wanted(form), text, 'write the value only');
  if (/(?<![A-Za-z])(nan|inf|infinity)(?![A-Za-z])|∞/i.test(text)) {
    return refuse(
      'not-finite',
      `a finite value: ${wanted(form)}`,
      text,
      'write a number, or leave the key out',
    );
  }
  if (/\.{2,}|…|~/.test(text)) {
    const range = `a range written with "to": ${rangeExample(form)}`;
    return refuse('range-form', range, text, `write ${asRange(text.split(/ ?(?:\.{2,}|…|~) ?/), form)}`);
  }
  return screenSeparators(text);
}

function screenSeparators(text: string): Reading<string> {
  const grouped = /\d[ '’_]\d{3}(?!\d)|\d['’_]\d|\d,\d{3}(?!\d)|\d\.\d+\.\d|\d\.\d+,\d|\d,\d+\.\d/;
  if (grouped.test(text)) return refuse('thousands-separator', plainDigits, text, ungrouped(text));
  if (!/\d, ?\d/.test(text)) return read(text);
  return refuse('decimal-comma', plainDigits, text, `write ${text.replace(/(\d), ?(\d)/g, '$1.$2')}`);
}

const plainDigits = 'digits without separators, with a decimal point';

/** A comma before three digits may be either kind: both readings are offered. */
function ungrouped(text: string): string {
  const joined = text.replace(/(\d)[ ,'’_](?=\d)/g, '$1');
  const commas = text.match(/,/g)?.length ?? 0;
  if (commas === 1 && !text.includes('.') && /\d,\d{3}(?!\d)/.test(text)) {
    return `write ${joined}, or ${text.replace(',', '.')} if the comma is a decimal one`;
  }
  return /\d\.\d+[.,]\d/.test(text) ? 'write the digits together, with one decimal point' : `write ${joined}`;
}

export function rangeExample(form: ValueForm): string {
  const example = exampleOf(form);
  if (example.includes(' to ')) return example;
  const { example: single } = dimensions[form.dimension];
  return `${single} to ${single.replace(/^\d+/, (digits) => String(2 * Number(digits)))}`;
}

/** The ends as a range in the wanted form; a unit is added where none was given. */
export function asRange(ends: readonly string[], form: ValueForm): string {
  const [first = '', last = ''] = [ends[0]?.trim(), ends.at(-1)?.trim()];
  const bare = /^[\d.]+$/;
  const unit = (digits: string) => (form.dimension === 'number' ? '' : ` ${likelyUnit(digits, form)}`);
  if (!bare.test(last)) return `${first} to ${last}`;
  const lacking = bare.test(first) ? unit(last) : ` ${first.replace(/^[\d.]+ ?/, '')}`;
  return `${first}${bare.test(first) ? lacking : ''} to ${last}${lacking}`;
}
