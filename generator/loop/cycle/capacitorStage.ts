import type { LinearInterval, LinearStage } from './CycleRun.ts';

/** What feeds the output: the inductor in both intervals (buck) or only while the switch is off. */
export type FeedKind = 'buck' | 'boost' | 'buck-boost';

/** A power stage with its output capacitor, everything in the inductor's frame. */
export interface CapacitorStageElements {
  readonly kind: FeedKind;
  readonly inputVoltage_V: number;
  readonly rectifierDrop_V: number;
  readonly inductance_H: number;
  readonly capacitance_F: number;
  readonly seriesResistance_ohm: number;
  readonly switch_ohm: number;
  readonly winding_ohm: number;
  readonly rectifier_ohm: number;
  /** The load draws conductance·vout + current: a resistor, a constant current, or both. */
  readonly loadConductance_S: number;
  readonly loadCurrent_A: number;
}

/**
 * Buck, boost or buck-boost with a real output capacitor; states [iL, vC].
 *
 *   L·diL/dt = E − r·iL − φ·vout,   C·dvC/dt = φ·iL − G·vout − I,   vout = vC + Rc·C·dvC/dt
 *
 * φ = 1 while the inductor feeds the output. A flyback is a buck-boost with secondary and load referred to
 * the primary, a forward converter a buck fed from Vin/n, a SEPIC with an ideal coupling capacitor a
 * buck-boost of L1∥L2. A Ćuk feeds its output through one of its two inductors, and is none of these.
 * The output is a magnitude. Switch and rectifier exchange the path at one instant.
 */
export function capacitorStage(elements: CapacitorStageElements): LinearStage {
  const { kind, inputVoltage_V: input, rectifierDrop_V: drop } = elements;
  const onPath = elements.switch_ohm + elements.winding_ohm;
  const offPath = elements.rectifier_ohm + elements.winding_ohm;
  const offSource = kind === 'boost' ? input - drop : -drop;
  return {
    kind: 'linear',
    on: conducting(elements, input, onPath, kind === 'buck' ? 1 : 0),
    off: conducting(elements, offSource, offPath, 1),
    idle: idle(elements),
    trip: [1, 0],
  };
}

/** vout = share·(vC + Rc·(φ·iL − I)), share = 1/(1 + Rc·G): the ESR against the load's conductance. */
function outputShare({ seriesResistance_ohm, loadConductance_S }: CapacitorStageElements): number {
  return 1 / (1 + seriesResistance_ohm * loadConductance_S);
}

function conducting(
  elements: CapacitorStageElements,
  source_V: number,
  path_ohm: number,
  feed: 0 | 1,
): LinearInterval {
  const { inductance_H: L, capacitance_F: C, seriesResistance_ohm: Rc } = elements;
  const { loadConductance_S: G, loadCurrent_A: I } = elements;
  const share = outputShare(elements);
  return {
    matrix: [
      [-(path_ohm + feed * share * Rc) / L, (-feed * share) / L],
      [(feed * share) / C, (-share * G) / C],
    ],
    source: [(source_V + feed * share * Rc * I) / L, (-share * I) / C],
    output: { row: [feed * share * Rc, share], constant: -share * Rc * I },
  };
}

function idle(elements: CapacitorStageElements): LinearInterval {
  const { matrix, source, output } = conducting(elements, 0, 0, 0);
  return { matrix: [[0, 0], matrix[1]!], source: [0, source[1]!], output };
}
