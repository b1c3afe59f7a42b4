import type { Mechanism } from '../mechanism/model.js';
import { rotate, subtract, type Vec } from '../core/vec.js';
import { buildTrack, pointAt, type SmoothRun } from '../geometry/index.js';
import { bodyAtRow } from '../recording/reader.js';
import type { Recording } from '../recording/recording.js';
import type { DrawingContext, Figure } from './figure.js';
import { elementFigures } from './kinds/index.js';
import { shapeOutline } from './kinds/body.js';
import { boxAround } from './paper.js';
import { drawnPoses, onSheet } from './pose.js';

/** A mechanism at a scale: its symbols, and what the tracings need. */
export interface Scene extends DrawingContext {
  figures: Figure[];
}

export function buildScene(mechanism: Mechanism, pixels: number): Scene {
  const context = { mechanism, pixels, drawn: drawnPoses(mechanism) };
  return { ...context, figures: elementFigures(context) };
}

/**
 * Points of everything drawn, and of where bodies went in a run [m]: close enough together to tell what part of the sheet
 * is free.
 */
export function inkPoints(mechanism: Mechanism, recording: Recording | null): Vec[] {
  return [...drawnPoints(mechanism), ...(recording ? travelPoints(mechanism, recording) : [])];
}

function drawnPoints(mechanism: Mechanism): Vec[] {
  const step = mechanism.extent / 100;
  const outlines = mechanism.bodies.flatMap((body) =>
    [...shapeOutline(body.shape), body.centerOfMass].map((point) => onSheet(body, point)),
  );
  const tracks = mechanism.tracks.flatMap((track) => buildTrack(track).runs.flatMap((run) => along(run, step)));
  const joints = mechanism.joints.flatMap((joint) => {
    if (joint.kind === 'rope') return joint.through.map(({ at }) => at);
    return 'at' in joint ? [joint.at] : [];
  });
  const links = [...mechanism.springs, ...mechanism.dampers].flatMap(({ between }) =>
    between.flatMap((end) => (typeof end === 'string' ? [] : [end.at])),
  );
  return [...outlines, ...tracks, ...joints, ...links];
}

function along(run: SmoothRun, step: number): Vec[] {
  const count = Math.max(1, Math.min(400, Math.ceil(run.length / step)));
  return Array.from({ length: count + 1 }, (_, i): Vec => {
    const { x, y } = pointAt(run, (run.length * i) / count);
    return [x, y];
  });
}

/** Boxes around the bodies at up to 200 instants of a run. */
function travelPoints(mechanism: Mechanism, recording: Recording): Vec[] {
  const bodies = new Map(mechanism.bodies.map((body) => [body.id, body]));
  const stride = Math.max(1, Math.floor(recording.rowCount / 200));
  const points: Vec[] = [];
  for (const spec of recording.layout.bodies) {
    const body = bodies.get(spec.id);
    if (!body) continue;
    const outline = shapeOutline(body.shape);
    for (let row = 0; row < recording.rowCount; row += stride) {
      const { x, y, angle } = bodyAtRow(recording, spec, row);
      const pose = { at: subtract([x, y], rotate(body.centerOfMass, angle)), angle };
      const box = boxAround([[x, y], ...outline.map((point) => onSheet(pose, point))]);
      if (box) points.push([box.left, box.low], [box.right, box.high]);
    }
  }
  return points;
}
