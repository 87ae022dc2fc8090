import { engineering } from '../base/engineering.ts';
import type { Circuit, Component } from '../circuit/Circuit.ts';
import type { ResultPart } from './resultSchema.ts';
import { type Cell, csvDocument } from './text/csvDocument.ts';

const kindNames: Record<Component['kind'], string> = {
  resistor: 'resistor',
  capacitor: 'capacitor',
  npn: 'NPN transistor',
  pnp: 'PNP transistor pair',
  nmos: 'N-channel MOSFET',
  opamp: 'dual op-amp',
};

/** One row for each package that is fitted, in the order of the circuit. */
export function billOfMaterials({ components }: Circuit): ResultPart[] {
  const fitted = components.filter((component) => component.fitted);
  const packages = [...new Set(fitted.map((component) => component.package))];
  return packages.map((pack) =>
    row(
      pack,
      fitted.filter((component) => component.package === pack),
    ),
  );
}

function row(reference: string, [first, ...others]: readonly Component[]): ResultPart {
  const component = first!;
  const unit = component.kind === 'resistor' ? 'Ohm' : component.kind === 'capacitor' ? 'F' : '';
  return {
    reference,
    role: [component.role, ...others.map(({ role }) => role).filter((role) => role !== component.role)].join(
      '; ',
    ),
    kind: kindNames[component.kind],
    value: component.value,
    unit,
    text:
      component.value === null ? component.model! : engineering(component.value, unit === 'Ohm' ? 'Ω' : unit),
    series: component.series,
    toleranceRatio: component.toleranceRatio,
    quantity: 1,
    rating: component.rating,
  };
}

const columns = ['reference', 'quantity', 'kind', 'value', 'tolerance', 'series', 'role', 'rating'];

/** `bom.csv`: a table for people and for an order list. */
export function billOfMaterialsCsv(parts: readonly ResultPart[]): string {
  const text = (value: string): Cell => ({ text: value });
  return csvDocument([
    columns.map(text),
    ...parts.map((part) => [
      text(part.reference),
      { number: part.quantity },
      text(part.kind),
      text(part.text),
      text(part.toleranceRatio === null ? '' : `${Number((100 * part.toleranceRatio).toPrecision(3))} %`),
      text(part.series ?? ''),
      text(part.role),
      text(part.rating),
    ]),
  ]);
}
