import type { Vec } from '../core/vec.js';
import { circle, inkFill, line, narrow, outline, paperFill, type DrawOperation } from './operations.js';

export const balloonRadius = 12;

/** An item's place on the drawing: where its leader ends [px], and whether on an outline (dot inside, arrow on a line). */
export interface BalloonAnchor {
  number: number;
  at: Vec;
  onLine: boolean;
}
export interface Balloon extends BalloonAnchor {
  center: Vec;
}

/**
 * Puts balloons above their items, aligned in rows: items whose balloons would be close share the highest one's row and
 * are spread along it in the order of their items, so that leaders don't cross.
 *
 * @param roof the y [px, down] above which a balloon must be at an x, given the half width around it
 */
export function placeBalloons(anchors: readonly BalloonAnchor[], roof: (x: number, half: number) => number): Balloon[] {
  const pitch = 2 * balloonRadius + 11;
  const sorted = [...anchors].sort((a, b) => a.at[0] - b.at[0] || a.at[1] - b.at[1]);
  const groups: BalloonAnchor[][] = [];
  for (const anchor of sorted) {
    const group = groups[groups.length - 1];
    if (group && anchor.at[0] - mean(group) < (group.length / 2 + 0.5) * pitch) group.push(anchor);
    else groups.push([anchor]);
  }
  return groups.flatMap((group) => {
    const middle = mean(group) + 14;
    const width = (group.length - 1) * pitch;
    const y = roof(middle, width / 2 + pitch) - 34;
    return group.map((anchor, i) => ({ ...anchor, center: [middle - width / 2 + i * pitch, y] as Vec }));
  });
}

function mean(group: readonly BalloonAnchor[]): number {
  return group.reduce((sum, { at }) => sum + at[0], 0) / group.length;
}

/** A balloon: circle and number, with a leader that ends in a dot on a surface and an arrow on a line. */
export function balloonOperations({ number, at, center, onLine }: Balloon, picked = false): DrawOperation[] {
  const [dx, dy] = [at[0] - center[0], at[1] - center[1]];
  const length = Math.hypot(dx, dy) || 1;
  const [ux, uy] = [dx / length, dy / length];
  const start: Vec = [center[0] + ux * balloonRadius, center[1] + uy * balloonRadius];
  const barb = (side: number): Vec => [at[0] - 7 * ux - side * 2.2 * uy, at[1] - 7 * uy + side * 2.2 * ux];
  const end: DrawOperation = onLine
    ? { kind: 'line', points: [at, barb(1), barb(-1)], closed: true, fill: inkFill }
    : circle(at, 2.2, { fill: inkFill });
  return [
    line([start, at], narrow),
    end,
    circle(center, balloonRadius, { fill: paperFill }),
    circle(center, balloonRadius, picked ? { stroke: outline, fill: { tone: 'marker', tint: 0.62 } } : { stroke: { ...outline, width: 1.3 } }), // prettier-ignore
    { kind: 'text', at: center, text: String(number), size: 14, weight: 500, tone: 'ink', anchor: [0.5, 0.5] },
  ];
}
