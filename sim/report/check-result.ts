import type { Problem } from '../core/problem.js';
import { evaluateCriteria } from '../criteria/index.js';
import { handCheck } from '../ledger/index.js';
import type { Comparison } from '../ledger/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Finding, Recording } from '../recording/index.js';
import { comparisonResult } from './comparison-result.js';
import { onlyFinite } from './finite.js';
import type { CheckResult, ResultFinding } from './result.js';
import { bookedRun } from './booked-run.js';
import { distinct, runsFindings } from './run-findings.js';
import { runResult } from './run-result.js';

/** The auditor's run, and what comparing the stepper's with it found; no comparison where the stepper did not run. */
export interface Audit {
  run: Recording;
  comparison: Comparison | null;
}

/** All that a check found out about one file. */
export interface CheckInput {
  /** Name of the file, as the user gave it. */
  file: string;
  title: string;
  /** Nothing where the file has errors. */
  mechanism: Mechanism | null;
  /** The stepper's run; nothing where it did not run. */
  stepper: Recording | null;
  /** Nothing where the auditor did not run. */
  audit?: Audit | null;
  /** What reading the file found. */
  problems?: readonly Problem[];
  /** What was found before a run, such as kinds that are not simulated. */
  findings?: readonly Finding[];
}

/**
 * The result of a check, `joulewright-result/1`. Every number in it is finite: one that is not becomes 0 and a finding of
 * code `non-finite`. Criteria are judged on the auditor's run where it came to its end, and on the stepper's otherwise. Where
 * nothing audits the run, the verdict is `unaudited`, with a finding that says so.
 */
export function checkResult(input: CheckInput): CheckResult {
  const { mechanism, stepper, audit = null } = input;
  const comparison = audit?.comparison ?? null;
  const verdict = comparison?.verdict ?? 'unaudited';
  const [stepped, audited] = [stepper, audit?.run].map((run) => (mechanism && run ? bookedRun(mechanism, run) : null));
  const runs = [stepped, audited].filter((run) => run !== null);
  const judge = audit?.run.end === 'reachedEnd' ? audit.run : stepper;
  const judged = mechanism ? evaluateCriteria(mechanism, judge) : { criteria: [], findings: [] };
  const findings = [
    ...(input.findings ?? []),
    ...(mechanism ? runsFindings(mechanism, runs) : []),
    ...(comparison?.findings ?? []),
    ...judged.findings,
    ...(mechanism && verdict === 'unaudited' ? [unaudited(audit)] : []),
  ];
  return onlyFinite({
    format: 'joulewright-result/1',
    file: input.file,
    title: input.title,
    verdict,
    findings: [...(input.problems ?? []).map(problemFinding), ...distinct(findings)],
    stepper: mechanism && stepped && runResult(mechanism, stepped),
    auditor: mechanism && audited && runResult(mechanism, audited),
    comparison: comparison && comparisonResult(comparison),
    handCheck: mechanism && stepper ? handCheck(mechanism, stepper) : [],
    criteria: judged.criteria,
  });
}

function unaudited(audit: Audit | null): Finding {
  const text = audit
    ? 'The audit is not whole: what it did not reach is the word of one solver alone.'
    : 'No auditor has run this mechanism: the figures are the stepper’s alone, and nothing independent agrees with them yet.';
  return { severity: 'note', code: 'unaudited', text, of: [] };
}

function problemFinding({ severity, code, text, of, pointer }: Problem): ResultFinding {
  return { severity, code, text, of, pointer };
}
