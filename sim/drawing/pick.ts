import { toBody, type Vec } from '../core/vec.js';
import { buildTrack, nearestOnRun, newFoot } from '../geometry/index.js';
import type { DrawingContext } from './figure.js';
import { shapeOutline } from './kinds/body.js';
import { carried, type Poses } from './pose.js';

/**
 * The id of the item at a point of the sheet: the uppermost body around it, else the nearest joint, spring, damper or
 * track within reach. Null where there is none.
 *
 * @param reach [m]
 */
export function pickItem(context: DrawingContext, now: Poses, point: Vec, reach: number): string | null {
  const { mechanism } = context;
  const body = mechanism.bodies.findLast((each) => {
    const pose = now.get(each.id);
    if (!pose) return false;
    const local = toBody(pose.at, pose.angle, point);
    const outline = shapeOutline(each.shape);
    return outline.length > 0 ? isInside(local, outline) : distanceTo(local, each.centerOfMass) <= reach;
  });
  if (body) return body.id;
  const near = [...joints(context, now, point), ...links(context, now, point), ...tracks(context, point)];
  const [nearest] = near.filter(({ distance }) => distance <= reach).sort((a, b) => a.distance - b.distance);
  return nearest?.id ?? null;
}

interface Near {
  id: string;
  distance: number;
}

const distanceTo = (a: Vec, b: Vec) => Math.hypot(a[0] - b[0], a[1] - b[1]);

function isInside([x, y]: Vec, outline: readonly Vec[]): boolean {
  let inside = false;
  for (let i = 0, j = outline.length - 1; i < outline.length; j = i++) {
    const [[ax, ay], [bx, by]] = [outline[i], outline[j]];
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
  }
  return inside;
}

function joints({ mechanism, drawn }: DrawingContext, now: Poses, point: Vec): Near[] {
  return mechanism.joints.flatMap((joint) => {
    if (joint.kind !== 'pin' && joint.kind !== 'slide') return [];
    const of = joint.between[0] === 'ground' ? joint.between[1] : joint.between[0];
    return [{ id: joint.id, distance: distanceTo(point, carried({ of, at: joint.at }, drawn, now)) }];
  });
}

function links({ mechanism, drawn }: DrawingContext, now: Poses, point: Vec): Near[] {
  return [...mechanism.springs, ...mechanism.dampers].flatMap(({ id, between: [a, b] }) => {
    if (typeof a === 'string' || typeof b === 'string') return [];
    return [{ id, distance: toSegment(point, carried(a, drawn, now), carried(b, drawn, now)) }];
  });
}

function toSegment(p: Vec, a: Vec, b: Vec): number {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const square = dx * dx + dy * dy;
  const t = square === 0 ? 0 : Math.min(1, Math.max(0, ((p[0] - a[0]) * dx + (p[1] - a[1]) * dy) / square));
  return distanceTo(p, [a[0] + t * dx, a[1] + t * dy]);
}

function tracks({ mechanism }: DrawingContext, [x, y]: Vec): Near[] {
  return mechanism.tracks.map((track) => {
    const distances = buildTrack(track).runs.map((run) => Math.abs(nearestOnRun(run, x, y, newFoot()).distance));
    return { id: track.id, distance: Math.min(...distances) };
  });
}
