import type { Place } from '../../core/problem.js';
import { distance, unit } from '../../core/vec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Joint, JointDocument, PinFriction, PointOn, Rope, SlideFriction } from '../kinds/joint.js';
import { formatQuantity } from '../units/format.js';

/** A joint in SI, its defaults worked out. @param touching things nearer than this touch [m] */
export function resolveJoint(
  joint: JointDocument,
  touching: number,
  place: Place,
  reading: Reading,
): Joint | undefined {
  switch (joint.kind) {
    case 'pin': {
      const { id, kind, between, at, friction, limits } = joint;
      if (!checkEnds(between, place, reading) || !checkLimits(limits, place, reading)) return undefined;
      return { id, kind, between, at, ...(friction && { friction: pinFriction(friction) }), ...(limits && { limits }) };
    }
    case 'slide': {
      const { id, kind, between, at, friction, limits } = joint;
      if (!checkEnds(between, place, reading) || !checkLimits(limits, place, reading)) return undefined;
      const axis = unit(joint.axis);
      return {
        id,
        kind,
        between,
        at,
        axis,
        ...(friction && { friction: slideFriction(friction) }),
        ...(limits && { limits }),
      };
    }
    case 'weld': {
      const { id, kind, between } = joint;
      return checkEnds(between, place, reading) ? { id, kind, between } : undefined;
    }
    case 'rope':
      return resolveRope(joint, touching, place, reading);
    case 'gear': {
      const { id, kind, joints, ratio, efficiency } = joint;
      return checkDifferent(joints, 'joints', place, reading) ? { id, kind, joints, ratio, efficiency } : undefined;
    }
    case 'rack': {
      const { id, kind, pin, slide, radius, efficiency } = joint;
      return { id, kind, pin, slide, radius, efficiency };
    }
    case 'screw': {
      const { id, kind, pin, slide, lead, friction } = joint;
      return { id, kind, pin, slide, lead, friction };
    }
  }
}

type Document<K extends JointDocument['kind']> = Extract<JointDocument, { kind: K }>;

function pinFriction({ torque, coefficient, radius }: NonNullable<Document<'pin'>['friction']>): PinFriction {
  if (torque !== undefined) return { kind: 'torque', torque };
  return { kind: 'coefficient', coefficient: coefficient ?? 0, radius: radius ?? 0 };
}

function slideFriction({ force, coefficient }: NonNullable<Document<'slide'>['friction']>): SlideFriction {
  return force === undefined ? { kind: 'coefficient', coefficient: coefficient ?? 0 } : { kind: 'force', force };
}

const checkEnds = (between: [string, string], place: Place, reading: Reading): boolean =>
  checkDifferent(between, 'between', place, reading);

function checkDifferent(pair: [string, string], key: string, place: Place, reading: Reading): boolean {
  if (pair[0] !== pair[1]) return true;
  reading.report('same-part', inside(place, key), { found: `"${pair[0]}" twice`, accepted: 'two different ones' });
  return false;
}

function checkLimits(limits: { from: number; to: number } | undefined, place: Place, reading: Reading): boolean {
  if (!limits || (limits.from <= 0 && limits.to >= 0 && limits.from < limits.to)) return true;
  const accepted = 'limits with the drawn position, 0, between them';
  const found = `limits from ${limits.from} to ${limits.to} (SI)`;
  reading.report('outside-limits', inside(place, 'limits'), { found, accepted });
  return false;
}

function resolveRope(rope: Document<'rope'>, touching: number, place: Place, reading: Reading): Rope | undefined {
  const { id, kind, through } = rope;
  const ends: [string, string] = [through[0].of, through[through.length - 1].of];
  if (rope.between && (rope.between[0] !== ends[0] || rope.between[1] !== ends[1])) {
    const found = `${rope.between.join(' and ')}, with end points on ${ends.join(' and ')}`;
    reading.report('rope-ends', inside(place, 'between'), {
      found,
      accepted: 'the parts of its end points, or no between',
    });
    return undefined;
  }
  const drawn = drawnLength(through);
  const { length = drawn } = rope;
  if (drawn <= touching) {
    const accepted = 'points apart from each other';
    reading.report('no-line', inside(place, 'through'), { found: 'a rope of no length', accepted });
    return undefined;
  }
  if (length < drawn - touching) {
    const found = `a length of ${formatQuantity(length, 'length')}`;
    const accepted = `at least ${formatQuantity(drawn, 'length')}, its length as drawn`;
    reading.report('rope-too-short', inside(place, 'length'), { found, accepted });
    return undefined;
  }
  if (rope.length === undefined) {
    reading.applied(`${place.pointer}/length`, formatQuantity(drawn, 'length'), 'taut as drawn');
  }
  return { id, kind, between: ends, through, length };
}

const drawnLength = (points: PointOn[]): number =>
  points.slice(1).reduce((sum, point, i) => sum + distance(points[i].at, point.at), 0);
