import type { BuildKind, SeriesName } from '../spec/Specification.ts';

export type ComponentKind = 'resistor' | 'capacitor' | 'npn' | 'pnp' | 'nmos' | 'opamp';

/**
 * One element of the circuit: netlist line, row of the bill of materials and symbol are views of it.
 *
 * Nodes in the order of the SPICE element: two for R and C, collector-base-emitter, drain-gate-source
 * (bulk at the source), and non-inverting, inverting, supply, output for an op-amp.
 */
export interface Component {
  /** Reference designator, unique: `R1`, `C2`, `Q2A`. */
  readonly reference: string;
  /** The package it sits in, `Q2` for `Q2A`: one row of the bill of materials each. */
  readonly package: string;
  readonly role: string;
  readonly kind: ComponentKind;
  readonly nodes: readonly string[];
  /** SI value; null for semiconductors. */
  readonly value: number | null;
  /** Name of the model or macro; null for R and C. */
  readonly model: string | null;
  readonly series: SeriesName | null;
  readonly toleranceRatio: number | null;
  readonly rating: string;
  /** False for what the board brings along by itself (strays): in the netlist, not in the bill. */
  readonly fitted: boolean;
}

/** A ramp generator as one typed object. */
export interface Circuit {
  readonly build: Exclude<BuildKind, 'auto'>;
  /** Subcircuit name. */
  readonly name: string;
  readonly ports: readonly Port[];
  readonly components: readonly Component[];
}

export interface Port {
  readonly node: string;
  readonly meaning: string;
}
