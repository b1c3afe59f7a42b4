import type { Vec } from '../../core/vec.js';
import { bodyGap, pointAt, signedArea, TOUCHING, trackGap, type TrackPath } from '../../geometry/index.js';
import type { ContactPair } from '../kinds/contact.js';
import type { PlacedBody } from '../resolve/body.js';
import { reachOf } from '../resolve/outline.js';
import { formatQuantity } from '../units/format.js';
import { placeOf, type Checked } from './checked.js';

/** A particle that lies behind a track by less than this part of the extent was meant to lie on it. */
const NEARLY = 0.01;

/** Bodies that start inside each other, or in or behind a track, where a contact pair lists them. */
export function checkOverlaps(checked: Checked): void {
  const bodies = new Map(checked.placed.map((body) => [body.id, { body, reach: reachOf(body.outline) }]));
  for (const pair of checked.mechanism.contacts) {
    const first = bodies.get(pair.between[0]);
    const second = bodies.get(pair.between[1]);
    const path = checked.paths.get(pair.between[1]) ?? checked.paths.get(pair.between[0]);
    const body = first ?? second;
    if (first && second) checkBodies(first, second, pair, checked);
    else if (body && path) checkTrack(body, path, pair, checked);
  }
}

interface Reached {
  body: PlacedBody;
  /** No point of the body is farther from its origin [m]. */
  reach: number;
}

function checkBodies(a: Reached, b: Reached, pair: ContactPair, checked: Checked): void {
  const apart = Math.hypot(a.body.at[0] - b.body.at[0], a.body.at[1] - b.body.at[1]);
  if (apart > a.reach + b.reach) return;
  const depth = -bodyGap(a.body, b.body);
  if (depth <= TOUCHING * checked.mechanism.extent) return;
  report(pair, `"${a.body.id}" and "${b.body.id}" overlapping by ${formatQuantity(depth, 'length')}`, 'error', checked);
}

function checkTrack({ body, reach }: Reached, path: TrackPath, pair: ContactPair, checked: Checked): void {
  const { extent } = checked.mechanism;
  const near = Math.max(reach, NEARLY * extent);
  const isOutright = namesBoth(pair, checked);
  const isSolid = path.closed && isSolidInside(path);
  if (!isOutright && !isSolid && isFar(body.at, reach + near, path)) return;
  const { gap, state, at } = trackGap(body, path);
  if (state === 'clear' || gap >= -TOUCHING * extent) return;
  const where = `[${at.map((part) => formatQuantity(part, 'length')).join(', ')}]`;
  const depth = formatQuantity(-gap, 'length');
  if (state === 'inside') {
    report(pair, `"${body.id}" ${depth} inside "${path.id}" at ${where}`, 'error', checked);
    return;
  }
  const isNear = -gap <= near;
  if (!isSolid && !isNear && !isOutright) return;
  const isWrong = isSolid || (isNear && isOutright);
  report(pair, `"${body.id}" ${depth} behind "${path.id}" at ${where}`, isWrong ? 'error' : 'warning', checked);
}

/** Points on each run by which the sense of a closed track is told. */
const SAMPLES = 64;

/** True where the inside of a closed track is its solid side: there is no doubt that nothing belongs there. */
function isSolidInside(path: TrackPath): boolean {
  if (path.side === 'both') return false;
  const points = path.runs.flatMap((run) =>
    Array.from({ length: SAMPLES }, (_, k): Vec => {
      const { x, y } = pointAt(run, (k / SAMPLES) * run.length);
      return [x, y];
    }),
  );
  return signedArea(points) > 0 === (path.side === 'right');
}

/** Farther than `margin` from everything of the track [m]. */
const isFar = ([x, y]: Vec, margin: number, { box }: TrackPath): boolean =>
  x < box.minX - margin || x > box.maxX + margin || y < box.minY - margin || y > box.maxY + margin;

const namesBoth = (pair: ContactPair, { draft }: Checked): boolean =>
  draft.contacts?.find(({ place }) => place.pointer === pair.pointer)?.value?.between.includes('*') === false;

function report(pair: ContactPair, found: string, severity: 'error' | 'warning', checked: Checked): void {
  const place = { ...placeOf(checked, pair.between[0]), of: [...pair.between] };
  if (pair.compliant) {
    checked.reading.report('starts-compressed', place, { found });
    return;
  }
  const accepted = 'things that touch or are apart; rest lays a body on a track';
  checked.reading.report(severity === 'error' ? 'starts-inside' : 'starts-behind', place, { found, accepted });
}
