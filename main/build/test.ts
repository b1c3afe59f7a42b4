import { npmRun } from './run.js';

/** Everything that must hold before a change is taken: build, types, lint, then every test. Each check counts as one. */
const checks = ['build', 'typecheck', 'lint'] as const;

const failed = checks.filter((check) => {
  console.log(`\n── ${check}`);
  const status = npmRun(check);
  if (status !== 0) console.error(`${check} failed with status ${status}.`);
  return status !== 0;
});

console.log('\n── tests');
const status = npmRun('test:all', {
  CHECKS_PASSED: String(checks.length - failed.length),
  CHECKS_FAILED: String(failed.length),
});
process.exitCode = failed.length > 0 ? 1 : status;
