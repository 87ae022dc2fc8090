import { dimensions } from './dimensions.ts';
import { codedValue } from './iec60062.ts';
import type { Literal } from './Literal.ts';
import { otherCases } from './units.ts';
import { type Reading, refuse } from './ValueFault.ts';
import { boundsOf, exampleOf, likelyUnit, type ValueForm, wanted, wouldFit } from './ValueForm.ts';
import { valueText } from './valueText.ts';

/** No unit, a unit in the wrong case, or none that is known. */
export function unitFault(text: string, literal: Literal, form: ValueForm): Reading<never> {
  const { noun } = dimensions[form.dimension];
  const usual = likelyUnit(literal.digits, form);
  if (literal.unit === '') {
    const remedy = `give the unit: ${literal.negative ? '-' : ''}${literal.digits} ${usual}`;
    return refuse('unit-missing', `${noun} with its unit, such as ${exampleOf(form)}`, text, remedy);
  }
  if (!/^[A-Za-z%/ ]+$/.test(literal.unit)) return codeFault(text, form) ?? notANumber(text, form);
  const cases = otherCases(literal.unit);
  const meant = cases.find((unit) => wouldFit(literal.digits, unit, form)) ?? cases[0];
  if (meant !== undefined) return caseFault(text, literal, meant, form);
  return refuse('unit-unknown', wanted(form), text, unitRemedy(literal, usual, form));
}

/** `4.7k` lacks the unit's name, not the prefix. */
function unitRemedy(literal: Literal, usual: string, form: ValueForm): string {
  if (usual === '') return 'write the number only';
  const completed = literal.unit.replace('K', 'k') + usual.replace(/^[fpnumkMGT](?=[A-Z])/, '');
  if (wouldFit(literal.digits, completed, form)) return `write ${literal.digits} ${completed}`;
  return `write ${literal.digits} ${usual}, or with another prefix`;
}

/** A value code of the other kind, or one with a unit behind it. */
function codeFault(text: string, form: ValueForm): Reading<never> | null {
  const [code = '', ...rest] = text.split(/(?<=\d) ?(?=[A-Za-z]{2,}$|[FV]$)/);
  const resistance = codedValue(code, 'resistance') !== null;
  if (!resistance && codedValue(code, 'capacitance') === null) return null;
  const own = form.dimension === 'gain' ? 'resistance' : form.dimension;
  if (own === (resistance ? 'resistance' : 'capacitance') && rest.length > 0) {
    return refuse('unit-unknown', wanted(form), text, `write the code without a unit: ${code}`);
  }
  const kind = resistance ? 'a resistance' : 'a capacitance';
  const remedy = `write ${exampleOf(form)}; this is the value code of ${kind}`;
  return refuse('wrong-dimension', wanted(form), text, remedy);
}

export function caseFault(text: string, literal: Literal, unit: string, form: ValueForm): Reading<never> {
  const remedy = `write ${literal.digits} ${unit}: case matters, m is milli, M is mega`;
  return refuse('unit-case', wanted(form), text, remedy);
}

export function zeroFault(text: string, form: ValueForm): Reading<never> {
  const { noun } = dimensions[form.dimension];
  return refuse('zero', `${noun} above zero`, text, `write ${noun} above zero, such as ${exampleOf(form)}`);
}

/** Out of bounds: most often a prefix in the wrong case, or per cent without its sign. */
export function magnitudeFault(text: string, literal: Literal | null, form: ValueForm): Reading<never> {
  const meant =
    literal === null ? undefined : otherCases(literal.unit).find((u) => wouldFit(literal.digits, u, form));
  if (meant !== undefined) return caseFault(text, literal!, meant, form);
  const { noun } = dimensions[form.dimension];
  const [least, most] = boundsOf(form).map((bound) => valueText(bound, form.dimension));
  const isPerCent = form.dimension === 'ratio' && literal?.unit === '' && wouldFit(literal.digits, '%', form);
  const prefix = dimensions[form.dimension].unit === '' ? '' : ' and its prefix: m is milli, M is mega';
  const remedy = isPerCent ? `write ${literal.digits} %` : `check the number${prefix}`;
  return refuse('magnitude', `${noun} from ${least} to ${most}`, text, remedy);
}

export function notANumber(text: string, form: ValueForm): Reading<never> {
  return refuse('number-form', wanted(form), text, `write ${exampleOf(form)}`);
}
