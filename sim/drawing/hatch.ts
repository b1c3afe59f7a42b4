import type { Vec } from '../core/vec.js';

/** Lines of one hatch: direction clockwise from the x axis [rad], spacing [px], shift across the lines [px]. */
export interface HatchLines {
  angle: number;
  spacing: number;
  shift?: number;
}

/** Parallel lines clipped to a simple polygon (even-odd rule). Returns x1, y1, x2, y2, ... */
export function hatchPolygon(points: readonly Vec[], { angle, spacing, shift = 0 }: HatchLines): number[] {
  const [ux, uy] = [Math.cos(angle), Math.sin(angle)];
  const along = points.map(([x, y]) => x * ux + y * uy);
  const across = points.map(([x, y]) => y * ux - x * uy);
  const ends: number[] = [];
  const first = Math.ceil((Math.min(...across) - shift) / spacing);
  for (let k = first; k * spacing + shift < Math.max(...across); k++) {
    const level = k * spacing + shift;
    const cuts = crossings(along, across, level);
    for (let i = 0; i + 1 < cuts.length; i += 2)
      for (const s of [cuts[i], cuts[i + 1]]) ends.push(s * ux - level * uy, s * uy + level * ux);
  }
  return ends;
}

/** Where the polygon's edges cross a level, in order along it. */
function crossings(along: readonly number[], across: readonly number[], level: number): number[] {
  const cuts: number[] = [];
  for (let i = 0, j = across.length - 1; i < across.length; j = i++) {
    if (across[i] > level === across[j] > level) continue;
    cuts.push(along[i] + ((level - across[i]) / (across[j] - across[i])) * (along[j] - along[i]));
  }
  return cuts.sort((a, b) => a - b);
}

export interface SideHatch {
  /** +1: on the right of the path as it runs on paper with y down; −1: on the left. */
  side: 1 | -1;
  spacing: number;
  depth: number;
}

/** Short slanted strokes along one side of a path: the mark of solid ground. Returns x1, y1, x2, y2, ... */
export function hatchSide(path: readonly Vec[], { side, spacing, depth }: SideHatch): number[] {
  const ends: number[] = [];
  let rest = spacing / 2;
  for (let i = 1; i < path.length; i++) {
    const [a, b] = [path[i - 1], path[i]];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (length === 0) continue;
    const [tx, ty] = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
    for (; rest <= length; rest += spacing) {
      const [x, y] = [a[0] + tx * rest, a[1] + ty * rest];
      ends.push(x, y, x + depth * (-ty * side - tx), y + depth * (tx * side - ty));
    }
    rest -= length;
  }
  return ends;
}
