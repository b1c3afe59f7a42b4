import { contactOf } from '../../recording/index.js';
import type { MeasureKind } from '../measurement.js';

/** Speed at which a pair slides, without its sign [m/s]; what is apart does not slide. */
export const slipSpeed: MeasureKind<'slipSpeed'> = {
  unit: 'm/s',
  take: ({ of, at }, view) =>
    view.at(at, ({ row }) => {
      const contact = contactOf(view.recording, of);
      const isApart = !contact || view.value(row, contact.columns.points) === 0;
      if (isApart) return { reason: `${of.join(' and ')} are apart at station ${at}, so that nothing slides` };
      return { value: Math.abs(view.value(row, contact.columns.slip)) };
    }),
};
