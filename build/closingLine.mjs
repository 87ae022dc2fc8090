/**
 * Closes a test run with `N passed, N failed, N skipped` alone on the last line, seeds before it.
 *
 * A file that does not load and an error outside any test count as failures: no test of theirs is there
 * to be counted.
 */
export class ClosingLine {
  constructor(seed) {
    this.seed = seed;
  }

  onTestRunEnd(modules, unhandledErrors) {
    const counts = { passed: 0, failed: unhandledErrors.length, skipped: 0 };
    for (const module of modules) {
      counts.failed += module.errors().length;
      for (const test of module.children.allTests()) count(counts, test.result().state);
    }
    // At exit, for the other reporters are still writing theirs.
    process.once('exit', () => {
      process.stdout.write(`\nseed ${this.seed}\n${closingLine(counts)}\n`);
    });
  }
}

function count(counts, state) {
  if (state === 'passed' || state === 'failed') counts[state] += 1;
  else counts.skipped += 1;
}

export function closingLine({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed, ${skipped} skipped`;
}
