import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { contentSecurityPolicy } from '../../../generator/emit/text/contentSecurityPolicy.ts';
import { jsonDocument } from '../../../generator/emit/text/jsonDocument.ts';
import { reportPage } from '../../../generator/report/reportPage.ts';
import { toolVersion } from '../../../generator/report/toolVersion.ts';
import styleTemplate from '../../../templates/_report-style.html.hbs';
import { hostileTitles } from '../emit/text/hostileTitles.ts';
import { idealSimulation, oneOutput, resultWith, sized, unknownOutput } from './sampleDesign.ts';

async function pageOf(text: string, slopeError?: number): Promise<string> {
  const design = await sized(text);
  if (slopeError === undefined)
    return reportPage({ design, result: resultWith(design, null), waveforms: null });
  const { simulation, waveforms } = await idealSimulation(design, slopeError);
  return reportPage({ design, result: resultWith(design, simulation), waveforms });
}

/** A title goes in as it is: the reader of specifications would refuse or mend the worst of them. */
async function pageTitled(title: string): Promise<string> {
  const design = await untitled;
  const { request } = design;
  const titled = {
    ...design,
    request: { ...request, specification: { ...request.specification, title } },
  };
  return reportPage({ design: titled, result: resultWith(titled, null), waveforms: null });
}

const untitled = sized(unknownOutput);

/** The page's words, markup left out. */
function wordsOf(page: string): string {
  return page
    .replace(/<style>.*?<\/style>/s, ' ')
    .replace(/<[^>]*>/g, ' ')
    .replace(/&nbsp;|\u00a0/g, ' ')
    .replace(/\s+/g, ' ');
}

describe('the report', () => {
  it('is the same to the byte when it is made twice', async () => {
    expect(await pageOf(oneOutput, 0)).toBe(await pageOf(oneOutput, 0));
  });

  it('stays far below a megabyte with all its waveforms', async () => {
    const page = await pageOf(unknownOutput, 0);
    expect(page.length).toBeGreaterThan(50_000);
    expect(page.length).toBeLessThan(400_000);
  });

  it('allows its own style by hash and no script at all', async () => {
    const page = await pageOf(oneOutput, 0);
    const style = /<style>(.*?)<\/style>/s.exec(page)![1]!;
    expect(style).toBe(styleTemplate({}));
    const policy = await contentSecurityPolicy({ scripts: [], styles: [style] });
    const content = /http-equiv="Content-Security-Policy" content="([^"]*)"/.exec(page)![1]!;
    expect(content.replaceAll('&#x27;', "'").replaceAll('&#x3D;', '=')).toBe(policy);
    expect(page).not.toMatch(/<script|\sstyle=|\son[a-z]+=/i);
  });

  it('refers to nothing outside itself', async () => {
    const page = await pageOf(oneOutput, 0);
    expect(page).not.toMatch(/https?:|url\(|@import|\ssrc=/);
    expect([...page.matchAll(/href="([^"]*)"/g)].map(([, target]) => target)).toEqual(['data:,', '#answer']);
  });

  it('describes every plot in words, by ids that no other element has', async () => {
    const page = await pageOf(oneOutput, 0);
    const ids = [...page.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id!);
    expect(new Set(ids).size).toBe(ids.length);
    const plots = [...page.matchAll(/<svg class="[^"]*"[^>]*role="img" aria-labelledby="(\S+) (\S+)">/g)];
    // Damping, ramp and its deviation, spread, current and its decay: each wide and narrow.
    expect(plots).toHaveLength(12);
    for (const [, title, description] of plots) {
      expect(page).toMatch(new RegExp(`<title id="${title}">[^<]{10,}</title>`));
      expect(page).toMatch(new RegExp(`<desc id="${description}">[^<]{30,}</desc>`));
    }
  });

  it.each(hostileTitles)('shows a title as text, whatever it is: %j', async (title) => {
    const elements = (page: string) => page.match(/<[a-z][a-z0-9]*/gi);
    const page = await pageTitled(title);
    expect(elements(page)).toEqual(elements(await pageTitled('plain')));
    expect(page).not.toContain('<script');
  });

  it('has the title block filled from the sheet, and empty fields to write in', async () => {
    const page = await pageOf(`${oneOutput}sheet: { owner: Works, number: CS-7 }\ndate: 2026-12-01\n`);
    const fields = [...page.matchAll(/<div class="\w+"><dt>([^<]*)<\/dt><dd>([^<]*)<\/dd><\/div>/g)];
    expect(fields.map(([, name, text]) => [name, text])).toEqual([
      ['Legal owner', 'Works'],
      ['Title', ''],
      ['Identification number', 'CS-7'],
      ['Revision', ''],
      ['Document type', 'Slope compensation, design sheet'],
      ['Creator', ''],
      ['Approval person', ''],
      ['Date of issue', '2026-12-01'],
    ]);
  });

  it('names the version of the package', () => {
    const file = new URL('../../../package.json', import.meta.url);
    expect(toolVersion).toBe(JSON.parse(readFileSync(file, 'utf8')).version);
  });

  it('carries the digest of the specification as result.json has it', async () => {
    const design = await sized(oneOutput);
    const text = jsonDocument(resultWith(design, null).specification);
    const digest = Buffer.from(await crypto.subtle.digest('SHA-256', Buffer.from(text))).toString('hex');
    expect(await pageOf(oneOutput)).toContain(`<code>${digest}</code>`);
  });
});

describe('the first screen', () => {
  it('says where the loop is damped least, and by how much', async () => {
    const words = wordsOf(await pageOf(oneOutput, 0));
    expect(words).toMatch(
      /Stable over the whole region: damping index at least 0\.8(18|19|2\d), at 8 V in and 63 % duty\./,
    );
  });

  it('admits that a fixed ramp is as well damped for one known output', async () => {
    expect(wordsOf(await pageOf(oneOutput))).toContain('following Vin buys no damping over this region');
    expect(wordsOf(await pageOf(unknownOutput))).toMatch(/A fixed ramp .* would over-compensate/);
  });

  it('says no when the gain is too small for a stable loop', async () => {
    const words = wordsOf(await pageOf(`${unknownOutput}ramp: { gain: 0.3 }\n`));
    expect(words).toMatch(/Not stable at every duty to 90 %: the damping index falls to 0\.3\d+/);
    expect(words).toContain('Failed stability');
  });

  it('calls a loop that is stable but misses its goal by its name', async () => {
    expect(wordsOf(await pageOf(`${oneOutput}ramp: { gain: 0.3 }\n`))).toMatch(
      /Stable over the whole region: .*, below the goal of 0\.818\./,
    );
  });

  it('says whether the simulation agreed, and that it was not run where it was not', async () => {
    expect(wordsOf(await pageOf(oneOutput, 0))).toContain('Agrees: all 18 figures are within their limits');
    expect(wordsOf(await pageOf(oneOutput, 0.05))).toMatch(/Disagrees: \d+ of 18 figures/);
    expect(wordsOf(await pageOf(oneOutput, 0.05))).toMatch(/Stable over .* The simulation disagrees\./);
    expect(wordsOf(await pageOf(oneOutput))).toMatch(/Stable over .* Not simulated\./);
    expect(wordsOf(await pageOf(oneOutput))).toContain('Not run: nothing below is checked by simulation.');
  });

  it('warns of an input that is no longer harmless', async () => {
    const high = unknownOutput.replace('36 V', '72 V');
    expect(wordsOf(await pageOf(high))).toContain('The input reaches 72 V, above the 60 V d.c.');
    expect(wordsOf(await pageOf(unknownOutput))).not.toContain('above the 60 V d.c.');
  });
});
