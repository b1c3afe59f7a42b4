import type { CheckResult } from './result.js';

/** What the command line returns to its caller. 4, an internal error, is never the status of a result. */
export type ExitStatus = 0 | 1 | 2 | 3;

/**
 * The exit status of a result:
 * 0 all criteria pass and the runs agree;
 * 1 a criterion fails, or could not be evaluated;
 * 2 the runs differ, a ledger does not close, the run is unaudited, or an error was found in it;
 * 3 the file is wrong.
 *
 * @param options.stepperOnly the user asked for the stepper alone: that nothing audits it is then as asked
 */
export function exitStatus(result: CheckResult, options: { stepperOnly?: boolean } = {}): ExitStatus {
  const errors = result.findings.filter(({ severity }) => severity === 'error');
  if (errors.some(({ pointer }) => pointer !== undefined)) return 3;
  const unaudited = result.verdict === 'unaudited' && !(options.stepperOnly ?? false);
  if (unaudited || result.verdict === 'differs' || errors.length > 0) return 2;
  return result.criteria.every(({ passes }) => passes === true) ? 0 : 1;
}
