import type { ConverterKind, Specification } from '../spec/Specification.ts';
import { boost } from './converters/boost.ts';
import { buck } from './converters/buck.ts';
import { buckBoost, cuk, sepic } from './converters/buckBoost.ts';
import { flyback } from './converters/flyback.ts';
import { forward } from './converters/forward.ts';
import type { PowerStage } from './PowerStage.ts';

type StageParameters = Pick<Specification, 'turnsRatio' | 'stage'>;

/** Every converter: one file each, listed here. */
const powerStages: Record<ConverterKind, (parameters: StageParameters) => PowerStage> = {
  buck: () => buck,
  boost: () => boost,
  'buck-boost': () => buckBoost,
  sepic: () => sepic,
  cuk: () => cuk,
  flyback: ({ turnsRatio }) => flyback(turnsRatio.nominal),
  forward: ({ turnsRatio, stage }) => forward(turnsRatio.nominal, stage ?? 'single'),
};

export function powerStageOf(specification: Specification): PowerStage {
  return powerStages[specification.converter](specification);
}
