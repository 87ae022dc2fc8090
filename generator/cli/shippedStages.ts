import type { Stages } from './Stages.ts';

/** The real stages: the one place where the command line and the pipeline meet. */
export const shippedStages: Stages<never, never> = {
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
    const [{ resultSchema }, { toJSONSchema }] = await Promise.all([
      import('../emit/resultSchema.ts'),
      import('zod'),
    ]);
    return toJSONSchema(resultSchema);
  },
  async openEngine(kind, env) {
    if (kind === 'installed') {
      const { openInstalledEngine } = await import('../spice/engine/installed.ts');
      return openInstalledEngine({ env });
    }
    const { openEmbeddedEngine } = await import('../spice/engine/embedded.ts');
    return openEmbeddedEngine();
  },
  async design() {
    throw new Error('design is not wired yet');
  },
  async alternative() {
    throw new Error('design is not wired yet');
  },
  async ruleQuantities() {
    throw new Error('design is not wired yet');
  },
  async simulate() {
    throw new Error('design is not wired yet');
  },
  async result() {
    throw new Error('design is not wired yet');
  },
  async files() {
    throw new Error('design is not wired yet');
  },
};
