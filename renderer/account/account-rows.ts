import type { PageLine } from '../../sim/ledger/index.js';

/** Height of a line of the account [px], with its rule. */
export function lineHeight(compact: boolean): number {
  return compact ? 23 : 29;
}

/**
 * The lines of a side that are shown: all where there is room, else without those that are nil. What opens and closes the
 * account, what is numerical and what is unbooked always stand.
 */
export function shownLines(lines: readonly PageLine[], room: number): readonly PageLine[] {
  if (lines.length <= room) return lines;
  return lines.filter(
    ({ role, account, printed }) => role !== 'entry' || account === 'numerical' || Number(printed) !== 0,
  );
}
