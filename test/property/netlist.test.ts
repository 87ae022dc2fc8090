/** Netlist and bill of materials are views of one circuit: read back, they say the same. */
import { expect, test } from 'vitest';
import type { Component } from '../../generator/circuit/Circuit.ts';
import { billOfMaterials, billOfMaterialsCsv } from '../../generator/emit/billOfMaterials.ts';
import { rampNetlist } from '../../generator/emit/deck/rampNetlist.ts';
import { type NetlistElement, parseSubcircuits } from '../support/parseSubcircuit.ts';
import { overDesigns } from '../support/randomDesigns.ts';

const runs = 100;

const letters: Record<Component['kind'], string> = {
  resistor: 'R',
  capacitor: 'C',
  npn: 'Q',
  pnp: 'Q',
  nmos: 'M',
  opamp: 'X',
};

/** What a component has to read as in a netlist. */
function expected({ reference, kind, nodes, value, model }: Component) {
  const name = reference.startsWith(letters[kind]) ? reference : letters[kind] + reference;
  // The bulk of the discrete transistor sits at its source.
  return { name, nodes: kind === 'nmos' ? [...nodes, nodes[2]] : nodes, value, model };
}

const plain = ({ name, nodes, value, model }: NetlistElement) => ({ name, nodes, value, model });

test('ramp.cir parses back to the very circuit: references, nodes, values to the last digit, models', async () => {
  await overDesigns(runs, (design) => {
    const block = parseSubcircuits(rampNetlist(design)).get(design.circuit.name)!;
    expect(block.ports).toEqual(design.circuit.ports.map(({ node }) => node));
    expect(block.elements.map(plain)).toEqual(design.circuit.components.map(expected));
  });
});

test('every node of the block has two connections or more, every reference is unique', async () => {
  await overDesigns(runs, ({ circuit }) => {
    const uses = new Map<string, number>();
    const touched = [
      ...circuit.ports.map(({ node }) => node),
      '0',
      ...circuit.components.flatMap(({ nodes }) => nodes),
    ];
    for (const node of touched) uses.set(node, (uses.get(node) ?? 0) + 1);
    expect([...uses].filter(([, count]) => count < 2)).toEqual([]);
    const references = circuit.components.map(({ reference }) => reference);
    expect(new Set(references).size).toBe(references.length);
  });
});

test('every model and macro that the block names is in the file', async () => {
  await overDesigns(runs, (design) => {
    const text = rampNetlist(design);
    const models = new Set(design.circuit.components.flatMap(({ model }) => model ?? []));
    for (const model of models) expect(text).toMatch(new RegExp(`^\\.(model|subckt) ${model}\\b`, 'm'));
  });
});

test('the bill of materials has each fitted package once with the values of the circuit, and nothing else', async () => {
  await overDesigns(runs, ({ circuit }) => {
    const fitted = circuit.components.filter((component) => component.fitted);
    const rows = billOfMaterials(circuit);
    expect(rows.map(({ reference }) => reference)).toEqual([...new Set(fitted.map((part) => part.package))]);
    for (const part of fitted) {
      const row = rows.find(({ reference }) => reference === part.package)!;
      expect(row).toMatchObject({
        value: part.value,
        series: part.series,
        toleranceRatio: part.toleranceRatio,
        quantity: 1,
      });
      expect(row.role).toContain(part.role);
      if (part.kind === 'resistor') expect(readValue(row.text, 'Ω') / part.value!).toBeCloseTo(1, 9);
      if (part.kind === 'capacitor' && part.series !== null)
        expect(readValue(row.text, 'F') / part.value!).toBeCloseTo(1, 9);
    }
    const lines = billOfMaterialsCsv(rows).trim().split('\r\n');
    expect(lines).toHaveLength(rows.length + 1);
    expect(lines.slice(1).map((line) => line.split(',')[0])).toEqual(rows.map(({ reference }) => reference));
  });
});

/** `4.70 kΩ` as 4700: what the bill says to people has to be the value itself. */
function readValue(text: string, unit: string): number {
  const [, digits, prefix] = new RegExp(`^([\\d.]+) ([fpnµmkM]?)${unit}$`).exec(text)!;
  const powers: Record<string, number> = { f: -15, p: -12, n: -9, µ: -6, m: -3, k: 3, M: 6 };
  return Number(`${digits}e${powers[prefix!] ?? 0}`);
}
