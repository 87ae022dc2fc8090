/** A rule deck compiled by the build: see `build/ruleCompiler.mjs`. */
declare module '*.xml' {
  const rules: readonly import('./RuleDeck.ts').Rule[];
  export default rules;
}

/** The one-file build of the expression library, which comes without types of its own. */
declare module 'mathjs/lib/browser/math.js' {
  const library: Pick<typeof import('mathjs'), 'parse' | 'unit'>;
  export default library;
}
