import type { Vec } from '../../core/vec.js';
import type { Latch } from '../../mechanism/kinds/latch.js';
import type { DrawingContext, Figure } from '../figure.js';
import { line, outline } from '../operations.js';
import { toPaper } from '../paper.js';

/** A latch: a pawl at the joint it holds, as drawn. */
export function latchFigures(latch: Latch, { mechanism, pixels, drawn }: DrawingContext): Figure[] {
  const joint = mechanism.joints.find((each) => each.id === latch.joint);
  if (!joint || !('between' in joint)) return [];
  const body = joint.between.find((id) => id !== 'ground');
  const place = 'at' in joint ? joint.at : drawn.get(body ?? '')?.at;
  if (!place) return [];
  const [x, y] = toPaper(place, pixels);
  const pawl: Vec[] = [
    [x, y - 16],
    [x + 14, y - 22],
    [x + 6, y - 10],
    [x + 3, y - 4],
    [x, y - 16],
  ];
  return [{ key: `latch:${latch.id}`, layer: 'joints', on: 'ground', operations: [line(pawl, outline)] }];
}
