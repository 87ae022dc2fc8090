import type { ConverterKind } from '../spec/Specification.ts';
import { buck } from './converters/buck.ts';
import type { PowerStage } from './PowerStage.ts';

/** Every converter that can be sized: one file each, listed here. */
const powerStages: Partial<Record<ConverterKind, PowerStage>> = { buck };

export function powerStageOf(kind: ConverterKind): PowerStage | null {
  return powerStages[kind] ?? null;
}
