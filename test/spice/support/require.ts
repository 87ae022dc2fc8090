import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';
import { describe, it } from 'vitest';

/** A tool of the machine that some tests need, and how it comes onto a machine. */
export interface Tool {
  readonly name: 'ngspice' | 'gnucap' | 'chromium';
  readonly install: string;
}

export const NGSPICE: Tool = { name: 'ngspice', install: 'apt-get install ngspice' };
export const GNUCAP: Tool = { name: 'gnucap', install: 'apt-get install gnucap' };
export const CHROMIUM: Tool = { name: 'chromium', install: 'apt-get install chromium' };

export function isInstalled(tool: Tool): boolean {
  return (process.env.PATH ?? '').split(delimiter).some((folder) => {
    try {
      accessSync(join(folder, tool.name), constants.X_OK);
      return folder !== '';
    } catch {
      return false;
    }
  });
}

/** Tools whose absence is a failure: `COUNTERSLOPE_REQUIRE=ngspice,gnucap`. */
export function isRequired(tool: Tool, list = process.env.COUNTERSLOPE_REQUIRE ?? ''): boolean {
  return list
    .split(',')
    .map((name) => name.trim())
    .includes(tool.name);
}

/**
 * A `describe` whose tests need tools of the machine.
 *
 * Without one of them its tests are skipped, and the title says why and what enables them; where
 * `COUNTERSLOPE_REQUIRE` names the tool, its absence fails instead.
 */
export function describeWith(tools: readonly Tool[], title: string, body: () => void): void {
  const missing = tools.filter((tool) => !isInstalled(tool));
  const required = missing.filter((tool) => isRequired(tool));
  if (missing.length === 0) {
    describe(title, body);
  } else if (required.length > 0) {
    it(title, () => {
      throw new Error(
        `COUNTERSLOPE_REQUIRE names what is not installed: ${required.map(enabledBy).join(', ')}`,
      );
    });
  } else {
    describe.skip(`${title} [skipped: no ${missing.map(enabledBy).join(', ')}]`, body);
  }
}

function enabledBy(tool: Tool): string {
  return `${tool.name} (${tool.install})`;
}
