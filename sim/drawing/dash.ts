import type { Vec } from '../core/vec.js';

/** Dash patterns, dash and gap by turns [px] (ISO 128-2, types 02, 04, 05, 09, at narrow width). */
export const dashes = {
  hidden: [6, 3.5],
  chain: [14, 3, 1.6, 3],
  phantom: [11, 2.6, 1.6, 2.6, 1.6, 2.6],
} as const;

/** Cuts a polyline into the dashes of a pattern; the pattern runs on around corners. Returns x1, y1, x2, y2, ... */
export function dashed(points: readonly Vec[], pattern: readonly number[], closed = false): number[] {
  const ends: number[] = [];
  const path = closed ? [...points, points[0]] : points;
  let index = 0;
  let left = pattern[0];
  for (let i = 1; i < path.length; i++) {
    const [a, b] = [path[i - 1], path[i]];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    for (let done = 0; done < length;) {
      const next = Math.min(length, done + left);
      if (index % 2 === 0) pushBetween(ends, a, b, done / length, next / length);
      left -= next - done;
      done = next;
      if (left <= 1e-9) left = pattern[++index % pattern.length];
    }
  }
  return ends;
}

function pushBetween(ends: number[], a: Vec, b: Vec, from: number, to: number): void {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  ends.push(a[0] + dx * from, a[1] + dy * from, a[0] + dx * to, a[1] + dy * to);
}
