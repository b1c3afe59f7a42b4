import { rotate, unit } from '../../core/vec.js';
import type { Load } from '../../mechanism/kinds/load.js';
import type { DrawingContext, Figure } from '../figure.js';
import { toPaper } from '../paper.js';
import { carried, turned } from '../pose.js';
import { forceArrow, turningArrow } from './arrow.js';

/** Length of a load's arrow on paper [px]: its value is in the item card, not in its length. */
const arrowLength = 34;

/** A load: filled arrow from its point of action, or a turning arrow. */
export function loadFigures(load: Load, { drawn, pixels }: DrawingContext): Figure[] {
  const key = { key: `load:${load.id}`, layer: 'forces', item: load.id } as const;
  if (load.kind === 'torque') {
    const sign = Math.sign(load.torque);
    return [{ ...key, live: (now) => turningArrow(toPaper(now.get(load.on)?.at ?? [0, 0], pixels), 15, sign) }];
  }
  return [
    {
      ...key,
      live: (now) => {
        const angle = load.follows === 'body' ? turned(load.on.of, drawn, now) : 0;
        const [ux, uy] = unit(rotate(load.force, angle));
        const at = toPaper(carried(load.on, drawn, now), pixels);
        return forceArrow(at, [ux * arrowLength, -uy * arrowLength]);
      },
    },
  ];
}
