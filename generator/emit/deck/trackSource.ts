import type { SizedDesign } from '../../circuit/SizedDesign.ts';
import { fixedNumber } from '../text/fixedNumber.ts';

/** What drives the block's `track` port in a deck. */
export interface TrackSource {
  /** Node at the port. */
  readonly node: string;
  /** The line that drives it, a comment where Vin itself does. */
  readonly line: string;
  /** Voltage at the port for an input voltage [V]. */
  track_V(inputVoltage_V: number): number;
}

/**
 * The block as designed, or the same block made to follow the other law.
 *
 * A fixed ramp of S·L comes from a block for Vin when its port is held at a voltage; an adaptive one
 * from a block for a reference when its port gets a share of Vin.
 * @param gain nominal gain that the law is to have: k, or S·L in volts
 */
export function trackSource(design: SizedDesign, kind: 'adaptive' | 'fixed', gain: number): TrackSource {
  const perVolt = (design.sizing.senseSlope_per_s * design.demand.gainPerSlope) / unitTrack_V(design);
  if (kind === 'fixed') {
    const volts = gain / perVolt;
    return { node: 'ref', line: `Vref ref 0 ${fixedNumber(volts, 6)}`, track_V: () => volts };
  }
  if (design.demand.tracks === 'input')
    return { node: 'vin', line: '* The slope follows Vin itself', track_V: (input) => input };
  const share = gain / perVolt;
  return {
    node: 'share',
    line: `Eshare share 0 vin 0 ${fixedNumber(share, 6)}`,
    track_V: (input) => share * input,
  };
}

/** The gain is per volt for the input, per reference voltage for the fixed ramp. */
function unitTrack_V({ demand }: SizedDesign): number {
  return demand.tracks === 'reference' ? demand.track_V.high : 1;
}
