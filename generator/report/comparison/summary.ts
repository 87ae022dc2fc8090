import type { Comparison } from '../../loop/Comparison.ts';
import type { SummaryView } from '../summary.ts';

/** Reasons by what they speak of, in the order of the first screen. */
const questions: readonly (readonly [question: string, pattern: RegExp])[] = [
  ['Limits', /^(Peak|Output) limit|the limit leaves no load current/],
  ['Line response', /^Line response/],
  ['For whom', /^For /],
];

/** The first screen: the verdict, its reasons, and what to know besides. */
export function comparisonSummary({ verdict, lightLoad, notes }: Comparison) {
  const [first = '', ...reasons] = verdict.reasons.map(minus);
  const of = (pattern: RegExp) => reasons.filter((reason) => pattern.test(reason));
  const rest = reasons.filter((reason) => questions.every(([, pattern]) => !pattern.test(reason)));
  const answers = [
    answer('Damping', rest),
    ...questions.map(([question, pattern]) => answer(question, of(pattern))),
  ].filter(({ sentences }) => sentences.length > 0);
  const summary: Omit<SummaryView, 'remarks'> = {
    verdict: first,
    standing: first.startsWith('Every law over-compensates') ? 'caution' : 'good',
    answers,
  };
  const remarks = [
    ...(lightLoad?.notes ?? []).map((text) => ({ word: 'Load', text })),
    ...notes.map((text) => ({ word: 'Note', text })),
  ];
  return { summary, remarks };
}

function answer(question: string, sentences: readonly string[]) {
  return { question, standing: '', sentences };
}

/** Figures in sentences are data; on paper a hyphen is no minus sign. */
function minus(text: string): string {
  return text.replace(/(^|[\s(])-(?=\d)/g, '$1−');
}
