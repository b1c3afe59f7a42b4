import { add, left, scale, type Vec } from '../../core/vec.js';
import { convexParts, pointAt, trackGap, type SmoothRun, type TrackPath } from '../../geometry/index.js';
import type { Shape } from '../kinds/body.js';

export interface Pose {
  at: Vec;
  angle: number;
}

/**
 * The pose of a body laid on a track: its y axis along the normal on the free side at that place (on the left where both
 * sides are free), its x axis square to it, and its origin over the place, just so high that it touches.
 *
 * @param at distance along the track [m], 0 to its length
 */
export function restPose(shape: Shape, path: TrackPath, at: number): Pose {
  const { run, s } = place(path, at);
  const foot = pointAt(run, s);
  const isRight = path.side === 'right';
  const along = Math.atan2(foot.ty, foot.tx);
  const angle = isRight ? wrapped(along + Math.PI) : along;
  const normal = scale(left([foot.tx, foot.ty]), isRight ? -1 : 1);
  const raised = (height: number): Pose => ({ at: add([foot.x, foot.y], scale(normal, height)), angle });
  return raised(heightToTouch(shape, run, path, raised));
}

/** The smooth run a distance along the track lies on; at a corner, the run that starts there. */
function place(path: TrackPath, at: number): { run: SmoothRun; s: number } {
  const starts = path.runs.map((run) => {
    const s = at - run.offset;
    return { run, s: path.closed && s < 0 ? s + path.length : s };
  });
  return starts.findLast(({ run, s }) => s >= 0 && s <= run.length) ?? starts[starts.length - 1];
}

const wrapped = (angle: number): number => (angle > Math.PI ? angle - 2 * Math.PI : angle);

/**
 * Height of the origin at which the shape touches the run without going in: that of its lowest point on a straight or
 * convex run, and more where the run bends up beside it.
 */
function heightToTouch(shape: Shape, run: SmoothRun, path: TrackPath, raised: (height: number) => Pose): number {
  const parts = convexParts(shape);
  if (parts.length === 0) return 0;
  const points = parts.flatMap((part) => part.points.map((point) => ({ point, radius: part.radius })));
  const lowest = Math.max(...points.map(({ point, radius }) => radius - point[1]));
  const reach = Math.max(...points.map(({ point, radius }) => radius + Math.hypot(point[0], point[1])));
  const alone: TrackPath = { ...path, runs: [run], corners: [], closed: run.closed };
  const goesIn = (height: number): boolean => trackGap({ shape, ...raised(height) }, alone).gap < -1e-12 * reach;
  if (reach === 0 || !goesIn(lowest)) return lowest;
  let low = lowest;
  let high = lowest + reach;
  for (let i = 0; i < 60 && high - low > 1e-13 * reach; i += 1) {
    const middle = (low + high) / 2;
    if (goesIn(middle)) low = middle;
    else high = middle;
  }
  return high;
}
