import type { Command } from '../commandLine/Command.ts';
import { compareCommand } from './compare.ts';
import { designCommand } from './design.ts';
import { initCommand } from './init.ts';
import { rulesCommand } from './rules.ts';
import { schemaCommand } from './schema.ts';
import { simulateCommand } from './simulate.ts';
import { windowCommand } from './window.ts';

/** Every command, in the order of the help; a new one is its file and a line here. */
export const commands: readonly Command[] = [
  designCommand,
  compareCommand,
  windowCommand,
  simulateCommand,
  rulesCommand,
  initCommand,
  schemaCommand,
];

/** Known by name, and not there yet. */
export const laterCommands: readonly string[] = ['loop', 'tolerance', 'sweep'];
