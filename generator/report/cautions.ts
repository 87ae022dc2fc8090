import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { volts } from './figures.ts';

/** Limit of class ES1 in normal operation, d.c. [V]: IEC 62368-1 (from memory). */
const harmless_V = 60;

/** What every reader has to know before building. */
export function cautions({ region }: SizedDesign): readonly string[] {
  const highest = region.inputVoltage_V.high;
  const hazardous =
    highest > harmless_V
      ? [
          `The input reaches ${volts(highest)}, above the 60\u00a0V d.c. that IEC 62368-1 (from memory) counts as harmless in normal operation (class ES1): local codes apply, and work on it belongs to licensed hands.`,
        ]
      : [];
  return [
    'This is a starting block. Have it reviewed by a qualified engineer before it is built into anything.',
    ...hazardous,
    'The devices in the netlists are generic. Check offset, bandwidth, current gain and capacitances of the parts that you order against those assumed.',
    'Continuous conduction, peak sensing, trailing edge and constant frequency are taken throughout; the voltage loop around this inner loop is not part of this sheet.',
  ];
}
