import { entriesOf, workOf } from '../accounts.js';
import type { MeasureKind } from '../measurement.js';

/** Work of an account on the bodies inside the boundary [J]: below nil where it takes energy from them. */
export const work: MeasureKind<'work'> = {
  unit: 'J',
  take: (criterion, view) =>
    view.over(criterion, (rows) => {
      const found = entriesOf(view, view.ledger(rows), criterion.account);
      if ('reason' in found) return found;
      return { value: workOf(found.entries), ...(found.note === undefined ? {} : { note: found.note }) };
    }),
};
