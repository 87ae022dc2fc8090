import { engineering } from '../base/engineering.ts';
import type { Interval } from '../base/Quantity.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { ComparedLaw } from './compareLaws.ts';
import { ampereSpan, isAlike } from './verdictWords.ts';

/** The limits speak for themselves, whichever law they favour. */
export function limitReasons(compared: readonly ComparedLaw[]): string[] {
  return [
    ...limitReason('Peak limit', compared, ({ peakLimit_A }) => peakLimit_A),
    ...limitReason('Output limit', compared, ({ outputLimit_A }) => outputLimit_A),
    ...nothingLeft(compared),
  ];
}

/** A limit that the ramp alone reaches. */
function nothingLeft(compared: readonly ComparedLaw[]): string[] {
  const eaten = compared.filter(({ outputLimit_A }) => outputLimit_A !== null && outputLimit_A.low <= 0);
  if (eaten.length === 0) return [];
  return [
    `Somewhere in the region the limit leaves no load current at all under ${eaten.map(({ law }) => law.kind).join(', ')}: ramp and ripple take all of it, and more inductance, a higher limit or a clamp that follows the ramp is needed.`,
  ];
}

function limitReason(
  name: string,
  compared: readonly ComparedLaw[],
  limitOf: (law: ComparedLaw) => Interval | null,
): string[] {
  const limits = compared.flatMap((law) => {
    const limit = limitOf(law);
    return limit === null ? [] : [{ kind: law.law.kind, limit, span: limit.high - limit.low }];
  });
  const [first] = limits;
  if (first === undefined) return [];
  const isSame = limits.every(
    ({ limit }) => isAlike(limit.low, first.limit.low) && isAlike(limit.high, first.limit.high),
  );
  if (isSame) return [`${name} over the region: ${ampereSpan(first.limit)}, the same with every law.`];
  const steadiest = limits.reduce((a, b) => (b.span < a.span * (1 - 1e-9) ? b : a));
  const texts = limits.map(({ kind, limit }) => `${kind} ${ampereSpan(limit)}`);
  return [`${name} over the region: ${texts.join(', ')}; steadiest with ${steadiest.kind}.`];
}

/** Slow response of the mean current to the input at constant control. */
export function lineReasons(compared: readonly ComparedLaw[], { stage }: OperatingRegion): string[] {
  const lines = compared.flatMap(({ law, lineResponse_A_per_V: line }) =>
    line === null ? [] : [{ kind: law.kind, largest: Math.max(Math.abs(line.low), Math.abs(line.high)) }],
  );
  if (lines.length === 0) return [];
  if (lines.every(({ largest }) => isAlike(largest, lines[0]!.largest)))
    return [
      `Line response of the mean inductor current at constant control, largest: ${engineering(lines[0]!.largest, 'A/V', 3)}, the same with every law.`,
    ];
  const calmest = lines.reduce((a, b) => (b.largest < a.largest * (1 - 1e-9) ? b : a));
  const texts = lines.map(({ kind, largest }) => `${kind} ${engineering(largest, 'A/V', 3)}`);
  const published =
    stage.kind === 'buck'
      ? ' A fixed ramp of half the down slope would null it; one in proportion to the input leaves that of an uncompensated converter.'
      : '';
  return [
    `Line response of the mean inductor current at constant control, largest: ${texts.join(', ')}; least with ${calmest.kind}.${published}`,
  ];
}
