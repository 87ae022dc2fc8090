import fc from 'fast-check';
import type { Problem } from '../../generator/base/Problem.ts';
import type { SizedDesign } from '../../generator/circuit/SizedDesign.ts';
import { sizeDesign } from '../../generator/circuit/sizeDesign.ts';
import { randomKeys } from './randomSpec.ts';
import { type Keys, requestOf } from './request.ts';

interface Tried {
  readonly keys: Keys;
  readonly design: SizedDesign | null;
  readonly problems: readonly Problem[];
}

const known = new Map<number, Promise<readonly Tried[]>>();

/** Random specifications of the pinned seed with what became of them, sized once for all tests of a file. */
function tried(count: number): Promise<readonly Tried[]> {
  const found = known.get(count) ?? Promise.all(fc.sample(randomKeys, count).map(attempt));
  known.set(count, found);
  return found;
}

async function attempt(keys: Keys): Promise<Tried> {
  const outcome = sizeDesign(await requestOf({ ...keys, title: 'a\nb .subckt {{x}} "=1+1"' }));
  return outcome.ok
    ? { keys, design: outcome.value, problems: [] }
    : { keys, design: null, problems: outcome.problems };
}

/** Runs a check over every design among `count` random specifications; fewer than a quarter would be too few. */
export async function overDesigns(count: number, check: (design: SizedDesign) => void): Promise<void> {
  const designs = (await tried(count)).filter(({ design }) => design !== null);
  if (designs.length < count / 4) throw new Error(`only ${designs.length} of ${count} became a design`);
  for (const { keys, design } of designs) await named(keys, () => check(design!));
}

/** The same over every refusal; fewer than a sixth would be too few. */
export async function overRefusals(
  count: number,
  check: (keys: Keys, problems: readonly Problem[]) => void | Promise<void>,
): Promise<void> {
  const refusals = (await tried(count)).filter(({ design }) => design === null);
  if (refusals.length < count / 6) throw new Error(`only ${refusals.length} of ${count} were refused`);
  for (const { keys, problems } of refusals) await named(keys, () => check(keys, problems));
}

/** A failure says which specification it was. */
async function named(keys: Keys, check: () => void | Promise<void>): Promise<void> {
  try {
    await check();
  } catch (cause) {
    throw new Error(`${JSON.stringify(keys)}: ${(cause as Error).message}`, { cause });
  }
}
