import type { Specification } from '../spec/Specification.ts';

export interface Field {
  readonly name: string;
  /** Empty: a ruled field to write in. */
  readonly text: string;
  readonly className: string;
}

/** The data fields of a title block (ISO 7200), from the specification's sheet. */
export function titleBlock({ sheet, title, date }: Specification, type: string): readonly Field[] {
  return [
    field('Legal owner', sheet.owner, 'owner'),
    field('Title', title, 'title'),
    field('Identification number', sheet.number, 'number'),
    field('Revision', sheet.revision, 'revision'),
    field('Document type', `Slope compensation, ${type}`, 'type'),
    field('Creator', sheet.author, 'author'),
    field('Approval person', sheet.approver, 'approver'),
    field('Date of issue', sheet.issued || date, 'issued'),
  ];
}

function field(name: string, text: string, className: string): Field {
  return { name, text, className };
}
