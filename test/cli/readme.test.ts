import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { newFolder, run } from './program.ts';

const readme = readFileSync(join(import.meta.dirname, '../../README.md'), 'utf8');

/** Fenced blocks of a language, in order. */
function fences(language: string): string[] {
  return [...readme.matchAll(new RegExp(`^\`\`\`${language}\\n([\\s\\S]*?)^\`\`\`$`, 'gm'))].map(
    (match) => match[1]!,
  );
}

describe('the README', () => {
  test('has two commands in sh fences, one physical line each', () => {
    expect(fences('sh').map((fence) => fence.trim().split('\n').length)).toEqual([1, 1]);
  });

  test('shows what the program prints', async () => {
    const [first = ''] = fences('text').filter((fence) => fence.startsWith('$ npx counterslope '));
    const [command = '', ...printed] = first.split('\n');
    const words = command.slice('$ npx counterslope '.length).match(/"[^"]*"|\S+/g)!;
    const argv = words.map((word) => word.replaceAll('"', ''));
    const { stdout, code } = await run(argv, { cwd: await newFolder() });
    expect(code).toBe(0);
    expect(stdout).toBe(printed.join('\n'));
  });
});
