import type { SpecKey } from './keys/SpecKey.ts';
import { membersOf, specKey } from './keys/specKeys.ts';

const heading = `# Specification of a slope-compensation ramp for a peak-current-mode converter.
# YAML 1.2. Only input and frequency are required, and for a circuit inductance.
# A key behind a # is optional: to use it, delete the #, and that of its group. Whatever is left out is assumed,
# and listed as such.
# Values carry their unit: 8 V to 36 V; 10 uH ± 20 %; 5 V +10 % -5 %; 4k7; 90 %.
`;

/** A specification to start from: every key with what it means, the customary ones ready to use. */
export function starterSpecification(): string {
  return `${heading}\n${groupLines('', '').join('\n').trimEnd()}\n`;
}

function groupLines(group: string, indent: string): readonly string[] {
  return membersOf(group)!.flatMap((name) => {
    const path = group === '' ? name : `${group}.${name}`;
    const lines = memberLines(path, name, indent);
    return indent === '' ? [...lines, ''] : lines;
  });
}

function memberLines(path: string, name: string, indent: string): readonly string[] {
  const key = specKey(path);
  if (membersOf(path) === undefined) return [...comments(key!, indent), keyLine(key!, name, indent)];
  const members = groupLines(path, `${indent}  `);
  if (key === undefined) return [`${indent}${isActive(path) ? '' : '#'}${name}:`, ...members];
  // A group with a shorthand is shown as the one value; the group in its place stays commented out.
  const inItsPlace = members.map((line) => line.replace(/^( +)(?=[a-z])/, '$1#'));
  const opening = [`${indent}# In its place, with more detail:`, `${indent}#${name}:`];
  return [...comments(key, indent), keyLine(key, name, indent), ...opening, ...inItsPlace];
}

function comments(key: SpecKey, indent: string): readonly string[] {
  const { form, assumed } = key;
  const choices = form.kind === 'choice' ? ` ${form.choices.join(' | ')}.` : '';
  const text = typeof assumed === 'object' ? assumed.text : null;
  const otherwise = text === null ? '' : ` Left out: ${text}.`;
  return [`${indent}# ${key.doc}${choices}${otherwise}`];
}

function keyLine(key: SpecKey, name: string, indent: string): string {
  return `${indent}${key.starter === true ? '' : '#'}${name}: ${key.example}`;
}

/** Whether any key of the group is shown ready to use. */
function isActive(group: string): boolean {
  return membersOf(group)!.some((name) => {
    const path = `${group}.${name}`;
    return membersOf(path) === undefined ? specKey(path)!.starter === true : isActive(path);
  });
}
