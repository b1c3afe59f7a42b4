import { add, left, scale, type Vec } from '../../core/vec.js';
import { pointAt, trackGap, type SmoothRun, type TrackPath } from '../../geometry/index.js';
import type { Shape } from '../kinds/body.js';
import { outlineOf, reachOf } from './outline.js';

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
 * Height of the origin at which the shape touches the run without going in. On a straight run that is the height of the
 * origin over the shape's lowest point; more where the run bends up beside it, less where it falls away under a corner.
 */
function heightToTouch(shape: Shape, run: SmoothRun, path: TrackPath, raised: (height: number) => Pose): number {
  const { points, radius } = outlineOf(shape);
  const lowest = points.reduce(
    (height, point) => Math.max(height, radius - point[1]),
    points.length > 0 ? -Infinity : 0,
  );
  const reach = reachOf({ points, radius });
  const side = path.side === 'right' ? 'right' : 'left';
  const alone: TrackPath = { ...path, side, runs: [run], corners: [], closed: run.closed };
  const goesIn = (height: number): boolean => trackGap({ shape, ...raised(height) }, alone).gap < -1e-12 * reach;
  const isClear = !goesIn(lowest);
  if (reach === 0 || (isClear && goesIn(lowest - 1e-9 * reach))) return lowest;
  const low = isClear ? lowest - 2 * reach : lowest;
  return goesIn(low) ? leastClear(goesIn, low, low + 2 * reach, 1e-13 * reach) : lowest;
}

/** The least height, to within `slack`, that is clear: halves the interval between one that goes in and one that does not. */
function leastClear(goesIn: (height: number) => boolean, from: number, to: number, slack: number): number {
  let low = from;
  let high = to;
  while (high - low > slack) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (goesIn(middle)) low = middle;
    else high = middle;
  }
  return high;
}
