import type { Mechanism } from '../mechanism/model.js';
import type { Vec } from '../core/vec.js';
import { buildTrack } from '../geometry/index.js';
import { bodyAtRow } from '../recording/reader.js';
import type { Recording } from '../recording/recording.js';
import type { DrawingContext, Figure } from './figure.js';
import { elementFigures } from './kinds/index.js';
import { shapeOutline } from './kinds/body.js';
import { boxAround, type Box } from './paper.js';
import { drawnPoses, onSheet } from './pose.js';

/** A mechanism at a scale: its symbols, and what the tracings need. */
export interface Scene extends DrawingContext {
  figures: Figure[];
}

export function buildScene(mechanism: Mechanism, pixels: number): Scene {
  const context = { mechanism, pixels, drawn: drawnPoses(mechanism) };
  return { ...context, figures: elementFigures(context) };
}

/** The box around everything drawn, and around where bodies went in a run [m]; null for an empty sheet. */
export function sceneBox(mechanism: Mechanism, recording: Recording | null): Box | null {
  return boxAround([...staticPoints(mechanism), ...(recording ? travelPoints(mechanism, recording) : [])]);
}

function staticPoints(mechanism: Mechanism): Vec[] {
  const outlines = mechanism.bodies.flatMap((body) =>
    [...shapeOutline(body.shape), body.centerOfMass].map((point) => onSheet(body, point)),
  );
  const tracks = mechanism.tracks.flatMap((track) => {
    const { minX, minY, maxX, maxY } = buildTrack(track).box;
    return [[minX, minY] as Vec, [maxX, maxY] as Vec];
  });
  const joints = mechanism.joints.flatMap((joint) => {
    if (joint.kind === 'rope') return joint.through.map(({ at }) => at);
    return 'at' in joint ? [joint.at] : [];
  });
  const links = [...mechanism.springs, ...mechanism.dampers].flatMap(({ between }) =>
    between.flatMap((end) => (typeof end === 'string' ? [] : [end.at])),
  );
  return [...outlines, ...tracks, ...joints, ...links];
}

/** Outlines of the bodies at up to 200 instants of a run. */
function travelPoints(mechanism: Mechanism, recording: Recording): Vec[] {
  const bodies = new Map(mechanism.bodies.map((body) => [body.id, body]));
  const stride = Math.max(1, Math.floor(recording.rowCount / 200));
  const points: Vec[] = [];
  for (const spec of recording.layout.bodies) {
    const body = bodies.get(spec.id);
    if (!body) continue;
    const reach = Math.max(0, ...shapeOutline(body.shape).map(([x, y]) => Math.hypot(x - body.centerOfMass[0], y - body.centerOfMass[1]))); // prettier-ignore
    for (let row = 0; row < recording.rowCount; row += stride) {
      const { x, y } = bodyAtRow(recording, spec, row);
      points.push([x - reach, y - reach], [x + reach, y + reach]);
    }
  }
  return points;
}
