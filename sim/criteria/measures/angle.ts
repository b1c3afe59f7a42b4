import type { MeasureKind } from '../measurement.js';
import { bodyAt } from './body-state.js';

/** Angle of a body on the sheet, turns counted [rad]. */
export const angle: MeasureKind<'angle'> = {
  unit: 'rad',
  take: (criterion, view) => bodyAt(view, criterion, (state) => state.angle),
};
