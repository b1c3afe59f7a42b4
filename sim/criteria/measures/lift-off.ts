import { contactOf } from '../../recording/index.js';
import type { CriterionOf, MeasureKind, Measurement } from '../measurement.js';
import { isSameOf, type Rows, type RunView } from '../run-view.js';

/**
 * Longest time a pair is apart within a span, once it has touched, at the start or later [s]. It is together at a touch,
 * at a parting, and at rows with a closed point (of a compliant pair, one that presses); a bounce is apart from one touch
 * to the next. A time that begins or ends at no event is only known to the distance of the rows.
 */
export const liftOff: MeasureKind<'liftOff'> = {
  unit: 's',
  take: (criterion, view) => view.over(criterion, (rows) => longestApart(criterion, view, rows)),
};

function longestApart({ of }: CriterionOf<'liftOff'>, view: RunView, { fromRow, toRow }: Rows): Measurement {
  const touches = new Set(view.touches(of).map(({ row }) => row));
  const partings = rowsOfPartings(of, view);
  const isClosed = closedAt(of, view);
  const start = view.time(fromRow);
  let since: number | null = null;
  let longest = 0;
  for (let row = 0; row <= toRow; row++) {
    const time = view.time(row);
    const cameTogether = isClosed(row) || partings.has(row);
    if (since !== null && !cameTogether) longest = Math.max(longest, time - Math.max(since, start));
    if (cameTogether || touches.has(row)) since = time;
  }
  if (since === null) return { reason: `${of.join(' and ')} never touched` };
  const isApart = since < view.time(toRow);
  return { value: longest, ...(isApart ? { note: 'the two are still apart at the end of the span.' } : {}) };
}

function rowsOfPartings(of: [string, string], view: RunView): ReadonlySet<number> {
  const partings = view.recording.events.filter((event) => event.kind === 'parts' && isSameOf(event.pair, of));
  return new Set(partings.map(({ row }) => row));
}

function closedAt(of: [string, string], view: RunView): (row: number) => boolean {
  const columns = contactOf(view.recording, of)?.columns;
  if (!columns) return () => false;
  const isCompliant = view.contactPair(of)?.compliant !== undefined;
  return (row) => view.value(row, columns.points) > 0 && !(isCompliant && view.value(row, columns.normal) <= 0);
}
