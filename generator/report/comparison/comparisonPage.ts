import styleTemplate from '../../../templates/_report-style.html.hbs';
import comparisonTemplate from '../../../templates/comparison.html.hbs';
import { contentSecurityPolicy } from '../../emit/text/contentSecurityPolicy.ts';
import { jsonDocument } from '../../emit/text/jsonDocument.ts';
import type { Comparison } from '../../loop/Comparison.ts';
import { lineStep } from '../../loop/lineStep.ts';
import { figureViews } from '../chart/figureViews.ts';
import { type Format, formats } from '../chart/formats.ts';
import { legendView } from '../chart/legendView.ts';
import { typeset } from '../figures.ts';
import { assumptionTable, regionSentences, requirementTable } from '../regionTables.ts';
import { sha256Hex } from '../reproduction.ts';
import { specificationText } from '../specificationText.ts';
import { titleBlock } from '../titleBlock.ts';
import { toolVersion } from '../toolVersion.ts';
import { lawTable, neededRampTable } from './comparisonTables.ts';
import { indexMaps, mapScale } from './indexMaps.ts';
import { currentCurves, indexChart } from './lawCurves.ts';
import { lineStepChart } from './lineStepChart.ts';
import { neededRampCharts } from './neededRampChart.ts';
import { comparisonSummary } from './summary.ts';

/** Maps have nothing beside them. */
const mapFormats = {
  half: { name: 'half', width: 540, height: 340, margin: 16 },
  narrow: { name: 'narrow', width: 332, height: 270, margin: 12 },
} as const satisfies Record<string, Format>;

/** `comparison.html`: the comparison of laws as one page that needs nothing else. */
export async function comparisonPage(comparison: Comparison): Promise<string> {
  const { request, region, laws } = comparison;
  const { specification, assumptions } = request;
  const maps = indexMaps(comparison);
  const index = maps.length > 0 ? null : indexChart(comparison);
  const step = lineStep(specification, region, laws);
  return comparisonTemplate({
    policy: await contentSecurityPolicy({ scripts: [], styles: [styleTemplate({})] }),
    title: specification.title || 'Fixed or adaptive slope compensation',
    ...comparisonSummary(comparison),
    index: index === null ? [] : [figureViews(index, formats.wide)],
    laws: lawTable(comparison),
    maps: maps.map((chart) => figureViews(chart, mapFormats.half, mapFormats.narrow)),
    mapScale: legendView({ legend: mapScale(comparison) }),
    currents: currentCurves(comparison).map((chart) => figureViews(chart, formats.half)),
    lineStep: step === null ? [] : [figureViews(lineStepChart(step), formats.wide)],
    lineStepNote:
      'The control level and the output voltage are held, so that what is seen is the current loop alone: how far the mean inductor current of a nominal unit moves, and in how many cycles. Where the duty is at its maximum, the current climbs no faster than that allows. Computed exactly from cycle to cycle, conduction taken as continuous.',
    neededRamp: neededRampTable(comparison),
    neededCurves: neededRampCharts(comparison).map((chart) => figureViews(chart, formats.half)),
    requirements: requirementTable(request),
    region: regionSentences(comparison),
    assumptions: assumptionTable({
      assumptions: assumptions.map(({ key, value, unit, reason }) => ({ key, value, unit, reason })),
    }),
    reproduction: {
      computedBy: typeset(`counterslope ${toolVersion}`),
      digest: await sha256Hex(jsonDocument(specification)),
      specification: specificationText(request),
    },
    titleBlock: titleBlock(specification, 'comparison of laws'),
  });
}
