/** A rule deck compiled by the build: see `build/ruleCompiler.mjs`. */
declare module '*.xml' {
  const rules: readonly import('./RuleDeck.ts').Rule[];
  export default rules;
}
