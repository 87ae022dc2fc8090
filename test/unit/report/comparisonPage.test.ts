import { describe, expect, it } from 'vitest';
import { contentSecurityPolicy } from '../../../generator/emit/text/contentSecurityPolicy.ts';
import { formats } from '../../../generator/report/chart/formats.ts';
import { layOutChart } from '../../../generator/report/chart/layOutChart.ts';
import { comparisonPage } from '../../../generator/report/comparison/comparisonPage.ts';
import { indexMaps, mapScale } from '../../../generator/report/comparison/indexMaps.ts';
import { currentCurves } from '../../../generator/report/comparison/lawCurves.ts';
import styleTemplate from '../../../templates/_report-style.html.hbs';
import { comparisonOf, exactBuck } from '../../support/comparison.ts';
import type { Keys } from '../../support/request.ts';
import { hostileTitles } from '../emit/text/hostileTitles.ts';

const customer: Keys = {
  ...exactBuck,
  input: '6 V to 36 V',
  output: '0.8 V to 30 V',
  maximumDuty: '85 %',
  'controller.senseLimit': '500 mV',
  'controller.limitSeesRamp': 'yes',
};
const known: Keys = { ...customer, output: '5 V' };
const { inductance: _, ...unknownInductance } = known;

const pageOf = async (keys: Keys) => comparisonPage(await comparisonOf(keys));

function headings(page: string): string[] {
  return [...page.matchAll(/<h2 id="s\d">.*?<\/span> ([^<]*)<\/h2>/g)].map(([, text]) => text!);
}

describe('the page of a comparison', () => {
  it('has the verdict as its first heading, and the reasons below', async () => {
    const page = await pageOf(known);
    expect(/<h2[^>]*>([^<]*)</.exec(page)![1]).toMatch(/^A fixed ramp does as well for damping/);
    expect(page).toContain('build the fixed ramp');
  });

  it('is the same to the byte when it is made twice, and stays below half a megabyte', async () => {
    const page = await pageOf(customer);
    expect(page).toBe(await pageOf(customer));
    expect(page.length).toBeGreaterThan(50_000);
    expect(page.length).toBeLessThan(500_000);
  });

  it('allows its own style by hash, no script, and refers to nothing outside itself', async () => {
    const page = await pageOf(customer);
    const style = /<style>(.*?)<\/style>/s.exec(page)![1]!;
    expect(style).toBe(styleTemplate({}));
    const policy = await contentSecurityPolicy({ scripts: [], styles: [style] });
    const content = /http-equiv="Content-Security-Policy" content="([^"]*)"/.exec(page)![1]!;
    expect(content.replaceAll('&#x27;', "'").replaceAll('&#x3D;', '=')).toBe(policy);
    expect(page).not.toMatch(/<script|\sstyle=|\son[a-z]+=|https?:|url\(|@import|\ssrc=/i);
  });

  it.each(hostileTitles)('shows a title as text, whatever it is: %j', async (title) => {
    const comparison = await comparisonOf(unknownInductance);
    const titled = (text: string) => {
      const { request } = comparison;
      const specification = { ...request.specification, title: text };
      return comparisonPage({ ...comparison, request: { ...request, specification } });
    };
    const elements = (page: string) => page.match(/<[a-z][a-z0-9]*/gi);
    expect(elements(await titled(title))).toEqual(elements(await titled('plain')));
  });

  it('shows maps where the output is a range or not known, curves where it is one voltage', async () => {
    expect(headings(await pageOf(customer))).toContain('Damping index over input and output');
    const page = await pageOf(known);
    expect(headings(page)).not.toContain('Damping index over input and output');
    expect(page).toContain('Greatest damping index of any unit over input voltage');
  });

  it('leaves out what cannot be given without an inductance', async () => {
    const page = await pageOf(unknownInductance);
    expect(headings(page)).toEqual([
      'The laws side by side',
      'The ramp that is needed, without an inductance',
      'What it rests on',
    ]);
    expect(page).toContain('cannot be given');
  });

  it('describes every plot in words, by ids that no other element has', async () => {
    const page = await pageOf(customer);
    const ids = [...page.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id!);
    expect(new Set(ids).size).toBe(ids.length);
    for (const [, description] of page.matchAll(/<desc id="[^"]*">([^<]*)<\/desc>/g))
      expect(description!.length).toBeGreaterThan(30);
  });
});

describe('the maps', () => {
  it('are one for each law, on one pair of axes and one scale', async () => {
    const maps = indexMaps(await comparisonOf(customer));
    expect(maps.map(({ id }) => id)).toEqual(['map-fixed', 'map-vin', 'map-vout', 'map-constant-q']);
    for (const { x, y } of maps) expect([x, y]).toEqual([maps[0]!.x, maps[0]!.y]);
  });

  it('draw a contour where the index has its value', async () => {
    const [fixed] = indexMaps(await comparisonOf(customer));
    const contours = fixed!.marks.flatMap((mark) => (mark.kind === 'contour' ? [mark] : []));
    expect(contours.length).toBeGreaterThan(3);
    // x = 1 − (Vout − S·L)/Vin, S·L = 0.85·35.29 V − (1 − x_goal)·35.29 V at the worst point.
    const gain = (0.5 + 1 / Math.PI - 0.15) * (30 / 0.85);
    for (const { label, points } of contours)
      for (const [input, output] of points) expect(1 - (output - gain) / input).toBeCloseTo(Number(label), 2);
  });

  it('have a scale as far as any of them reaches', async () => {
    const scale = mapScale(await comparisonOf(customer));
    expect(scale[0]!.text).toBe('x below 0.9');
    expect(scale.at(-1)!.text).toBe('above 4');
  });

  it('stay inside their plots', async () => {
    for (const map of indexMaps(await comparisonOf({ ...customer, output: '0.8 V to 20 V' }))) {
      const { shapes } = layOutChart(map, formats.half);
      const tints = shapes.filter(({ className }) => className.startsWith('tint'));
      expect(tints.length).toBeGreaterThan(0);
      for (const { d } of tints)
        for (const [, x, y] of d.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)) {
          expect(Number(x)).toBeGreaterThanOrEqual(40);
          expect(Number(x)).toBeLessThanOrEqual(540);
          expect(Number(y)).toBeGreaterThanOrEqual(26);
          expect(Number(y)).toBeLessThanOrEqual(280);
        }
    }
  });
});

describe('the curves over the input', () => {
  it('show the peak limit of the vin law level for one output', async () => {
    const peak = currentCurves(await comparisonOf(known)).find(({ id }) => id === 'peak')!;
    const level = peak.marks.flatMap((mark) =>
      mark.kind === 'line' && mark.ink === 'adaptive' ? mark.points.map(([, value]) => value) : [],
    );
    expect(level.length).toBeGreaterThan(50);
    for (const value of level) expect(value).toBeCloseTo(level[0]!, 9);
  });

  it('are left out where there is no limit, or no inductance', async () => {
    expect(currentCurves(await comparisonOf(unknownInductance))).toEqual([]);
    const { 'controller.senseLimit': __, 'controller.limitSeesRamp': ___, ...unlimited } = known;
    expect(currentCurves(await comparisonOf(unlimited)).map(({ id }) => id)).toEqual(['line']);
  });
});
