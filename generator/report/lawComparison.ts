import type { SizedDesign, SizedLaw } from '../circuit/SizedDesign.ts';
import { cycleRatio, dampingQ, settlingCycles } from '../law/innerLoop.ts';
import { figure, interval, plainNumber } from './figures.ts';
import { bothLaws, gainText, inkOf } from './lawNames.ts';
import { type TableView, tableView } from './table.ts';

/** Closer than this two laws are as well damped: the next resistor value moves them more. */
const alike = 0.03;

/** The law and what it costs, in a sentence with its figures. */
export function costSentence({ chosen, alternative }: SizedDesign): string {
  const [own, other] = [chosen, alternative].map(({ extremes }) => extremes.max.dampingIndex) as [
    number,
    number,
  ];
  const isAdaptive = chosen.law.kind !== 'fixed';
  const otherName = isAdaptive ? 'a fixed ramp' : 'a ramp proportional to Vin';
  const reaches = `${otherName} (${gainText(alternative, alternative.realisedGain)})`;
  if (Math.abs(own - other) <= alike * own)
    return `For damping ${reaches} is its equal: x reaches ${plainNumber(own)} with this law, ${plainNumber(other)} with the other.`;
  if (other < own)
    return `For damping ${reaches} is at least as good here: it reaches only x = ${plainNumber(other)}, this law ${plainNumber(own)}${isAdaptive ? '; following Vin buys no damping over this region' : ''}.`;
  return `${capital(reaches)} would over-compensate: x up to ${plainNumber(other)} and ${cycles(alternative)} to settle, against ${plainNumber(own)} and ${cycles(chosen)}.`;
}

function cycles({ extremes: { min, max } }: SizedLaw): string {
  const settling = [min, max].map(({ dampingIndex }) => settlingCycles(dampingIndex));
  return settling.includes(null)
    ? 'no number of cycles'
    : `${Math.max(...(settling as number[]))}\u00a0cycles`;
}

export function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
}

/** What the comparison comes to, and for whom the other law would do. */
export function lawAdvice(design: SizedDesign): readonly string[] {
  const [adaptive, fixed] = bothLaws(design).map(({ extremes }) => extremes.max.dampingIndex) as [
    number,
    number,
  ];
  return [
    costSentence(design),
    fixed <= adaptive * (1 + alike)
      ? 'Over these outputs the slope that is needed hardly depends on the input, and a constant ramp is close to deadbeat everywhere. Following the input is for outputs that are not known or set by others, up towards the input.'
      : 'The output may stand so close to the input that the slope needed grows with the input: a constant ramp, sized where it is needed most, is too much elsewhere.',
    design.chosen.law.kind === 'fixed'
      ? 'This ramp needs nothing but a reference; the same block fed from the input makes the adaptive one.'
      : 'This ramp needs nothing but the input; the same block fed from a reference makes the fixed one.',
  ];
}

/** The same figures for both laws, side by side. */
export function comparisonTable(design: SizedDesign): TableView {
  const laws = bothLaws(design);
  const row = (head: string, cell: (law: SizedLaw) => string) => [head, ...laws.map(cell)];
  return tableView(
    'Both laws over the same region and corners, each at its own gain',
    [['figure', 'words'], ...laws.map(({ law }): [string, 'num'] => [headOf(design, law.kind), 'num'])],
    [
      row('nominal gain', (law) => gainText(law, law.realisedGain)),
      row('least gain that the worst unit must deliver', (law) => gainText(law, law.required.gain)),
      row('damping index x', ({ extremes: { min, max } }) =>
        interval(plainNumber(min.dampingIndex), plainNumber(max.dampingIndex)),
      ),
      row('cycle ratio α', ({ extremes: { min, max } }) =>
        interval(plainNumber(cycleRatio(min.dampingIndex)), plainNumber(cycleRatio(max.dampingIndex))),
      ),
      row('greatest Q at half the switching frequency', ({ extremes: { min } }) => quality(min.dampingIndex)),
      row('cycles to settle to 1\u00a0%', cycles),
      row('taken from a peak limit that sees the ramp', (law) => limitLoss(design, law)),
    ],
  );
}

function headOf({ chosen }: SizedDesign, kind: SizedLaw['law']['kind']): string {
  return `${inkOf(kind)}${chosen.law.kind === kind ? ', built' : ''}`;
}

function quality(index: number): string {
  const q = dampingQ(index);
  return q === null ? 'not stable' : plainNumber(q);
}

/** ma·D·Ts over the region, nominal gain and inductance. */
function limitLoss({ region, corners, demand }: SizedDesign, { law, realisedGain }: SizedLaw): string {
  const losses = region.vertices.map(
    (point) =>
      (law.ramp_V(realisedGain, point) / corners.referenceInductance_H) * point.duty * demand.period_s,
  );
  return interval(figure(Math.min(...losses), 'A'), figure(Math.max(...losses), 'A'));
}
