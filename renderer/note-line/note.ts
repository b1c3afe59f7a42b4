import { itemNumbers } from '../../sim/drawing/items.js';
import { entryOf } from '../account/entry-of.js';
import { lineName } from '../account/names.js';
import { pickedSpan } from '../account/picked-span.js';
import { fixed } from '../format/quantity.js';
import type { Workbench } from '../state/workbench.svelte.js';

/** What goes on, in one line. */
export interface Note {
  kind: 'trouble' | 'work' | 'plain';
  text: string;
}

/** The most pressing thing to say: trouble, work under way, a problem of the file, the picked entry, or what to do next. */
export function noteOf(bench: Workbench): Note {
  const { drawing, run, view } = bench;
  if (bench.trouble !== '') return { kind: 'trouble', text: bench.trouble };
  if (drawing.reading) return { kind: 'work', text: 'Reading the file.' };
  if (bench.isRunning) return { kind: 'work', text: progressText(bench) };
  if (drawing.problem && (view.sheet === 1 || !drawing.mechanism))
    return { kind: drawing.errors > 0 ? 'trouble' : 'plain', text: problemText(bench) };
  if (!drawing.mechanism) return { kind: 'plain', text: 'Open a mechanism file, or drop one on the sheet.' };
  const picked = pickedText(bench);
  if (view.sheet === 2 && picked !== '') return { kind: 'plain', text: picked };
  if (run.recording === null) return { kind: 'plain', text: `${drawing.title}: F5 runs it.` };
  return { kind: 'plain', text: `Run ${run.number}: pick an entry of the account to see when and where it was.` };
}

/** How far each solver is; of one that is done nothing is said. */
function progressText({ run, second }: Workbench): string {
  const at = ({ time, duration }: typeof run) => `${fixed(time, 3)} s of at most ${fixed(duration, 3)} s`;
  const parts = [
    ...(run.status === 'running' ? [`Recording: ${at(run)}`] : []),
    ...(second.status === 'running' ? [`${run.status === 'running' ? 'auditor' : 'Auditor'}: ${at(second)}`] : []),
  ];
  return `${parts.join('; ')}.`;
}

function problemText({ drawing }: Workbench): string {
  const { problem, shown, problems, items } = drawing;
  if (!problem) return '';
  const item = problem.of.length > 0 ? `, item ${problem.of.map((id) => itemNumbers(items, id)).join(', ')}` : '';
  return `${shown + 1} of ${problems.length}${item}: ${problem.text}`;
}

function pickedText({ account, drawing, run, zoneOf }: Workbench): string {
  const { picked, page, printed, ledger } = account;
  if (!picked || !page || !printed || !ledger || !drawing.mechanism || !run.recording) return '';
  const span = pickedSpan(run.recording, page, picked);
  const places = entryOf(ledger, picked).flatMap((entry) => entry.places);
  const here = places.filter(
    ({ on, segment }) => picked.segment === undefined || (on === picked.on && segment === picked.segment),
  );
  const most = here.reduce<(typeof here)[number] | null>(
    (a, b) => (a === null || Math.abs(b.work) > Math.abs(a.work) ? b : a),
    null,
  );
  const zone = most === null ? null : zoneOf(most.at);
  return [
    `${lineName(picked, drawing.items, drawing.mechanism)}: ${picked.printed} ${printed.scale.unit}`,
    ...(zone === null ? [] : [`zone ${zone}`]),
    ...(span === null ? [] : [`from ${fixed(span[0], 3)} s to ${fixed(span[1], 3)} s`]),
  ].join(', ');
}
