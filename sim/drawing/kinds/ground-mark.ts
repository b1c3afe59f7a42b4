import type { Vec } from '../../core/vec.js';
import { hatchSide } from '../hatch.js';
import { line, segments, wide, type DrawOperation } from '../operations.js';

/**
 * The mark of the fixed frame: a wide line through a point, hatched beyond it.
 *
 * @param solid unit vector on paper, into the solid
 * @param half half the length of the line [px]
 */
export function groundMark(at: Vec, solid: Vec, half = 11): DrawOperation[] {
  const [tx, ty] = [-solid[1], solid[0]];
  const path: Vec[] = [
    [at[0] - tx * half, at[1] - ty * half],
    [at[0] + tx * half, at[1] + ty * half],
  ];
  return [segments(hatchSide(path, { side: -1, spacing: 5, depth: 5 })), line(path, wide)];
}
