import type { Component } from '../../circuit/Circuit.ts';
import { resetSwitch } from '../../circuit/DeviceModels.ts';
import { fixedNumber } from '../text/fixedNumber.ts';

/** One component as a SPICE element; letters before the reference where SPICE asks for another first letter. */
export function elementLine(component: Component): string {
  const nodes = component.nodes.join(' ');
  switch (component.kind) {
    case 'resistor':
    case 'capacitor':
      return `${component.reference} ${nodes} ${fixedNumber(component.value!)}`;
    case 'npn':
    case 'pnp':
      return `${component.reference} ${nodes} ${component.model}`;
    case 'nmos':
      // The bulk sits at the source; a length of one micrometre leaves the ratio to the width.
      return `M${component.reference} ${nodes} ${component.nodes[2]} ${component.model} W=${resetSwitch.widthLengthRatio}u L=1u`;
    case 'opamp':
      return `X${component.reference} ${nodes} ${component.model}`;
  }
}
