import { expect, test, vi } from 'vitest';
import { accepted, least, refused } from './reading.ts';

vi.mock('yaml', () => {
  throw new Error('the YAML parser is loaded');
});

test('flags alone, sound or not, do not load the YAML parser', async () => {
  const { specification } = await accepted({ flags: { '--vin': '8 V', '--fs': '1 MHz' } });
  expect(specification.converter).toBe('buck');
  expect(await refused({ flags: { '--vin': '8' } })).toHaveLength(2);
});

test('a document does', async () => {
  await expect(accepted({ text: least })).rejects.toThrow();
});
