import type { SizedDesign, SizedLaw } from '../../circuit/SizedDesign.ts';
import type { RegionPoint } from '../../region/OperatingRegion.ts';
import { checkPoints } from './checkPoints.ts';
import { trackSource } from './trackSource.ts';

/** A converter deck to come: which law, where. */
export interface PlannedConverter {
  readonly file: string;
  readonly kind: 'adaptive' | 'fixed';
  readonly sized: SizedLaw;
  readonly point: RegionPoint;
}

/** A block fed from a reference carries a little more than its own voltage before it runs out of headroom. */
const referenceReach = 1.1;

/** Every converter deck of a design: both laws, each at its worst point first. */
export function converterPlan(design: SizedDesign): readonly PlannedConverter[] {
  return (['adaptive', 'fixed'] as const).flatMap((kind) => {
    const isFixed = design.chosen.law.kind === 'fixed';
    const wanted = isFixed === (kind === 'fixed') ? design.chosen : design.alternative;
    // Where the other law needs no ramp at all, there is none to show.
    if (wanted.realisedGain === 0) return [];
    const reach = design.demand.tracks === 'reference' ? referenceReach : 1;
    const most_V = reach * design.demand.track_V.high;
    const sized = carried(design, kind, wanted, most_V);
    const { track_V } = trackSource(design, kind, sized.realisedGain);
    const fits = (inputVoltage_V: number) => track_V(inputVoltage_V) <= most_V * (1 + 1e-9);
    return checkPoints(design, sized, fits).map((point, index) => ({
      file: index === 0 ? `converter-${kind}.cir` : `converter-${kind}-${index + 1}.cir`,
      kind,
      sized,
      point,
    }));
  });
}

/**
 * A law with as much of its gain as the block carries at the law's worst point.
 *
 * A block for a gain below the least cannot make the other law's ramp: it shows the steepest that it can.
 */
function carried(
  design: SizedDesign,
  kind: PlannedConverter['kind'],
  law: SizedLaw,
  most_V: number,
): SizedLaw {
  const { inputVoltage_V } = law.extremes.min.at;
  const track_V = trackSource(design, kind, law.realisedGain).track_V(inputVoltage_V);
  return { ...law, realisedGain: law.realisedGain * Math.min(1, most_V / track_V) };
}

/** Names of a design's files, the manifest included, in the order of the contract. */
export function fileNames(design: SizedDesign): string[] {
  const converters = converterPlan(design).map(({ file }) => file);
  return [
    'ramp.cir',
    'ramp-test.cir',
    ...converters,
    'bom.csv',
    'report.html',
    'result.json',
    'manifest.json',
  ];
}
