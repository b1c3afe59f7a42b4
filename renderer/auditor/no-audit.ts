import { endWords } from '../recorder/end-words.js';
import type { Workbench } from '../state/workbench.svelte.js';

/** Why the auditor has not judged the whole run, in a sentence; nothing where it has, or where there is no run. */
export function noAuditWhy({ run, second, audit }: Workbench): string {
  if (run.status === 'none' || run.status === 'running' || second.status === 'running') return '';
  if (second.status === 'refused') return second.failure;
  if (second.status === 'failed') return `The auditor broke down: ${second.failure}`;
  if (run.status === 'refused' || run.status === 'failed')
    return 'There is no run of the stepper to hold the audit against.';
  if (second.status === 'halted')
    return 'The audit was halted: what it did not reach is the word of the stepper alone.';
  if (second.recording && second.recording.end !== 'reachedEnd')
    return `The auditor’s run ${endWords(second.recording.end)}: what it did not reach is the word of the stepper alone.`;
  return audit.comparison?.stations.length === 0 ? 'There is no station that both runs reached.' : '';
}
