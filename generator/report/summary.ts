import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { DeckCheck, Result, RuleOutcome, WorstPoint } from '../emit/resultSchema.ts';
import { figure, percent, plainNumber, volts } from './figures.ts';
import { capital, costSentence } from './lawComparison.ts';
import { gainText, lawName } from './lawNames.ts';

export interface Answer {
  readonly question: string;
  readonly sentences: readonly string[];
  /** `good`, `bad`, `caution`, `open` or nothing. */
  readonly standing: string;
}

export interface SummaryView {
  readonly verdict: string;
  readonly standing: string;
  readonly answers: readonly Answer[];
  readonly remarks: readonly { readonly word: string; readonly text: string; readonly standing: string }[];
}

/** The first screen: is it stable, by which law, from what, does it agree, what is left to look at. */
export function summaryOf(design: SizedDesign, result: Result): SummaryView {
  const standing = overallStanding(design, result);
  return {
    verdict: [verdict(design, result), ...reservations(result)].join(' '),
    standing,
    answers: [stability(design, result), law(design), build(design, result), agreement(result)],
    remarks: remarks(result),
  };
}

function overallStanding(
  design: SizedDesign,
  { rules, simulation, stability: { dampingIndexMin } }: Result,
): string {
  const broken = rules.some(({ severity, passed }) => severity === 'error' && !passed);
  if (dampingIndexMin <= 0.5 || broken || simulation?.passed === false) return 'bad';
  return isBelowGoal(design, dampingIndexMin) ? 'caution' : 'good';
}

function verdict(design: SizedDesign, { stability: { dampingIndexMin: least, at } }: Result): string {
  const goal = design.request.specification.goal.dampingIndex;
  const place = `${volts(at.inputVoltage_V)} in and ${percent(at.dutyRatio)} duty`;
  if (least <= 0.5)
    return `Not stable ${reach(design)}: the damping index falls to ${plainNumber(least)} at ${place}; ½ is the edge.`;
  const aim = isBelowGoal(design, least) ? `, below the goal of ${plainNumber(goal)}` : '';
  return `Stable ${reach(design)}: damping index at least ${plainNumber(least)}, at ${place}${aim}.`;
}

/** What stands against the verdict, so that it is not read alone. */
function reservations({ rules, simulation }: Result): string[] {
  const others = rules.filter(
    ({ id, severity, passed }) =>
      severity === 'error' && !passed && id !== 'stability' && id !== 'damping-goal',
  );
  return [
    ...(simulation === null ? ['Not simulated.'] : []),
    ...(simulation?.passed === false ? ['The simulation disagrees.'] : []),
    ...(others.length > 0 ? [`Failed: ${others.map(({ id }) => id).join(', ')}.`] : []),
  ];
}

/** The least gain meets the goal exactly; the margin is for rounding in the last digits. */
function isBelowGoal({ request }: SizedDesign, index: number): boolean {
  return index < request.specification.goal.dampingIndex * (1 - 1e-9);
}

function reach({ region }: SizedDesign): string {
  if (region.outputVoltage_V === null) return `at every duty to ${percent(region.duty.high)}`;
  return region.cuts.length > 0 ? 'wherever the duty allows to regulate' : 'over the whole region';
}

export function pointText({ inputVoltage_V, outputVoltage_V, dutyRatio }: WorstPoint): string {
  const output = outputVoltage_V === null ? '' : `, ${volts(outputVoltage_V)} out`;
  return `${volts(inputVoltage_V)} in${output}, duty ${percent(dutyRatio)}`;
}

function stability(design: SizedDesign, { stability: figures }: Result): Answer {
  const { dampingIndexMin: least, dampingIndexMax: most, at, atMax, settlingCyclesMax } = figures;
  const { goal } = design.request.specification;
  const settles =
    settlingCyclesMax === null
      ? ''
      : ` A disturbance is down to 1\u00a0% within ${settlingCyclesMax} cycles.`;
  return {
    question: 'Damping',
    standing: least <= 0.5 ? 'bad' : isBelowGoal(design, least) ? 'caution' : 'good',
    sentences: [
      `Least x ${plainNumber(least)} at ${pointText(at)}; goal ${plainNumber(goal.dampingIndex)}, edge ½.`,
      `Greatest x ${plainNumber(most)} at ${pointText(atMax)}.${settles}`,
    ],
  };
}

function law(design: SizedDesign): Answer {
  const { chosen } = design;
  return {
    question: 'Law',
    standing: '',
    sentences: [
      `${capital(lawName(chosen.law.kind))}, ${gainText(chosen, chosen.realisedGain)} (least ${figure(chosen.required.gain, chosen.law.gainUnit)}).`,
      costSentence(design),
    ],
  };
}

/** The values that make the slope; the table of parts has all. */
function build({ sizing, demand, request, circuit }: SizedDesign, { parts }: Result): Answer {
  const key = [
    `${sizing.divider.upperCount > 1 ? `${sizing.divider.upperCount} × ` : ''}${figure(sizing.divider.upper_ohm, 'Ω')} over ${figure(sizing.divider.lower_ohm, 'Ω')} divider`,
    `R4 ${figure(sizing.set_ohm, 'Ω')} set resistor`,
    `C1 ${figure(sizing.capacitance_F, 'F')} timing capacitor`,
    `R7 ${figure(sizing.summing_ohm, 'Ω')} and R8 ${figure(sizing.sense_ohm, 'Ω')} at the sense input`,
  ];
  const source = demand.tracks === 'input' ? 'Vin' : `a reference of ${volts(demand.track_V.high)}`;
  const count = parts.reduce((sum, { quantity }) => sum + quantity, 0);
  return {
    question: 'Build',
    standing: '',
    sentences: [
      `${request.specification.ramp.build === 'auto' ? 'board-opamp' : request.specification.ramp.build} fed from ${source}, ${count} parts; subcircuit ${circuit.name} in ramp.cir.`,
      `${key.join(', ')}.`,
    ],
  };
}

function agreement({ simulation }: Result): Answer {
  const question = 'Simulation';
  if (simulation === null)
    return { question, standing: 'open', sentences: ['Not run: nothing below is checked by simulation.'] };
  const failed = simulation.decks.filter(({ passed }) => !passed);
  const worst = worstCheck(simulation.decks);
  const largest = worst === null ? '' : `Largest deviation: ${deviation(worst)}.`;
  const engine = `${simulation.engine} engine, version ${simulation.version}`;
  return {
    question,
    standing: simulation.passed ? 'good' : 'bad',
    sentences: [
      simulation.passed
        ? `Agrees: all ${simulation.decks.length} figures are within their limits (${engine}).`
        : `Disagrees: ${failed.length} of ${simulation.decks.length} figures are beyond their limits (${engine}).`,
      largest,
    ].filter((sentence) => sentence !== ''),
  };
}

/** The check that comes nearest to its limit; one without a figure is beyond any. */
export function worstCheck(checks: readonly DeckCheck[]): DeckCheck | null {
  const nearness = ({ errorRatio, limit }: DeckCheck) =>
    errorRatio === null ? Number.POSITIVE_INFINITY : Math.abs(errorRatio) / limit;
  return checks.reduce<DeckCheck | null>((a, b) => (a === null || nearness(b) > nearness(a) ? b : a), null);
}

function deviation(check: DeckCheck): string {
  const amount = errorText(check);
  return `${amount} of ${limitText(check)} allowed, ${check.quantity} at ${volts(check.at.inputVoltage_V)} in ${check.file}`;
}

/** What has no unit is compared by plain difference: near zero a ratio would mean nothing. */
export function errorText({ errorRatio, unit }: DeckCheck): string {
  if (errorRatio === null) return 'no figure';
  return unit === '' ? plainNumber(Math.abs(errorRatio)) : percent(Math.abs(errorRatio));
}

export function limitText({ limit, unit }: DeckCheck): string {
  return unit === '' ? plainNumber(limit) : percent(limit);
}

const words = { error: 'Failed', warning: 'Warning', note: 'Note' } as const;
const standings = { error: 'bad', warning: 'caution', note: 'open' } as const;

/** Every rule that has not passed, the gravest first. */
function remarks({ rules }: Result): SummaryView['remarks'] {
  return (['error', 'warning', 'note'] as const).flatMap((severity) =>
    rules
      .filter((rule) => rule.severity === severity && !rule.passed)
      .map((rule) => ({ word: words[severity], standing: standings[severity], text: remarkText(rule) })),
  );
}

function remarkText({ id, measured, limit, unit, reason }: RuleOutcome): string {
  return `${id}: ${figure(measured, unit)}, limit ${figure(limit, unit)}. ${reason}`;
}
