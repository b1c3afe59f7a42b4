import { subtract, rotate, toBody, toSheet, type Vec } from '../core/vec.js';
import type { Body } from '../mechanism/kinds/body.js';
import type { PointOn } from '../mechanism/kinds/joint.js';
import type { Mechanism } from '../mechanism/model.js';
import { poseAtTime } from '../recording/reader.js';
import type { Recording } from '../recording/recording.js';

/** Where a body's origin is on the sheet [m] and how it is turned [rad]. */
export interface BodyPose {
  at: Vec;
  angle: number;
}
export type Poses = ReadonlyMap<string, BodyPose>;

export function drawnPoses(mechanism: Mechanism): Poses {
  return new Map(mechanism.bodies.map(({ id, at, angle }) => [id, { at, angle }]));
}

/** Where every body is at a time of a run [s]; bodies the run does not know stay as drawn. */
export function posesAt(mechanism: Mechanism, recording: Recording, time: number): Poses {
  const specs = new Map(recording.layout.bodies.map((spec) => [spec.id, spec]));
  return new Map(
    mechanism.bodies.map((body) => {
      const spec = specs.get(body.id);
      const known = spec !== undefined && recording.rowCount > 0;
      return [body.id, known ? originPose(body, poseAtTime(recording, spec, time)) : body];
    }),
  );
}

/** A recording follows the centre of mass; a symbol hangs on the body's origin. */
function originPose(body: Body, { x, y, angle }: { x: number; y: number; angle: number }): BodyPose {
  return { at: subtract([x, y], rotate(body.centerOfMass, angle)), angle };
}

/** A point of a body, given in body coordinates [m], on the sheet. */
export function onSheet({ at, angle }: BodyPose, local: Vec): Vec {
  return toSheet(at, angle, local);
}

/** Carries a point that was drawn on a part at time zero to where the part is now. */
export function carried(point: PointOn, drawn: Poses, now: Poses): Vec {
  const [from, to] = [drawn.get(point.of), now.get(point.of)];
  return from && to ? onSheet(to, toBody(from.at, from.angle, point.at)) : point.at;
}

/** How far a part has turned since it was drawn [rad]; the ground does not. */
export function turned(of: string, drawn: Poses, now: Poses): number {
  return (now.get(of)?.angle ?? 0) - (drawn.get(of)?.angle ?? 0);
}
