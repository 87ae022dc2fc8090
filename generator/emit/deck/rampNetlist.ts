import rampTemplate from '../../../templates/ramp.cir.hbs';
import { engineering } from '../../base/engineering.ts';
import { rampFigures } from '../../circuit/rampFigures.ts';
import type { SizedDesign } from '../../circuit/SizedDesign.ts';
import { netlistComment } from '../text/netlistComment.ts';
import { deckModels } from './deckModels.ts';
import { elementLine } from './elementLine.ts';

/** `ramp.cir`: the subcircuit that every deck instantiates, and the generic devices that it needs. */
export function rampNetlist(design: SizedDesign): string {
  const { circuit, demand, request, chosen } = design;
  const bare = (text: string) => netlistComment(text).replace(/^\* ?/, '');
  return rampTemplate({
    title: netlistComment(request.specification.title || 'ramp generator'),
    law: bare(
      `law ${chosen.law.kind}, ${chosen.law.gainSymbol} = ${engineering(chosen.realisedGain, chosen.law.gainUnit, 4)}`,
    ),
    slopes: bare(
      [demand.track_V.low, demand.track_V.high]
        .map((track) => {
          const { capacitorSlope_V_per_s } = rampFigures(design, track);
          return `${engineering(capacitorSlope_V_per_s / 1e6, 'V/us', 4)} at ${engineering(track, 'V')}`;
        })
        .join(', '),
    ),
    name: circuit.name,
    portNames: circuit.ports.map((port) => port.node).join(' '),
    ports: circuit.ports,
    elements: circuit.components.map((component) => ({
      reference: component.reference,
      role: component.role,
      line: elementLine(component),
    })),
    ...deckModels,
  });
}
