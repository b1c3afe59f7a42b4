import type { Place } from '../../core/problem.js';
import { distance, type Vec } from '../../core/vec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Track, TrackSegment } from '../kinds/track.js';
import type { TrackDocument } from '../kinds/track.js';

/** An arc with a bulge below this differs from its chord by less than a billionth of it, and is a line. */
const FLAT = 1e-9;
/** An arc with a bulge above this lacks less than 2.3 deg of a full circle. */
const GREATEST_BULGE = 100;

/**
 * The track in SI, closed by a line of its own where it says so and its ends differ; undefined, with problems told, where
 * a segment is degenerate.
 *
 * @param touching things nearer than this touch [m]
 */
export function resolveTrack(
  track: TrackDocument,
  touching: number,
  place: Place,
  reading: Reading,
): Track | undefined {
  let at = track.from;
  const segments = track.to.map((segment, i) => {
    const made = resolveSegment(segment, at, touching, inside(inside(place, 'to'), i), reading);
    at = 'to' in segment ? segment.to : segment.through[segment.through.length - 1];
    return made;
  });
  if (!segments.every((segment) => segment !== undefined)) return undefined;
  const isOpen = distance(at, track.from) > touching;
  const closing: TrackSegment[] = track.closed && isOpen ? [{ kind: 'line', to: track.from }] : [];
  return {
    id: track.id,
    from: track.from,
    segments: [...(track.closed && !isOpen ? meeting(segments, track.from) : segments), ...closing],
    closed: track.closed,
    side: track.side,
    surfaceSpeed: typeof track.surfaceSpeed === 'number' ? track.surfaceSpeed : track.surfaceSpeed.curve,
    ...(track.material !== undefined && { material: track.material }),
  };
}

/** The segments, the last one ending exactly where the track begins. */
function meeting(segments: TrackSegment[], from: Vec): TrackSegment[] {
  const last = segments[segments.length - 1];
  const ended: TrackSegment =
    last.kind === 'spline' ? { ...last, through: [...last.through.slice(0, -1), from] } : { ...last, to: from };
  return [...segments.slice(0, -1), ended];
}

function resolveSegment(
  segment: TrackDocument['to'][number],
  from: Vec,
  touching: number,
  place: Place,
  reading: Reading,
): TrackSegment | undefined {
  const named = segment.name === undefined ? {} : { name: segment.name };
  if ('through' in segment) {
    const { through } = segment;
    const repeated = through.findIndex((point, i) => distance(point, i === 0 ? from : through[i - 1]) <= touching);
    if (repeated < 0) return { ...named, kind: 'spline', through };
    const found = 'a point where the one before it is';
    reading.report('repeated-point', inside(inside(place, 'through'), repeated), { found, accepted: 'points apart' });
    return undefined;
  }
  const { to, bulge = 0 } = segment;
  if (distance(from, to) <= touching) {
    const accepted = 'an end apart from the start; a full circle is two arcs';
    reading.report('degenerate-segment', inside(place, 'to'), { found: 'a segment of no length', accepted });
    return undefined;
  }
  if (Math.abs(bulge) > GREATEST_BULGE) {
    const accepted = `a bulge from -${GREATEST_BULGE} to ${GREATEST_BULGE}: 1 is a half circle`;
    reading.report('degenerate-segment', inside(place, 'bulge'), { found: String(bulge), accepted });
    return undefined;
  }
  if (Math.abs(bulge) < FLAT) return { ...named, kind: 'line', to };
  return { ...named, kind: 'arc', to, bulge };
}
