import fc from 'fast-check';
import { inject } from 'vitest';

/** Every random test draws from one seed, printed at the end of the run: a failure comes back. */
fc.configureGlobal({ ...fc.readConfigureGlobal(), seed: inject('seed') });

declare module 'vitest' {
  interface ProvidedContext {
    seed: number;
  }
}
