import type { Recording, StationError } from '../recording/recording.js';

/** How much coarser the second pass is. */
export const COARSER = 100;

/**
 * The auditor's own estimate of its error at every station: the difference to a second pass at 100 times the tolerance.
 * The first pass is better than that by about the same factor, so that this is on the safe side. A station that the second
 * pass does not reach has no estimate.
 */
export function estimateErrors(fine: Recording, coarse: Recording): StationError[] {
  const others = rowsByStation(coarse);
  return [...rowsByStation(fine)].flatMap(([station, row]) => {
    const other = others.get(station);
    return other === undefined ? [] : [{ station, ...difference(fine, row, coarse, other) }];
  });
}

function rowsByStation({ events }: Recording): Map<string, number> {
  return new Map(events.flatMap((event) => (event.kind === 'station' ? [[event.station, event.row] as const] : [])));
}

function difference(fine: Recording, row: number, coarse: Recording, other: number): Omit<StationError, 'station'> {
  const at = (recording: Recording, index: number) => (column: number) =>
    recording.rows[index * recording.layout.width + column];
  const [a, b] = [at(fine, row), at(coarse, other)];
  let position = 0;
  let speed = 0;
  fine.layout.bodies.forEach(({ columns }, i) => {
    const theirs = coarse.layout.bodies[i].columns;
    position = Math.max(position, Math.hypot(a(columns.x) - b(theirs.x), a(columns.y) - b(theirs.y)));
    speed = Math.max(speed, Math.hypot(a(columns.vx) - b(theirs.vx), a(columns.vy) - b(theirs.vy)));
  });
  return { time: Math.abs(a(0) - b(0)), position, speed };
}
