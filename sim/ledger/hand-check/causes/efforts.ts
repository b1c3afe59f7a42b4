import { cross, dot, norm, rotate, subtract, type Vec } from '../../../core/vec.js';
import type { Drive } from '../../../mechanism/kinds/drive.js';
import type { Load } from '../../../mechanism/kinds/load.js';
import { workTerm, type Term } from '../cause.js';
import type { Quantity } from '../figures.js';
import { isActive } from '../moments.js';
import { refuse } from '../refusal.js';
import { placeOn, type PushingCause, type Stretch } from './force.js';
import { areaUnder } from './springs.js';

/** Loads on the bodies of a course: F s, M φ. */
export function loadCauses(stretch: Stretch): PushingCause[] {
  const { scene, course, leg } = stretch;
  return scene.mechanism.loads.flatMap((load) => {
    const on = load.kind === 'force' ? load.on.of : load.on;
    if (!course.members.includes(on) || !isActive(scene, load, leg)) return [];
    return [load.kind === 'force' ? forceCause(stretch, load) : torqueCause(stretch, load)];
  });
}

function forceCause(stretch: Stretch, load: Extract<Load, { kind: 'force' }>): PushingCause {
  const { scene, course } = stretch;
  const { of } = load.on;
  const turned = (q: number): number => course.pose(of, q).angle - scene.body(of).angle;
  const force = (q: number): Vec => (load.follows === 'body' ? rotate(load.force, turned(q)) : load.force);
  const start = placeOn(stretch, load.on, 0);
  const [pin] = course.joints;
  const turns = load.follows === 'body' && course.rate(0).turn !== 0;
  if (turns && course.kind !== 'pin') refuse(`The load ${load.id} turns with ${of} as it rolls.`);
  const moment = turns ? cross(subtract(load.on.at, pin.at), load.force) * course.rate(0).turn : 0;
  const given = (q: number): number =>
    turns ? moment * q : dot(force(0), subtract(placeOn(stretch, load.on, q), start));
  return {
    given,
    pushes: [{ on: of, force }],
    term: (work) =>
      turns
        ? product(load.id, work, ['M', moment, 'torque'], ['φ', 'angle'])
        : product(load.id, work, ['F', norm(load.force), 'force'], ['s', 'length']),
  };
}

function torqueCause({ course }: Stretch, load: Extract<Load, { kind: 'torque' }>): PushingCause {
  const start = course.pose(load.on, 0).angle;
  return {
    given: (q) => load.torque * (course.pose(load.on, q).angle - start),
    term: (work) => product(load.id, work, ['M', load.torque, 'torque'], ['φ', 'angle']),
  };
}

/** Drives on the joint of a course; those whose effort hangs on time or speed are no hand sum. */
export function driveCauses({ scene, course, leg }: Stretch): PushingCause[] {
  return course.joints.flatMap((joint) =>
    scene.mechanism.drives
      .filter(({ on }) => on === joint.id)
      .filter((drive) => isActive(scene, drive, leg))
      .map((drive) =>
        driveCause(drive, course.sense, positionOf({ scene, course, leg }, joint.id), course.kind === 'pin'),
      ),
  );
}

function driveCause({ id, law }: Drive, sense: number, start: number, turns: boolean): PushingCause {
  if (law.kind === 'effort') {
    const [force, way]: [[string, number, Quantity], [string, Quantity]] = turns
      ? [
          ['M', law.value, 'torque'],
          ['φ', 'angle'],
        ]
      : [
          ['F', law.value, 'force'],
          ['s', 'length'],
        ];
    return { given: (q) => law.value * sense * q, term: (work) => product(id, work, force, way) };
  }
  if (law.kind === 'effortCurve' && law.over === 'position') {
    const given = (q: number): number => areaUnder(held(law.curve), start, start + sense * q);
    return { given, term: (work) => workTerm(id, id, [id], work) };
  }
  return refuse(
    `What the drive ${id} gives hangs on ${law.kind === 'effortCurve' ? 'time' : 'its speed'}, not on the way.`,
  );
}

/** A curve that keeps its end values beyond its ends. */
function held(curve: readonly Vec[]): Vec[] {
  const [first, last] = [curve[0], curve[curve.length - 1]];
  return [[first[0] - 1, first[1]], ...curve, [last[0] + 1, last[1]]];
}

/** Travel or turn of a joint from drawn, at the start of a course. */
function positionOf({ scene, course }: Stretch, id: string): number {
  const joint = course.joints.find((each) => each.id === id);
  if (!joint) return 0;
  const body = course.members.find((member) => joint.between.includes(member)) ?? course.members[0];
  const sign = joint.between[0] === body ? 1 : -1;
  const { x, y, angle } = course.pose(body, 0);
  if (joint.kind === 'pin') return sign * (angle - scene.body(body).angle);
  return sign * dot(joint.axis, subtract([x, y], scene.drawnCenter(body)));
}

/** A constant effort times the way it goes. */
function product(
  id: string,
  value: number,
  [name, effort, kind]: [string, number, Quantity],
  [way, wayKind]: [string, Quantity],
): Term {
  return {
    key: `effort ${id}`,
    family: `effort ${name}`,
    value,
    factors: [
      { name, value: Math.abs(effort), kind, joins: 'last', of: [id] },
      { name: way, value: effort === 0 ? 0 : value / Math.abs(effort), kind: wayKind, joins: 'sum' },
    ],
    shape: (factor) => [factor(name), factor(way)],
  };
}
