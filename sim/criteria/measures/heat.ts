import { compensatedSum } from '../../core/sum.js';
import type { MeasureKind } from '../measurement.js';
import { isSameOf } from '../run-view.js';

/**
 * What was lost at a pair, a joint or a damper [J]: friction, rolling resistance, damping and impacts of its own. It is
 * the same for any boundary; on a belt it is not the work on the body.
 */
export const heat: MeasureKind<'heat'> = {
  unit: 'J',
  take: (criterion, view) =>
    view.over(criterion, (rows) => {
      const { of } = criterion;
      const accounts = view.recording.layout.accounts.filter((account) => isSameOf(account.of, of));
      const columns = accounts.flatMap(({ columns: { heat: lost } }) => (lost === undefined ? [] : [lost]));
      const value = compensatedSum(columns.map((column) => view.change(rows, column)));
      if (accounts.length > 0) return { value };
      return typeof of === 'string' ? { reason: `${of} has no account` } : { value, note: 'the two never met.' };
    }),
};
