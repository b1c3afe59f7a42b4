import type { MeasureKind } from '../measurement.js';
import { atTouch } from './touch-figures.js';

/** Mass with which a pair meets along the normal at a touch [kg]: a blow loses ½ m (1 − e²) v². */
export const effectiveMass: MeasureKind<'effectiveMass'> = {
  unit: 'kg',
  take: (criterion, view) => atTouch(criterion, view, 'effectiveMass'),
};
