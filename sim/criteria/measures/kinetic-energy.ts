import { kineticEnergy as kineticEnergyOf } from '../../ledger/index.js';
import type { MeasureKind } from '../measurement.js';
import { ofBody } from './body-state.js';

/** Kinetic energy of a body, or of all bodies inside the boundary, ½ m v² + ½ I ω² [J]; at an impact, that before it. */
export const kineticEnergy: MeasureKind<'kineticEnergy'> = {
  unit: 'J',
  take: ({ of, at }, view) =>
    view.at(at, ({ row }) => {
      const { recording, mechanism } = view;
      if (of !== 'all') return ofBody(view, of, (body) => ({ value: kineticEnergyOf(recording, [body], row) }));
      const inside = recording.layout.bodies.filter(({ id }) => mechanism.system.includes(id));
      return { value: kineticEnergyOf(recording, inside, row) };
    }),
};
