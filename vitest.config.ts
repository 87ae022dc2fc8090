import type { PluginOption } from 'vite';
import { defineConfig } from 'vitest/config';
import { ClosingLine } from './build/closingLine.mjs';
import { ruleDeckVite } from './build/ruleCompiler.mjs';
import { templateVite } from './build/templateCompiler.mjs';

/** Pinned, so that every run draws the same; `COUNTERSLOPE_SEED=N` looks elsewhere. */
const seed = Number(process.env.COUNTERSLOPE_SEED ?? 20261201);

export default defineConfig({
  plugins: [templateVite(), ruleDeckVite() as PluginOption],
  test: {
    include: ['test/**/*.test.ts'],
    setupFiles: ['test/setup/pinnedSeed.ts'],
    provide: { seed },
    sequence: { seed },
    // An embedded engine takes half a gigabyte and a core: two files at a time, on any machine.
    maxWorkers: 2,
    testTimeout: 60_000,
    hookTimeout: 60_000,
    reporters: ['default', new ClosingLine(seed)],
  },
});
