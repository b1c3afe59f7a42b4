import type { Reporter, SerializedError, TestModule } from 'vitest/node';

/** Counts from the checks that ran before the tests (build, types, lint), so that one line speaks for all. */
function earlier(name: string): number {
  return Number(process.env[name] ?? 0);
}

/**
 * Prints `N passed, N failed` as the last line of a run. A file that does not load and an error outside any test count
 * as failures; tests left out are listed by name, so that none is left out silently.
 */
export default class CountReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly SerializedError[]): void {
    const tests = modules.flatMap((module) => [...module.children.allTests()]);
    const broken = modules.filter((module) => module.errors().length > 0).length;
    const inState = (state: string) => tests.filter((test) => test.result().state === state);
    const unfinished = inState('pending').length;
    const failed = inState('failed').length + unfinished + broken + errors.length + earlier('CHECKS_FAILED');
    const passed = inState('passed').length + earlier('CHECKS_PASSED');
    const left = inState('skipped').map((test) => `  not run: ${test.fullName}\n`);
    process.once('exit', () => process.stdout.write(`${left.join('')}${passed} passed, ${failed} failed\n`));
  }
}
