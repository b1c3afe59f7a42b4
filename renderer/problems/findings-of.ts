import { ledgerFindings } from '../../sim/ledger/index.js';
import type { Finding } from '../../sim/recording/recording.js';
import type { Workbench } from '../state/workbench.svelte.js';

const order = { error: 0, warning: 1, note: 2 };

/** What was found of both runs, of what they compare to, and of the criteria: each once, the gravest first. */
export function findingsOf({ run, second, account, audit, drawing }: Workbench): Finding[] {
  const system = drawing.mechanism?.system ?? [];
  const found = [
    ...run.refusals,
    ...second.refusals,
    ...(run.recording ? ledgerFindings(run.recording, account.ledger ? [account.ledger] : [], system) : []),
    ...(second.recording && second.status !== 'running'
      ? ledgerFindings(second.recording, audit.ledger ? [audit.ledger] : [], system)
      : []),
    ...(audit.comparison?.findings ?? []),
    ...audit.criteria.findings,
  ];
  const isFirst = ({ code, text }: Finding, i: number) =>
    found.findIndex((other) => other.code === code && other.text === text) === i;
  return found.filter(isFirst).sort((a, b) => order[a.severity] - order[b.severity]);
}
