import type { Stages } from './Stages.ts';
import type { Surroundings } from './Surroundings.ts';
import type { Console } from './terminal/openConsole.ts';

/** What a command works with besides its arguments. */
export interface Session {
  readonly surroundings: Surroundings;
  readonly console: Console;
  readonly stages: Stages;
}
