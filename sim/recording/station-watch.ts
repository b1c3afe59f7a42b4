import type { Vec } from '../core/vec.js';
import type { Station } from '../mechanism/kinds/station.js';
import type { Mechanism } from '../mechanism/model.js';

/** Motion of the bodies as a solver has it now, in SI: centre of mass, angle, velocity. */
export interface Motion {
  x(body: number): number;
  y(body: number): number;
  angle(body: number): number;
  vx(body: number): number;
  vy(body: number): number;
}

/** A happening that can reach a station by itself. */
export type Happening = 'touch' | 'parts' | 'sticks' | 'slips';

interface Watched {
  station: Station;
  reached: boolean;
  left: number;
  /** Sign on the side it was last seen clear of zero; 0: not yet. */
  side: 1 | -1 | 0;
  value: ((motion: Motion) => number) | null;
  /** Whether a passage at this motion counts (a crossing must lie on the line drawn). */
  counts: (motion: Motion) => boolean;
  /** A value nearer to zero than this has no side: [m], [m/s] or [rad]. */
  blur: number;
}

/**
 * Keeps watch for the stations of a mechanism: which are still to come, and the smooth functions whose change of sign
 * reaches them. Both solvers use it with their own root finding; it decides only what the document means.
 */
export class StationWatch {
  private readonly watched: Watched[];
  private readonly reachedTimes = new Map<string, number>();

  constructor(mechanism: Mechanism, start: Motion) {
    const { speed } = restScales(mechanism);
    this.watched = mechanism.stations.map((station) => watch(station, mechanism, start, speed));
    this.settle(start);
  }

  /** Time at which a station was reached [s]; undefined while it has not been. */
  timeOf(id: string): number | undefined {
    return this.reachedTimes.get(id);
  }

  isReached(id: string): boolean {
    return this.reachedTimes.has(id);
  }

  /** Numbers of the stations that a smooth function can reach now. */
  smooth(): number[] {
    return this.watched.flatMap((item, index) => (item.value && this.isOpen(item) ? [index] : []));
  }

  /** Value of a station's function times the sign it had: it turns negative when the station is passed. */
  signedValue(index: number, motion: Motion): number {
    const item = this.watched[index];
    return item.side === 0 || !item.value ? Infinity : item.side * item.value(motion);
  }

  /** How near to zero its function counts as passed. */
  blurOf(index: number): number {
    return this.watched[index].blur;
  }

  /** The function of station `index` passed zero at `time`; returns the station's id if that reaches it. */
  passed(index: number, motion: Motion, time: number): string | null {
    const item = this.watched[index];
    if (item.side !== 0) item.side = item.side === 1 ? -1 : 1;
    if (!this.isOpen(item) || !item.counts(motion)) return null;
    return this.count(item, time);
  }

  /** Takes the motion at the end of a step: on which side every function is. */
  settle(motion: Motion): void {
    for (const item of this.watched) {
      if (!item.value) continue;
      const value = item.value(motion);
      if (Math.abs(value) > item.blur) item.side = value > 0 ? 1 : -1;
    }
  }

  /** Ids of the stations that a happening of a pair reaches. */
  happened(kind: Happening, pair: readonly [string, string], time: number): string[] {
    return this.watched.flatMap((item) => {
      const { when } = item.station;
      if (when.kind !== kind || !isSamePair(when.pair, pair) || !this.isOpen(item)) return [];
      return this.count(item, time) ?? [];
    });
  }

  /** Times of stations that are given by a time and are still to come [s]. */
  times(): number[] {
    return this.watched.flatMap(({ station: { when }, reached }) =>
      when.kind === 'time' && !reached ? [when.time] : [],
    );
  }

  /** Ids of the stations of a kind that `test` says are reached now. */
  reach(test: (station: Station) => boolean, time: number): string[] {
    return this.watched.flatMap((item) =>
      this.isOpen(item) && test(item.station) ? (this.count(item, time) ?? []) : [],
    );
  }

  /** Bodies (or 'all') whose coming to rest is still waited for. */
  resting(): string[] {
    return this.watched.flatMap((item) => {
      const { when } = item.station;
      return when.kind === 'rests' && this.isOpen(item) ? [when.of] : [];
    });
  }

  private isOpen({ reached, station }: Watched): boolean {
    return !reached && (station.after === undefined || this.reachedTimes.has(station.after));
  }

  private count(item: Watched, time: number): string | null {
    item.left -= 1;
    if (item.left > 0) return null;
    item.reached = true;
    const { id } = item.station;
    this.reachedTimes.set(id, time);
    // What waits for this one looks for a passage of its own, not for the one that reached this.
    for (const waiting of this.watched) if (waiting.station.after === id) waiting.side = 0;
    return id;
  }
}

export const isSamePair = (a: readonly [string, string], b: readonly [string, string]): boolean =>
  (a[0] === b[0] && a[1] === b[1]) || (a[0] === b[1] && a[1] === b[0]);

/** Share of the scales below which something is at rest. */
export const AT_REST = 1e-6;

/** Speed [m/s] and acceleration [m/s²] that coming to rest is measured by: a fall through the mechanism's extent. */
export function restScales(mechanism: Mechanism): { speed: number; acceleration: number } {
  const g = Math.hypot(...mechanism.gravity);
  const speed = Math.sqrt(g * mechanism.extent) || greatestSpeed(mechanism) || 1;
  return { speed, acceleration: g || speed ** 2 / (mechanism.extent || 1) };
}

function greatestSpeed({ bodies }: Mechanism): number {
  return Math.max(0, ...bodies.map(({ velocity }) => Math.hypot(...velocity)));
}

function watch(station: Station, mechanism: Mechanism, start: Motion, speed: number): Watched {
  const { when } = station;
  const base = { station, reached: false, left: 'count' in when ? when.count : 1, side: 0 as const };
  const none = { ...base, value: null, counts: () => true, blur: 0 };
  const indexOf = (id: string): number => mechanism.bodies.findIndex((body) => body.id === id);
  if (when.kind === 'turns') {
    const body = indexOf(when.of);
    const [dx, dy] = unit(when.along);
    return { ...none, value: (m) => m.vx(body) * dx + m.vy(body) * dy, blur: 1e-9 * speed };
  }
  if (when.kind === 'angle') {
    const body = indexOf(when.of);
    return { ...none, value: (m) => m.angle(body) - when.passes, blur: 1e-10 };
  }
  if (when.kind !== 'crosses') return none;
  const at = pointOf(when.point.at, indexOf(when.point.of), start);
  const [from, to] = when.line;
  const [tx, ty] = unit([to[0] - from[0], to[1] - from[1]]);
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const along = (m: Motion): number => (at(m)[0] - from[0]) * tx + (at(m)[1] - from[1]) * ty;
  return {
    ...none,
    value: (m) => (at(m)[1] - from[1]) * tx - (at(m)[0] - from[0]) * ty,
    counts: (m) => along(m) >= 0 && along(m) <= length,
    blur: 1e-10 * mechanism.extent,
  };
}

function unit([x, y]: Vec): Vec {
  const size = Math.hypot(x, y) || 1;
  return [x / size, y / size];
}

/** Sheet position of a point fixed to a body, given as drawn. */
function pointOf([x, y]: Vec, body: number, start: Motion): (motion: Motion) => Vec {
  if (body < 0) return () => [x, y];
  const [c0, s0] = [Math.cos(start.angle(body)), Math.sin(start.angle(body))];
  const dx = x - start.x(body);
  const dy = y - start.y(body);
  const lx = c0 * dx + s0 * dy;
  const ly = -s0 * dx + c0 * dy;
  return (m) => {
    const [c, s] = [Math.cos(m.angle(body)), Math.sin(m.angle(body))];
    return [m.x(body) + c * lx - s * ly, m.y(body) + s * lx + c * ly];
  };
}
