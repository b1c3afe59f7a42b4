import fc from 'fast-check';
import { distance, type Vec } from '../../../sim/core/vec.js';
import { newFoot, pointAt, type SmoothRun } from '../../../sim/geometry/index.js';
import type { Track, TrackSegment } from '../../../sim/mechanism/kinds/track.js';

/** A still track, free on the left. */
export function track(from: Vec, segments: TrackSegment[], more: Partial<Track> = {}): Track {
  return { id: 'track', from, segments, closed: false, side: 'left', surfaceSpeed: 0, ...more };
}

export const line = (...to: Vec): TrackSegment => ({ kind: 'line', to });
export const arc = (to: Vec, bulge: number): TrackSegment => ({ kind: 'arc', to, bulge });
export const spline = (...through: Vec[]): TrackSegment => ({ kind: 'spline', through });

/** Bulge of an arc that turns by `degrees`. */
export const bulgeOf = (degrees: number): number => Math.tan((degrees * Math.PI) / 720);

const coordinate = fc.double({ min: -2, max: 2, noNaN: true });
export const point: fc.Arbitrary<Vec> = fc.tuple(coordinate, coordinate);

/** One segment of any kind whose points are not too close together for their own good. */
export const segmentTrack: fc.Arbitrary<Track> = fc
  .oneof(
    fc.tuple(point, point).map(([a, b]) => track(a, [line(...b)])),
    fc
      .tuple(point, point, fc.double({ min: -3, max: 3, noNaN: true }))
      .map(([a, b, bulge]) => track(a, [arc(b, bulge)])),
    fc.array(point, { minLength: 3, maxLength: 7 }).map(([a, ...rest]) => track(a, [spline(...rest)])),
  )
  .filter((drawn) => {
    const corners = [drawn.from, ...drawn.segments.flatMap((s) => (s.kind === 'spline' ? s.through : [s.to]))];
    return corners.every((p, i) => i === 0 || distance(p, corners[i - 1]) > 0.1);
  });

/** Least distance to a run by brute force: dense sampling, then golden sections about the best sample. */
export function sampledDistance(run: SmoothRun, [x, y]: Vec, samples = 600): number {
  const foot = newFoot();
  const away = (s: number): number => {
    pointAt(run, s, foot);
    return Math.hypot(x - foot.x, y - foot.y);
  };
  let best = 0;
  for (let k = 1; k <= samples; k += 1) {
    if (away((run.length * k) / samples) < away((run.length * best) / samples)) best = k;
  }
  let low = (run.length * Math.max(best - 1, 0)) / samples;
  let high = (run.length * Math.min(best + 1, samples)) / samples;
  const golden = (Math.sqrt(5) - 1) / 2;
  for (let i = 0; i < 45; i += 1) {
    const a = high - golden * (high - low);
    const b = low + golden * (high - low);
    if (away(a) < away(b)) high = b;
    else low = a;
  }
  return Math.min(away(0.5 * (low + high)), away((run.length * best) / samples));
}

/** A random simple polygon: star-shaped about its centre, any corner out or in, counter-clockwise. */
export const star: fc.Arbitrary<Vec[]> = fc
  .tuple(
    point,
    fc.array(fc.tuple(fc.integer({ min: 5, max: 100 }), fc.integer({ min: 20, max: 100 })), {
      minLength: 4,
      maxLength: 14,
    }),
  )
  // A wedge of half a turn or more would put the centre outside.
  .filter(([, spokes]) => spokes.every(([wedge]) => 2.1 * wedge < spokes.reduce((sum, [each]) => sum + each, 0)))
  .map(([center, spokes]) => {
    const whole = spokes.reduce((sum, [wedge]) => sum + wedge, 0);
    let angle = 0;
    return spokes.map(([wedge, reach]): Vec => {
      angle += (2 * Math.PI * wedge) / whole;
      return [center[0] + (reach / 80) * Math.cos(angle), center[1] + (reach / 80) * Math.sin(angle)];
    });
  });
