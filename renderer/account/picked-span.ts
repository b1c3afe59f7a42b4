import type { PageLine } from '../../sim/ledger/index.js';
import type { Recording } from '../../sim/recording/recording.js';
import { contactOf, timeOfRow, valueAt } from '../../sim/recording/reader.js';
import type { Page } from '../state/account.svelte.js';

/** A line of nobody's is one for all accounts of its name. */
const same = (a: PageLine['of'], b: PageLine['of']) => b === null || [a].flat().join() === [b].flat().join();

/** When an entry's work was done on a page: from the first to the last row at which its account changed [s]. */
export function pickedSpan(recording: Recording, { from, to }: Page, line: PageLine): [number, number] | null {
  const specs = recording.layout.accounts.filter(({ account, of, cause }) => {
    return account === line.account && same(of, line.of) && (line.cause === undefined || cause === line.cause);
  });
  if (specs.length === 0 || line.role !== 'entry') return null;
  const contact = Array.isArray(line.of) && line.segment !== undefined ? contactOf(recording, line.of) : undefined;
  const columns = specs.flatMap((spec) => spec.columns.work);
  const work = (row: number) => columns.reduce((sum, column) => sum + valueAt(recording, row, column), 0);
  const least = 1e-6 * Math.abs(line.amount);
  let span: [number, number] | null = null;
  for (let row = from.row + 1; row <= to.row; row++) {
    const isOnSegment = !contact || valueAt(recording, row, contact.columns.segment) === line.segment;
    if (!isOnSegment || Math.abs(work(row) - work(row - 1)) <= least) continue;
    span = [span?.[0] ?? timeOfRow(recording, row - 1), timeOfRow(recording, row)];
  }
  return span;
}
