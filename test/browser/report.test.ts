import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { reportPage } from '../../generator/report/reportPage.ts';
import { CHROMIUM, describeWith } from '../spice/support/require.ts';
import { idealSimulation, resultWith, sized } from '../unit/report/sampleDesign.ts';
import { Chromium } from './support/Chromium.ts';
import { labelsOutside } from './support/labelsOutside.ts';
import { leastContrast } from './support/leastContrast.ts';

const specification = `title: "bench supply <script>alert(1)</script> & 'quotes'"
input: 9 V to 72 V
output: 0.8 V to 30 V
inductance: 47 uH ± 20 %
frequency: 150 kHz ± 10 %
minimumOnTime: 300 ns
load: 0.3 A to 3 A
`;

describeWith([CHROMIUM], 'the report in a browser', () => {
  const folder = mkdtempSync(join(tmpdir(), 'counterslope-report-'));
  const file = join(folder, 'report.html');
  const url = pathToFileURL(file).href;
  let page: string;
  let browser: Chromium;
  let complaints: string[];
  let requests: string[];

  beforeAll(async () => {
    const design = await sized(specification);
    const { simulation, waveforms } = await idealSimulation(design);
    page = await reportPage({ design, result: resultWith(design, simulation), waveforms });
    writeFileSync(file, page);
    browser = await Chromium.open();
    browser.onEvent((method, params) => {
      if (method === 'Log.entryAdded') complaints.push((params.entry as { text: string }).text);
      if (method === 'Runtime.consoleAPICalled' || method === 'Runtime.exceptionThrown')
        complaints.push(method);
      if (method === 'Network.requestWillBeSent') requests.push((params.request as { url: string }).url);
    });
  });

  afterAll(async () => {
    await browser?.end();
    rmSync(folder, { recursive: true, force: true });
  });

  async function visit(target = url): Promise<void> {
    complaints = [];
    requests = [];
    await browser.visit(target);
  }

  async function asSeen(width: number, scheme: 'light' | 'dark', media = ''): Promise<void> {
    await browser.send('Emulation.setDeviceMetricsOverride', {
      width,
      height: 900,
      deviceScaleFactor: 1,
      mobile: false,
    });
    await browser.send('Emulation.setEmulatedMedia', {
      media,
      features: [{ name: 'prefers-color-scheme', value: scheme }],
    });
  }

  it('opens without a complaint and asks the network for nothing', async () => {
    await visit();
    expect(await browser.evaluate('document.title')).toContain('<script>alert(1)</script>');
    expect(await browser.evaluate('document.scripts.length')).toBe(0);
    expect(complaints).toEqual([]);
    expect(requests.filter((request) => request !== url && request !== 'data:,')).toEqual([]);
  });

  it('would be caught at what it must not do', async () => {
    const other = join(folder, 'other.html');
    const bad = '<img src="http://127.0.0.1:9/x.png"><p style="color:red">x</p><script>1</script></body>';
    writeFileSync(other, page.replace('</body>', bad));
    await visit(pathToFileURL(other).href);
    expect(complaints.some((text) => text.includes('style'))).toBe(true);
    expect(complaints.some((text) => text.includes('script'))).toBe(true);
    expect([...complaints, ...requests].some((text) => text.includes('127.0.0.1'))).toBe(true);
  });

  it('has its style in force', async () => {
    await visit();
    const border = 'getComputedStyle(document.querySelector(".title-block")).borderTopStyle';
    expect(await browser.evaluate(border)).toBe('solid');
  });

  it.each([360, 768, 1280])('fits into %i px without scrolling sideways', async (width) => {
    await asSeen(width, 'light');
    await visit();
    expect(await browser.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(width);
    const shown =
      'document.querySelectorAll("figure > svg").length / 2 === [...document.querySelectorAll("figure > svg")].filter((svg) => svg.getBoundingClientRect().width > 250).length';
    expect(await browser.evaluate(shown)).toBe(true);
  });

  it.each([
    [360, ''],
    [1280, ''],
    [672, 'print'],
  ])('keeps every label of a plot inside the plot, %i px %s', async (width, media) => {
    await asSeen(width, 'light', media);
    await visit();
    expect(await browser.evaluate(labelsOutside)).toEqual([]);
  });

  it.each(['light', 'dark'] as const)(
    'has text of at least 4.5 to 1 against its ground, %s',
    async (scheme) => {
      await asSeen(1280, scheme);
      await visit();
      const { ratio, text } = await browser.evaluate<{ ratio: number; text: string }>(leastContrast);
      expect(ratio, text).toBeGreaterThanOrEqual(4.5);
    },
  );

  it('changes its ground with the scheme', async () => {
    const ground = 'getComputedStyle(document.querySelector(".sheet")).backgroundColor';
    await asSeen(1280, 'light');
    await visit();
    const light = await browser.evaluate(ground);
    await asSeen(1280, 'dark');
    expect(await browser.evaluate(ground)).not.toBe(light);
  });

  it('prints on A4 with the title block at the foot of every sheet', async () => {
    await visit();
    const answer = await browser.send('Page.printToPDF', { preferCSSPageSize: true });
    const pdf = Buffer.from((answer as { data: string }).data, 'base64').toString('latin1');
    const sheets = pdf.match(/\/Type\s*\/Page\b(?!s)/g)?.length ?? 0;
    expect(sheets).toBeGreaterThanOrEqual(4);
    expect(sheets).toBeLessThanOrEqual(12);
    expect(pdf).toMatch(/\/MediaBox\s*\[\s*0 0 59[45][.\d]* 84[12]/);
  });
});
