import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { designSample, differences, sampleNames, samplesFolder } from '../../build/samples.mjs';

// `npm run samples` writes them anew: look at the difference before you commit it.

test('there are at least three samples', () => {
  expect(sampleNames().length).toBeGreaterThanOrEqual(3);
});

test.each(sampleNames())('%s is designed again, in another folder, byte for byte', (name) => {
  const folder = mkdtempSync(join(tmpdir(), 'counterslope-sample-'));
  try {
    designSample(name, join(folder, 'design'));
    expect(differences(join(samplesFolder, name, 'design'), join(folder, 'design'))).toEqual([]);
  } finally {
    rmSync(folder, { recursive: true });
  }
});
