import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { comparisonPage } from '../../generator/report/comparison/comparisonPage.ts';
import { CHROMIUM, describeWith } from '../spice/support/require.ts';
import { comparisonOf, exactBuck } from '../support/comparison.ts';
import { Chromium } from './support/Chromium.ts';
import { labelsOutside } from './support/labelsOutside.ts';
import { leastContrast } from './support/leastContrast.ts';

const outputs = { 'an output set by the customer': '0.8 V to 30 V', 'one known output': '5 V' } as const;

describeWith([CHROMIUM], 'the comparison in a browser', () => {
  const folder = mkdtempSync(join(tmpdir(), 'counterslope-comparison-'));
  const urlOf = (output: string) => pathToFileURL(join(folder, `${output.replace(/\W+/g, '-')}.html`)).href;
  let browser: Chromium;
  const complaints: string[] = [];
  const requests: string[] = [];

  beforeAll(async () => {
    for (const output of Object.values(outputs)) {
      const keys = { ...exactBuck, input: '6 V to 36 V', output, 'controller.senseLimit': '500 mV' };
      const comparison = await comparisonOf({ ...keys, title: '<script>alert(1)</script>' });
      writeFileSync(new URL(urlOf(output)), await comparisonPage(comparison));
    }
    browser = await Chromium.open();
    browser.onEvent((method, params) => {
      if (method === 'Log.entryAdded') complaints.push((params.entry as { text: string }).text);
      if (method === 'Network.requestWillBeSent') requests.push((params.request as { url: string }).url);
    });
  });

  afterAll(async () => {
    await browser?.end();
    rmSync(folder, { recursive: true, force: true });
  });

  async function seen(output: string, width: number, scheme = 'light', media = ''): Promise<void> {
    const metrics = { width, height: 900, deviceScaleFactor: 1, mobile: false };
    await browser.send('Emulation.setDeviceMetricsOverride', metrics);
    const features = [{ name: 'prefers-color-scheme', value: scheme }];
    await browser.send('Emulation.setEmulatedMedia', { media, features });
    await browser.visit(urlOf(output));
  }

  it.each(Object.values(outputs))('opens without a complaint and asks for nothing, %s', async (output) => {
    complaints.length = 0;
    requests.length = 0;
    await seen(output, 1280);
    expect(await browser.evaluate('document.title')).toContain('<script>alert(1)</script>');
    expect(await browser.evaluate('document.scripts.length')).toBe(0);
    expect(complaints).toEqual([]);
    expect(requests.filter((url) => url !== urlOf(output) && url !== 'data:,')).toEqual([]);
  });

  it.each([
    [360, ''],
    [768, ''],
    [1280, ''],
    [672, 'print'],
  ])('fits into %i px %s, every label inside its plot', async (width, media) => {
    for (const output of Object.values(outputs)) {
      await seen(output, width, 'light', media);
      expect(await browser.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(width);
      expect(await browser.evaluate(labelsOutside), output).toEqual([]);
    }
  });

  it.each(['light', 'dark'])('has text of at least 4.5 to 1 against its ground, %s', async (scheme) => {
    for (const output of Object.values(outputs)) {
      await seen(output, 1280, scheme);
      const { ratio, text } = await browser.evaluate<{ ratio: number; text: string }>(leastContrast);
      expect(ratio, text).toBeGreaterThanOrEqual(4.5);
    }
  });

  it.each(['light', 'dark'])('has tints in even steps of lightness, %s', async (scheme) => {
    await seen(outputs['an output set by the customer'], 1280, scheme);
    const colours = await browser.evaluate<string[]>(
      '[...Array(11).keys()].map((step) => getComputedStyle(document.documentElement).getPropertyValue("--t" + step).trim())',
    );
    const lights = colours.map(lightness);
    const step = (lights.at(-1)! - lights[0]!) / 10;
    expect(Math.abs(step)).toBeGreaterThan(0.05);
    lights.forEach((light, at) => {
      expect(light).toBeCloseTo(lights[0]! + at * step, 2);
    });
  });
});

/** L of OKLab (Ottosson 2020, from memory), of a colour as `#rrggbb`. */
function lightness(colour: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
  return 0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s;
}
