import type { Vec } from '../../core/vec.js';
import { inkFill, line, polygon, type DrawOperation, type Stroke, lineWidth } from '../operations.js';

const shaft: Stroke = { width: lineWidth.outline, tone: 'ink' };

/** A force: filled arrow from its point of action. Too short a one is only its head. */
export function forceArrow(from: Vec, vector: Vec, head = 9): DrawOperation[] {
  const length = Math.hypot(vector[0], vector[1]);
  if (length < 1) return [];
  const [tx, ty] = [vector[0] / length, vector[1] / length];
  const tip: Vec = [from[0] + vector[0], from[1] + vector[1]];
  const size = Math.min(head, length);
  const base: Vec = [tip[0] - size * tx, tip[1] - size * ty];
  const half = size * 0.34;
  const barbs: Vec[] = [
    [base[0] - half * ty, base[1] + half * tx],
    [base[0] + half * ty, base[1] - half * tx],
  ];
  return [line([from, base], shaft), polygon([tip, ...barbs], { fill: inkFill })];
}

/** A torque or a drive: an arc of an arrow around a centre, + counter-clockwise. */
export function turningArrow(at: Vec, radius: number, sign: number): DrawOperation[] {
  const [from, sweep] = [Math.PI * 0.15, Math.PI * 1.35];
  const direction = sign < 0 ? 1 : -1;
  const arc = Array.from({ length: 25 }, (_, i): Vec => {
    const angle = -Math.PI / 2 + direction * (from + (i / 24) * sweep - sweep / 2 - from);
    return [at[0] + radius * Math.cos(angle), at[1] + radius * Math.sin(angle)];
  });
  const [end, before] = [arc[24], arc[23]];
  const length = Math.hypot(end[0] - before[0], end[1] - before[1]);
  const tangent: Vec = [(end[0] - before[0]) / length, (end[1] - before[1]) / length];
  const barb = (s: number): Vec => [end[0] - s * 3 * tangent[1], end[1] + s * 3 * tangent[0]];
  const tip: Vec = [end[0] + tangent[0] * 8, end[1] + tangent[1] * 8];
  return [line(arc, shaft), polygon([tip, barb(1), barb(-1)], { fill: inkFill })];
}
