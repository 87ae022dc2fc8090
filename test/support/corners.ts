import { hasInductance, type KnownCorners, loopCorners } from '../../generator/law/loopCorners.ts';
import { buildRegion } from '../../generator/region/buildRegion.ts';
import type { OperatingRegion } from '../../generator/region/OperatingRegion.ts';
import { powerStageOf } from '../../generator/region/powerStages.ts';
import type { Specification } from '../../generator/spec/Specification.ts';
import { type Keys, requestOf } from './request.ts';

/** Specification, region and corners of a converter whose inductance is given. */
export async function cornersOf(
  keys: Keys,
): Promise<{ specification: Specification; region: OperatingRegion; corners: KnownCorners }> {
  const request = await requestOf(keys);
  const { specification } = request;
  const region = buildRegion(request, powerStageOf(specification));
  if (!region.ok) throw new Error(JSON.stringify(region.problems));
  const corners = loopCorners(specification, region.value);
  if (!hasInductance(corners)) throw new Error('no inductance');
  return { specification, region: region.value, corners };
}
