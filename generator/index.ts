/**
 * The library: the pure functions of the pipeline, and the whole command line as one function.
 *
 * Nothing here imports a module of Node; what needs one is loaded by `main` when it runs.
 */
import type { main as commandLine } from './cli/main.ts';

export const main: typeof commandLine = async (...given) => (await import('./cli/main.ts')).main(...given);

export type { Surroundings } from './cli/Surroundings.ts';
