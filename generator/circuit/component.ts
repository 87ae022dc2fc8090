import type { SeriesName } from '../spec/Specification.ts';
import type { Component, ComponentKind } from './Circuit.ts';

/** A resistor or capacitor of a series. */
export function passive(
  kind: 'resistor' | 'capacitor',
  reference: string,
  role: string,
  nodes: readonly [string, string],
  value: number,
  choice: { readonly series: SeriesName | null; readonly toleranceRatio: number; readonly rating: string },
): Component {
  return { reference, package: reference, role, kind, nodes, value, model: null, fitted: true, ...choice };
}

/** What the board brings along: in the netlist, not in the bill of materials. */
export function strayCapacitor(
  reference: string,
  role: string,
  nodes: readonly [string, string],
  value: number,
  toleranceRatio: number,
): Component {
  return {
    reference,
    package: reference,
    role,
    kind: 'capacitor',
    nodes,
    value,
    model: null,
    series: null,
    toleranceRatio,
    rating: 'not a part',
    fitted: false,
  };
}

/** A transistor or op-amp; `pack` names the package that it shares with another. */
export function semiconductor(
  kind: Exclude<ComponentKind, 'resistor' | 'capacitor'>,
  reference: string,
  pack: string,
  role: string,
  nodes: readonly string[],
  model: string,
  rating: string,
): Component {
  return {
    reference,
    package: pack,
    role,
    kind,
    nodes,
    value: null,
    model,
    series: null,
    toleranceRatio: null,
    rating,
    fitted: true,
  };
}
