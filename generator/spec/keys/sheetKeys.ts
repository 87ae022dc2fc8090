import type { SpecKey } from './SpecKey.ts';

/** The drawing sheet's title block (ISO 7200) and the date. */
export const sheetKeys: readonly SpecKey[] = [
  sheet('owner', 'Legal owner of the sheet.', 'ramp design office'),
  sheet('number', 'Identification number.', 'R-0001'),
  sheet('revision', 'Revision index.', 'A'),
  sheet('author', 'Who made it.', 'design'),
  sheet('approver', 'Who approved it.', 'review'),
  sheet('issued', 'Date of issue.', '2026-12-01'),
  {
    path: 'date',
    form: { kind: 'date' },
    doc: 'Date that files carry; left out, none.',
    example: '2026-12-01',
  },
];

function sheet(name: string, doc: string, example: string): SpecKey {
  return { path: `sheet.${name}`, form: { kind: 'text' }, doc, example };
}
