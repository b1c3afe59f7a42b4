import type { Vec } from '../../core/vec.js';
import { circle, inkFill, narrow, paperFill, polygon, type DrawOperation } from '../operations.js';

/** The quartered disc of a centre of mass: two opposite quarters filled. */
export function massCenterMark(at: Vec, radius = 5.5): DrawOperation[] {
  const quarter = (from: number): Vec[] => {
    const arc = Array.from({ length: 9 }, (_, i): Vec => {
      const angle = from + (i / 8) * (Math.PI / 2);
      return [at[0] + radius * Math.cos(angle), at[1] + radius * Math.sin(angle)];
    });
    return [at, ...arc];
  };
  return [
    circle(at, radius, { fill: paperFill }),
    polygon(quarter(-Math.PI / 2), { fill: inkFill }),
    polygon(quarter(Math.PI / 2), { fill: inkFill }),
    circle(at, radius, { stroke: narrow }),
  ];
}
