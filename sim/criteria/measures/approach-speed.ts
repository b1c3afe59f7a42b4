import type { MeasureKind } from '../measurement.js';
import { atTouch } from './touch-figures.js';

/** Speed at which a pair closes at a touch, along the normal, just before the impact [m/s]. */
export const approachSpeed: MeasureKind<'approachSpeed'> = {
  unit: 'm/s',
  take: (criterion, view) => atTouch(criterion, view, 'approachSpeed'),
};
