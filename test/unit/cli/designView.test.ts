import { describe, expect, it } from 'vitest';
import type { Alternative } from '../../../generator/cli/Stages.ts';
import { plainPaint } from '../../../generator/cli/terminal/paint.ts';
import { designView } from '../../../generator/cli/view/design.ts';
import type { Result, RuleOutcome } from '../../../generator/emit/resultSchema.ts';
import { sampleResult } from './sampleResult.ts';

const fixedLaw: Alternative = {
  kind: 'fixed',
  dampingIndexMin: 0.8226,
  dampingIndexMax: 4.8,
  cycleRatioMin: -0.216,
  cycleRatioMax: 0.792,
};

function view(changes: Partial<Result> = {}, directory: string | null = 'ramp'): string {
  const options = { alternative: fixedLaw, directory, paint: plainPaint };
  return designView({ ...sampleResult, ...changes }, options);
}

function failing(severity: RuleOutcome['severity'], id: string): RuleOutcome {
  const figures = { measured: 4.2, limit: 3.1, unit: 'V' };
  return { id, severity, passed: false, ...figures, reason: 'r', source: 's' };
}

describe('the view of a design', () => {
  it('says on one screen whether it is stable, with what, and whether the simulation agrees', async () => {
    await expect(view()).toMatchFileSnapshot('../../golden/cli/design-view.txt');
  });

  it('stays within 80 columns and 24 lines, however much there is to say', () => {
    const rules = Array.from({ length: 9 }, (_, index) => failing('error', `rule-number-${index}`));
    const parts = Array.from({ length: 40 }, (_, index) => ({
      ...sampleResult.parts[0]!,
      reference: `R${index}`,
    }));
    const title = '斜'.repeat(300);
    const text = view({ rules, parts, specification: { ...sampleResult.specification, title } });
    const lines = text.trimEnd().split('\n');
    expect(lines.length).toBeLessThanOrEqual(24);
    expect(Math.max(...lines.map((line) => [...line].length))).toBeLessThanOrEqual(80);
    expect([...lines[0]!].length).toBeLessThanOrEqual(40);
  });

  it('says that every duty is assumed possible when the output is not known', () => {
    expect(view().replace(/\s+/g, ' ')).toContain('output not known: each is assumed possible');
    const region = { ...sampleResult.region, outputVoltage_V: [5, 5] as [number, number] };
    expect(view({ region })).not.toContain('assumed possible');
  });

  it('begins the line of a loop that is not stable with the word', () => {
    const text = view({ stability: { ...sampleResult.stability, dampingIndexMin: 0.43 } });
    expect(text).toMatch(/^failed +not stable everywhere: x only 0\.430/m);
    expect(text).not.toMatch(/^stable/m);
  });

  it('puts failed rules before warnings, and says where the reason is to be found', () => {
    const text = view({ rules: [failing('warning', 'high-input'), failing('error', 'ramp-headroom')] });
    expect(text).toMatch(/^failed +rule ramp-headroom: 4\.20 V, limit 3\.10 V\nwarning +rule high-input/m);
    expect(text).toContain('counterslope rules explain ramp-headroom');
  });

  it('begins the line of a simulation that disagrees with the word', () => {
    const decks = sampleResult.simulation!.decks.map((check) => ({
      ...check,
      errorRatio: 0.18,
      passed: false,
    }));
    const text = view({ simulation: { ...sampleResult.simulation!, passed: false, decks } });
    expect(text).toMatch(/^failed +simulation: 2 of 2 figures/m);
  });

  it('says that no simulation was run, and that no file was written', () => {
    const text = view({ simulation: null }, null);
    expect(text).toMatch(/^simulation +not run$/m);
    expect(text).toMatch(/^files +none written/m);
  });

  it('shows a title that would move the cursor as harmless text', () => {
    const title = 'a\u001b[2Jb\u202e';
    const text = view({ specification: { ...sampleResult.specification, title } });
    expect(text).toContain('a\\u001b[2Jb\\u202e');
  });
});
