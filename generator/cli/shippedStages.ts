import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Comparison } from '../loop/Comparison.ts';
import type { Window } from '../loop/Window.ts';
import type { Waveforms } from '../spice/Deck.ts';
import type { Stages } from './Stages.ts';

/** The real stages: the one place where the command line and the pipeline meet. */
export const shippedStages: Stages<SizedDesign, ReadonlyMap<string, Waveforms>, Comparison, Window> = {
  async decodeDocument(bytes, name) {
    const { decodeDocument } = await import('../spec/decodeDocument.ts');
    return decodeDocument(bytes, name);
  },
  async readSpecification(source) {
    const { readSpecification } = await import('../spec/readSpecification.ts');
    return readSpecification(source);
  },
  async starterSpecification() {
    const { starterSpecification } = await import('../spec/starterSpecification.ts');
    return starterSpecification();
  },
  async specificationSchema() {
    const { specificationSchema } = await import('../spec/specificationSchema.ts');
    return specificationSchema();
  },
  async resultSchema() {
    const { default: document } = await import('../emit/resultDocument.built.ts');
    return document;
  },
  async openEngine(kind, env) {
    if (kind === 'installed') {
      const { openInstalledEngine } = await import('../spice/engine/installed.ts');
      return openInstalledEngine({ env });
    }
    const { openEmbeddedEngine } = await import('../spice/engine/embedded.ts');
    return openEmbeddedEngine();
  },
  async design(request) {
    const { design } = await import('../design.ts');
    return design(request);
  },
  async alternative({ alternative }) {
    const { cycleRatio } = await import('../law/innerLoop.ts');
    const { min, max } = alternative.extremes;
    return {
      kind: alternative.law.kind,
      dampingIndexMin: min.dampingIndex,
      dampingIndexMax: max.dampingIndex,
      cycleRatioMin: cycleRatio(min.dampingIndex),
      cycleRatioMax: cycleRatio(max.dampingIndex),
    };
  },
  async ruleQuantities(design) {
    const { ruleQuantities } = await import('../rules/ruleQuantities.ts');
    return ruleQuantities(design);
  },
  async simulate(design, engine, options) {
    const { simulateDesign } = await import('../simulateDesign.ts');
    return simulateDesign(design, engine, options);
  },
  async result(design, rules, simulation) {
    const { designResult } = await import('../design.ts');
    return designResult(design, rules, simulation);
  },
  async files(design, result, waveforms) {
    const { designFiles } = await import('../designFiles.ts');
    return designFiles(design, result, waveforms);
  },
  async compare(request) {
    const { compare } = await import('../compare.ts');
    return compare(request);
  },
  async comparison(compared) {
    const { comparisonDocument } = await import('../emit/comparisonDocument.ts');
    return comparisonDocument(compared);
  },
  async comparisonFiles(compared) {
    const { comparisonFiles } = await import('../comparisonFiles.ts');
    return comparisonFiles(compared);
  },
  async window(request) {
    const { window } = await import('../window.ts');
    return window(request);
  },
  async windowDocument(found) {
    const { windowDocument } = await import('../emit/windowDocument.ts');
    return windowDocument(found);
  },
  async windowFiles(found) {
    const { windowFiles } = await import('../windowFiles.ts');
    return windowFiles(found);
  },
};
