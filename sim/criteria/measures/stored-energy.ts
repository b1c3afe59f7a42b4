import type { AccountSpec } from '../../recording/index.js';
import type { MeasureKind } from '../measurement.js';
import { isSameOf, type RunView } from '../run-view.js';

/**
 * Energy held at a station [J]: by a spring or a compliant pair, from relaxed; by a body's weight, counted from the
 * origin of the sheet, −m g·r of its centre of mass.
 */
export const storedEnergy: MeasureKind<'storedEnergy'> = {
  unit: 'J',
  take: ({ of, at }, view) =>
    view.at(at, ({ row }) => {
      const stored = storeOf(view, of)?.columns.stored;
      if (stored !== undefined) {
        const isWeight = view.mechanism.bodies.some(({ id }) => id === of);
        const note = 'height is counted from the origin of the sheet.';
        return { value: view.value(row, stored), ...(isWeight ? { note } : {}) };
      }
      if (typeof of === 'string') return { reason: `${of} has no account that stores energy` };
      const isRigid = view.contactPair(of)?.compliant === undefined;
      if (isRigid) return { reason: `${of.join('/')} is a rigid contact, which stores nothing` };
      return { value: 0, note: `${of.join(' and ')} never met.` };
    }),
};

function storeOf(view: RunView, of: string | [string, string]): AccountSpec | undefined {
  return view.recording.layout.accounts.find(
    (account) => account.columns.stored !== undefined && isSameOf(account.of, of),
  );
}
