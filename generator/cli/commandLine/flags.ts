import { specificationFlags } from '../specificationFlags.ts';
import { type Command, commonFlags } from './Command.ts';
import type { Flag } from './Flag.ts';
import { ownFlags } from './ownFlags.ts';

/** Every flag there is: parser, help and messages speak of these only. */
export const flags: readonly Flag[] = [...specificationFlags, ...ownFlags];

/** The flags that a command takes, in the order of the help. */
export function flagsOf(command: Command): readonly Flag[] {
  return flags.filter((flag) => belongsTo(flag, command));
}

function belongsTo(flag: Flag, command: Command): boolean {
  if (flag.group === 'specification') return command.readsSpecification;
  return commonFlags.includes(flag.name) || command.flags.includes(flag.name);
}
