import type { Vec } from '../../core/vec.js';
import { inkFill, line, narrow, outline, paperFill, polygon, type DrawOperation } from '../operations.js';

/** Size of a pennant on paper [px]. */
export const pennantSize = { width: 19, height: 15 };

/**
 * A station's pennant, hung from the top of its pole at `at`; filled when its station is on the open page.
 *
 * @param side +1 flies to the right, −1 to the left
 */
export function pennant(at: Vec, id: string, filled: boolean, side: 1 | -1 = 1): DrawOperation[] {
  const { width, height } = pennantSize;
  const [x, y] = at;
  const flag: Vec[] = [
    [x, y],
    [x + side * width, y],
    [x + side * (width - 5), y + height / 2],
    [x + side * width, y + height],
    [x, y + height],
  ];
  const tone = filled ? 'paper' : 'ink';
  return [
    line([at, [x, y + height + 6]], outline),
    polygon(flag, { fill: filled ? inkFill : paperFill, stroke: narrow }),
    {
      kind: 'text',
      at: [x + side * (width / 2 - 1.5), y + height / 2],
      text: id,
      size: 12.5,
      weight: 600,
      tone,
      anchor: [0.5, 0.5],
    },
  ];
}
