import type { Vec } from '../../core/vec.js';
import type { TrackPath } from '../../geometry/index.js';
import { isObject, type JsonValue } from '../json/value.js';
import type { Element } from '../fields/spec.js';
import type { TrackDocument } from '../kinds/track.js';
import type { PlacedBody } from './body.js';
import { boxPoints } from './outline.js';

/** Diagonal of the box around points [m]; 0 for none. */
export function diagonal(points: readonly Vec[]): number {
  if (points.length === 0) return 0;
  let [minX, minY] = points[0];
  let [maxX, maxY] = points[0];
  for (const [x, y] of points) {
    minX = Math.min(minX, x);
    minY = Math.min(minY, y);
    maxX = Math.max(maxX, x);
    maxY = Math.max(maxY, y);
  }
  return Math.hypot(maxX - minX, maxY - minY);
}

/** Corners of the box around a track. */
export const trackPoints = ({ box }: TrackPath): Vec[] => [
  [box.minX, box.minY],
  [box.maxX, box.maxY],
];

/** Points whose box is the box around a body where it is. */
export const bodyPoints = (body: PlacedBody): Vec[] => [body.at, ...boxPoints(body.outline, body)];

/** The points tracks are drawn through, before anything is known of their arcs. */
export const drawnTrackPoints = (tracks: readonly Element<TrackDocument>[]): Vec[] =>
  tracks.flatMap(({ draft }) => [
    ...(draft.from ? [draft.from] : []),
    ...(draft.to ?? []).flatMap((segment) => ('to' in segment ? [segment.to] : segment.through)),
  ]);

/** Every sheet point of joints, springs, dampers and loads: the values of their keys `at`. */
export function pointsIn(value: unknown): Vec[] {
  if (Array.isArray(value)) return value.flatMap(pointsIn);
  if (!isObject(value as JsonValue)) return [];
  return Object.entries(value as object).flatMap(([key, item]: [string, unknown]) =>
    key === 'at' && isVec(item) ? [item] : pointsIn(item),
  );
}

const isVec = (value: unknown): value is Vec =>
  Array.isArray(value) && value.length === 2 && value.every((part) => typeof part === 'number');
