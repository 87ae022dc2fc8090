import styleTemplate from '../../templates/_report-style.html.hbs';
import reportTemplate from '../../templates/report.html.hbs';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Result } from '../emit/resultSchema.ts';
import { contentSecurityPolicy } from '../emit/text/contentSecurityPolicy.ts';
import type { Waveforms } from '../spice/Deck.ts';
import { benchPlan } from './benchPlan.ts';
import { cautions } from './cautions.ts';
import { figureViews } from './chart/figureViews.ts';
import { formats } from './chart/formats.ts';
import { type BarChart, layOutBars } from './chart/layOutBars.ts';
import { ruleTable, simulationTable } from './checkTables.ts';
import { figureTable, partsTable, portTable, rampTable } from './circuitTables.ts';
import { currentCharts, worstDeck } from './currentCharts.ts';
import { dampingChart } from './dampingChart.ts';
import { comparisonTable, lawAdvice } from './lawComparison.ts';
import { rampCharts } from './rampCharts.ts';
import { assumptionTable, cornerTable, regionSentences, requirementTable } from './regionTables.ts';
import { reproduction } from './reproduction.ts';
import { spreadChart } from './spreadChart.ts';
import { summaryOf } from './summary.ts';
import { titleBlock } from './titleBlock.ts';
import { worstCornerTable } from './worstCorner.ts';

export interface ReportInput {
  readonly design: SizedDesign;
  readonly result: Result;
  /** By deck; null where no simulation was run. */
  readonly waveforms: ReadonlyMap<string, Waveforms> | null;
}

/**
 * `report.html`: the design sheet as one page that needs nothing else.
 *
 * No script; the one style is allowed by its hash. Every text goes through the template's escaping.
 */
export async function reportPage({ design, result, waveforms }: ReportInput): Promise<string> {
  const { specification } = design.request;
  return reportTemplate({
    policy: await contentSecurityPolicy({ scripts: [], styles: [styleTemplate({})] }),
    title: specification.title || 'Slope-compensation ramp generator',
    summary: summaryOf(design, result),
    requirements: requirementTable(design.request),
    region: regionSentences(design),
    corners: cornerTable(result),
    damping: figureViews(dampingChart(design, result), formats.wide),
    advice: lawAdvice(design),
    comparison: comparisonTable(design),
    ramps: rampCharts(design, waveforms?.get('ramp-test.cir')).map((chart) =>
      figureViews(chart, formats.half),
    ),
    rampTable: rampTable(result),
    parts: partsTable(result),
    ports: portTable(design),
    figures: figureTable(result),
    spread: barsView(spreadChart(design)),
    currents: currentCharts(design, waveforms?.get(worstDeck(design))).map((chart) =>
      figureViews(chart, formats.half),
    ),
    simulation: simulationTable(result),
    rules: ruleTable(result),
    worstCorners: worstCornerTable(design),
    assumptions: assumptionTable(result),
    bench: benchPlan(design),
    cautions: cautions(design),
    reproduction: await reproduction(design, result),
    titleBlock: titleBlock(design.request.specification, 'design sheet'),
  });
}

function barsView(chart: BarChart) {
  return {
    title: chart.title,
    formats: [layOutBars(chart, formats.half), layOutBars(chart, formats.narrow)],
    legend: [],
  };
}
