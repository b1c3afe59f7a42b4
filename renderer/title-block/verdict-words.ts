import { boundText } from '../format/share.js';
import { endWords } from '../recorder/end-words.js';
import type { Workbench } from '../state/workbench.svelte.js';

/** The verdict in words, and what it rests on. */
export interface VerdictWords {
  word: string;
  reason: string;
}

export function verdictWords(bench: Workbench): VerdictWords {
  const { audit } = bench;
  if (audit.verdict === 'agrees') return { word: `Agrees within ${boundText(worstOf(bench))}`, reason: agreed(bench) };
  if (audit.verdict === 'differs') return differing(bench);
  return { word: 'Unaudited', reason: unauditedWhy(bench) };
}

const worstOf = ({ audit }: Workbench) => audit.worst?.figure.share ?? 0;

function agreed({ audit, view }: Workbench): string {
  return `auditor, ${audit.figures.length} figures${view.geometry.compact ? '' : ' compared'}`;
}

function differing(bench: Workbench): VerdictWords {
  const { audit, account } = bench;
  const { comparison } = audit;
  const word = comparison?.parting ? `Differs by ${boundText(worstOf(bench))}` : 'Differs';
  const one = comparison?.oneSided[0];
  if (comparison?.parting) return { word, reason: `from station ${account.mark(comparison.parting.station)} on` };
  if (one) return { word, reason: `only the ${one.reachedBy} reached station ${account.mark(one.station)}` };
  if (comparison && !comparison.closed.stepper) return { word, reason: 'the stepper’s account does not close' };
  if (comparison && !comparison.closed.auditor) return { word, reason: 'the auditor’s account does not close' };
  if (comparison && comparison.off.length > 0) return { word, reason: 'a run is not that of the document' };
  return { word, reason: 'what the method made or lost is over its limit' };
}

function unauditedWhy(bench: Workbench): string {
  const { run, second, drawing, audit } = bench;
  if (run.status === 'running') return `run ${run.number} is being recorded`;
  if (run.status === 'none') return drawing.errors > 0 ? 'the file has errors' : 'not run';
  if (second.status === 'running') return 'the auditor is at work';
  if (second.status === 'refused') return `not audited yet: ${refused(bench)}`;
  if (second.status === 'failed') return 'the auditor broke down';
  if (run.status === 'refused') return 'the stepper does not take it';
  if (run.status === 'failed') return 'the stepper broke down';
  if (run.status === 'halted' || second.status === 'halted') return 'halted';
  const ends = [run, second].map(({ recording }) => recording?.end ?? 'notSimulated');
  const stopped = ends.find((end) => end !== 'reachedEnd');
  if (stopped) return `${ends[0] === 'reachedEnd' ? 'auditor' : 'stepper'} ${endWords(stopped)}`;
  return audit.comparison?.stations.length === 0 ? 'no station that both reached' : '';
}

/** The elements that the auditor does not take, by their item numbers and names. */
function refused({ second, drawing }: Workbench): string {
  const names = second.refusals
    .flatMap(({ of }) => of)
    .map((id) => {
      const item = drawing.items.find((each) => each.id === id);
      return item ? `item ${item.number} ${item.name}` : id;
    });
  return [...new Set(names)].join(', ');
}
