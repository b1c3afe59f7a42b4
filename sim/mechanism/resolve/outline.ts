import { norm, toSheet, type Vec } from '../../core/vec.js';
import { boxCorners, camOutline } from '../../geometry/index.js';
import type { Shape } from '../kinds/body.js';
import type { Pose } from './rest.js';

/** Points that, each swelled by `radius`, have the shape within their hull; none for a shape without outline. */
export interface Outline {
  points: Vec[];
  radius: number;
}

/** The outline of a shape in body coordinates. Nothing is cut into convex parts for it, which takes time. */
export function outlineOf(shape: Shape): Outline {
  switch (shape.kind) {
    case 'none':
      return { points: [], radius: 0 };
    case 'particle':
      return { points: [[0, 0]], radius: 0 };
    case 'disc':
      return { points: [[0, 0]], radius: shape.radius };
    case 'bar':
      return {
        points: [
          [-shape.length / 2, 0],
          [shape.length / 2, 0],
        ],
        radius: shape.width / 2,
      };
    case 'box':
      return { points: boxCorners(shape.width, shape.height), radius: 0 };
    case 'polygon':
      return { points: shape.points, radius: 0 };
    case 'cam':
      return { points: camOutline(shape), radius: 0 };
  }
}

/** No point of the shape is farther from the body's origin [m]. */
export const reachOf = ({ points, radius }: Outline): number =>
  points.reduce((most, point) => Math.max(most, radius + norm(point)), 0);

/** Points on the sheet whose box is the box around the body. */
export const boxPoints = ({ points, radius }: Outline, { at, angle }: Pose): Vec[] =>
  points.flatMap((point): Vec[] => {
    const [x, y] = toSheet(at, angle, point);
    return [
      [x - radius, y - radius],
      [x + radius, y + radius],
    ];
  });
