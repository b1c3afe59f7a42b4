import type { MeasureKind } from '../measurement.js';
import { bodyAt } from './body-state.js';

/** Speed of a body's centre of mass [m/s]; at an impact, that before it. */
export const speed: MeasureKind<'speed'> = {
  unit: 'm/s',
  take: (criterion, view) => bodyAt(view, criterion, ({ vx, vy }) => Math.hypot(vx, vy)),
};
