import type { KeyForm, SpecKey } from './keys/SpecKey.ts';
import { membersOf, specKey } from './keys/specKeys.ts';
import { dimensions } from './values/dimensions.ts';

export interface JsonSchema {
  readonly [keyword: string]: unknown;
}

/** JSON Schema of the specification, for editors and for `schema spec`; it follows from the table of keys. */
export function specificationSchema(): JsonSchema {
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    title: 'Specification of a slope-compensation ramp',
    ...groupSchema(''),
  };
}

function groupSchema(group: string): JsonSchema {
  const names = membersOf(group)!;
  const properties = names.map((name) => [name, memberSchema(group === '' ? name : `${group}.${name}`)]);
  const required = names.filter(
    (name) => specKey(group === '' ? name : `${group}.${name}`)?.required === true,
  );
  return {
    type: 'object',
    properties: Object.fromEntries(properties),
    ...(required.length > 0 ? { required } : {}),
    additionalProperties: false,
  };
}

/** A key, a group, or a group that may also be given as one value. */
function memberSchema(path: string): JsonSchema {
  const key = specKey(path);
  if (membersOf(path) === undefined) return keySchema(key!);
  if (key === undefined) return { ...groupSchema(path), type: ['object', 'null'] };
  return { description: key.doc, anyOf: [valueSchema(key.form), groupSchema(path)] };
}

function keySchema(key: SpecKey): JsonSchema {
  const { assumed } = key;
  const text = typeof assumed === 'object' ? assumed.text : null;
  return {
    description: key.doc,
    ...valueSchema(key.form),
    ...(text === null ? {} : { default: text }),
    examples: [key.example],
  };
}

function valueSchema(form: KeyForm): JsonSchema {
  switch (form.kind) {
    case 'value': {
      const one = { type: dimensions[form.dimension].unit === '' ? ['string', 'number'] : 'string' };
      return form.list === true ? { anyOf: [one, { type: 'array', items: one, minItems: 1 }] } : one;
    }
    case 'gain':
      return { type: ['number', 'string'] };
    case 'choice':
      return { enum: form.choices };
    case 'yes-no':
      return { enum: ['yes', 'no', true, false] };
    case 'text':
      return { type: ['string', 'number', 'boolean', 'null'] };
    case 'date':
      return { type: ['string', 'null'], pattern: '^(\\d{4}-\\d{2}-\\d{2})?$' };
  }
}
