import type { Vec } from '../core/vec.js';
import { circle, inkFill, line, narrow, outline, paperFill, type DrawOperation } from './operations.js';
import type { Box } from './paper.js';

export const balloonRadius = 12;
const pitch = 2 * balloonRadius + 10;
/** Distance of a row of balloons from what is drawn [px]. */
const clear = 34;

/** An item's place on the drawing: where its leader ends [px], and whether on a surface (dot) or on a line (arrow). */
export interface BalloonAnchor {
  number: number;
  at: Vec;
  onLine: boolean;
}
export interface Balloon extends BalloonAnchor {
  center: Vec;
  /** The way its row or column goes on. */
  flow: Vec;
}

/**
 * Puts balloons around their items, aligned: a few neighbours stand in a row above them in the order of their items; a
 * cluster of many is shared out to a column on either side and the row above, so that leaders don't cross.
 *
 * @param around the box [px, y down] of what is drawn between two x
 */
export function placeBalloons(
  anchors: readonly BalloonAnchor[],
  around: (left: number, right: number) => Box,
): Balloon[] {
  const sorted = [...anchors].sort((a, b) => a.at[0] - b.at[0] || a.at[1] - b.at[1]);
  const groups: BalloonAnchor[][] = [];
  for (const anchor of sorted) {
    const group = groups[groups.length - 1];
    if (group && anchor.at[0] - mean(group, 0) < (group.length / 2 + 0.5) * pitch) group.push(anchor);
    else groups.push([anchor]);
  }
  return apart(groups.flatMap((group) => (group.length > 4 ? ring(group, around) : row(group, around))));
}

/** Moves a balloon on in its row or column until it covers none before it. */
export function apart(balloons: readonly Balloon[]): Balloon[] {
  const placed: Balloon[] = [];
  for (const balloon of balloons) {
    const { flow } = balloon;
    let [x, y] = balloon.center;
    const covers = ({ center }: Balloon) => Math.hypot(center[0] - x, center[1] - y) < 2 * balloonRadius + 2;
    while (placed.some(covers)) [x, y] = [x + flow[0] * 4, y + flow[1] * 4];
    placed.push({ ...balloon, center: [x, y] });
  }
  return placed;
}

function row(group: readonly BalloonAnchor[], around: (left: number, right: number) => Box): Balloon[] {
  const middle = mean(group, 0) + 14;
  const half = ((group.length - 1) * pitch) / 2;
  const y = around(middle - half - pitch, middle + half + pitch).low - clear;
  return group.map((anchor, i) => ({ ...anchor, flow: [1, 0], center: [middle - half + i * pitch, y] }));
}

/** A third to the left, a third to the right, the rest above. */
function ring(group: readonly BalloonAnchor[], around: (left: number, right: number) => Box): Balloon[] {
  const side = Math.ceil(group.length / 3);
  const reach = 4 * pitch;
  const box = around(group[0].at[0] - reach, group[group.length - 1].at[0] + reach);
  const column = (part: readonly BalloonAnchor[], x: number): Balloon[] => {
    const byHeight = [...part].sort((a, b) => a.at[1] - b.at[1]);
    const top = mean(part, 1) - ((part.length - 1) * pitch) / 2;
    return byHeight.map((anchor, i) => ({ ...anchor, flow: [0, 1], center: [x, top + i * pitch] }));
  };
  const above = group.slice(side, group.length - side);
  return [
    ...column(group.slice(0, side), box.left - clear),
    ...(above.length > 0 ? row(above, () => box) : []),
    ...column(group.slice(group.length - side), box.right + clear),
  ];
}

function mean(group: readonly BalloonAnchor[], axis: 0 | 1): number {
  return group.reduce((sum, { at }) => sum + at[axis], 0) / group.length;
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
  const ring = picked
    ? circle(center, balloonRadius, { stroke: outline, fill: { tone: 'marker' } })
    : circle(center, balloonRadius, { stroke: { ...outline, width: 1.3 }, fill: paperFill });
  return [
    line([start, at], narrow),
    end,
    ring,
    { kind: 'text', at: center, text: String(number), size: 14, weight: 500, tone: 'ink', anchor: [0.5, 0.5] },
  ];
}
