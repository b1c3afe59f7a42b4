import { convexParts } from '../geometry/index.js';
import type { Body, Shape } from '../mechanism/kinds/body.js';
import type { Damper } from '../mechanism/kinds/damper.js';
import type { Drive } from '../mechanism/kinds/drive.js';
import type { Joint, PointOn } from '../mechanism/kinds/joint.js';
import type { Load } from '../mechanism/kinds/load.js';
import type { Spring } from '../mechanism/kinds/spring.js';
import type { Track } from '../mechanism/kinds/track.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Vec } from '../core/vec.js';

/** The auditor's own units: the mechanism's extent, its mass, and the time in which gravity or motion crosses it. */
export interface Units {
  length: number;
  time: number;
  mass: number;
}

export const speedUnit = ({ length, time }: Units): number => length / time;
export const forceUnit = ({ length, time, mass }: Units): number => (mass * length) / time ** 2;
export const energyUnit = (units: Units): number => forceUnit(units) * units.length;

export function unitsFor(mechanism: Mechanism): Units {
  const length = mechanism.extent > 0 ? mechanism.extent : 1;
  const mass = mechanism.bodies.reduce((sum, body) => sum + body.mass, 0) || 1;
  return { length, mass, time: timeFor(mechanism, length, mass) };
}

function timeFor(mechanism: Mechanism, length: number, mass: number): number {
  const g = Math.hypot(...mechanism.gravity);
  const speed = Math.max(
    0,
    ...mechanism.bodies.map(
      ({ velocity, spin, shape }) => Math.hypot(...velocity) + Math.abs(spin) * (reachOf(shape) || length),
    ),
  );
  const candidates = [g > 0 ? Math.sqrt(length / g) : Infinity, speed > 0 ? length / speed : Infinity];
  const least = Math.min(...candidates);
  if (Number.isFinite(least)) return least;
  const rates = mechanism.springs.map((spring) => (spring.kind === 'linear' ? spring.rate : 0));
  const rate = Math.max(0, ...rates);
  return rate > 0 ? Math.sqrt(mass / rate) : 1;
}

/** Greatest distance of an outline from its body's origin. */
function reachOf(shape: Shape): number {
  const corners = convexParts(shape).flatMap(({ points, radius }) => points.map(([x, y]) => Math.hypot(x, y) + radius));
  return Math.max(0, ...corners);
}

/** The mechanism with every quantity in the auditor's units; ids and times of stations' ids are as they were. */
export function inUnits(mechanism: Mechanism, units: Units): Mechanism {
  const { length: l, time: t } = units;
  const point = ([x, y]: Vec): Vec => [x / l, y / l];
  const on = ({ of, at }: PointOn): PointOn => ({ of, at: point(at) });
  const force = forceUnit(units);
  const energy = energyUnit(units);
  const speed = speedUnit(units);
  return {
    ...mechanism,
    gravity: [(mechanism.gravity[0] * t * t) / l, (mechanism.gravity[1] * t * t) / l],
    extent: mechanism.extent / l,
    bodies: mechanism.bodies.map((body) => scaledBody(body, units)),
    tracks: mechanism.tracks.map((track) => scaledTrack(track, point, speed, t)),
    contacts: mechanism.contacts.map((pair) => ({
      ...pair,
      rollingResistance: pair.rollingResistance / l,
      restSpeed: pair.restSpeed / speed,
      ...(pair.compliant
        ? {
            compliant: {
              stiffness: (pair.compliant.stiffness * l) / force,
              damping: (pair.compliant.damping * speed) / force,
            },
          }
        : {}),
    })),
    joints: mechanism.joints.map((joint) => scaledJoint(joint, l, force, energy, point, on)),
    springs: mechanism.springs.map((spring) => scaledSpring(spring, l, force, energy, on)),
    dampers: mechanism.dampers.map((damper) => scaledDamper(damper, units, on)),
    loads: mechanism.loads.map((load) => scaledLoad(load, force, energy, on)),
    drives: mechanism.drives.map((drive) => scaledDrive(drive, mechanism.joints, units)),
    run: { ...mechanism.run, atMost: mechanism.run.atMost / t },
  };
}

function scaledBody(body: Body, { length: l, time: t, mass: m }: Units): Body {
  const point = ([x, y]: Vec): Vec => [x / l, y / l];
  return {
    ...body,
    shape: scaledShape(body.shape, l, point),
    mass: body.mass / m,
    inertia: body.inertia / (m * l * l),
    centerOfMass: point(body.centerOfMass),
    at: point(body.at),
    velocity: [(body.velocity[0] * t) / l, (body.velocity[1] * t) / l],
    spin: body.spin * t,
  };
}

function scaledShape(shape: Shape, l: number, point: (v: Vec) => Vec): Shape {
  switch (shape.kind) {
    case 'disc':
      return { ...shape, radius: shape.radius / l };
    case 'box':
      return { ...shape, width: shape.width / l, height: shape.height / l };
    case 'bar':
      return { ...shape, length: shape.length / l, width: shape.width / l };
    case 'polygon':
      return { ...shape, points: shape.points.map(point) };
    default:
      return shape;
  }
}

function scaledTrack(track: Track, point: (v: Vec) => Vec, speed: number, t: number): Track {
  const { surfaceSpeed } = track;
  return {
    ...track,
    from: point(track.from),
    segments: track.segments.map((segment) =>
      segment.kind === 'spline'
        ? { ...segment, through: segment.through.map(point) }
        : { ...segment, to: point(segment.to) },
    ),
    surfaceSpeed:
      typeof surfaceSpeed === 'number' ? surfaceSpeed / speed : surfaceSpeed.map(([x, s]): Vec => [x / t, s / speed]),
  };
}

function scaledJoint(
  joint: Joint,
  l: number,
  force: number,
  energy: number,
  point: (v: Vec) => Vec,
  on: (p: PointOn) => PointOn,
): Joint {
  switch (joint.kind) {
    case 'pin': {
      const { friction } = joint;
      const scaled =
        friction?.kind === 'torque'
          ? { ...friction, torque: friction.torque / energy }
          : friction && { ...friction, radius: friction.radius / l };
      return { ...joint, at: point(joint.at), ...(scaled ? { friction: scaled } : {}) };
    }
    case 'slide': {
      const { friction, limits } = joint;
      const scaled = friction?.kind === 'force' ? { ...friction, force: friction.force / force } : friction;
      return {
        ...joint,
        at: point(joint.at),
        ...(scaled ? { friction: scaled } : {}),
        ...(limits ? { limits: { ...limits, from: limits.from / l, to: limits.to / l } } : {}),
      };
    }
    case 'rope':
      return { ...joint, through: joint.through.map(on), length: joint.length / l };
    default:
      return joint;
  }
}

function scaledSpring(spring: Spring, l: number, force: number, energy: number, on: (p: PointOn) => PointOn): Spring {
  if (spring.kind === 'torsion') return { ...spring, rate: spring.rate / energy };
  const between: [PointOn, PointOn] = [on(spring.between[0]), on(spring.between[1])];
  if (spring.kind === 'gas') return { ...spring, between, force: spring.force / force, stroke: spring.stroke / l };
  return {
    ...spring,
    between,
    rate: (spring.rate * l) / force,
    freeLength: spring.freeLength / l,
    ...(spring.curve ? { curve: spring.curve.map(([d, f]): Vec => [d / l, f / force]) } : {}),
  };
}

function scaledDamper(damper: Damper, units: Units, on: (p: PointOn) => PointOn): Damper {
  const { exponent } = damper;
  if (damper.kind === 'rotary') {
    return { ...damper, coefficient: damper.coefficient / (energyUnit(units) * units.time ** exponent) };
  }
  const coefficient = (damper.coefficient * speedUnit(units) ** exponent) / forceUnit(units);
  return { ...damper, coefficient, between: [on(damper.between[0]), on(damper.between[1])] };
}

function scaledLoad(load: Load, force: number, energy: number, on: (p: PointOn) => PointOn): Load {
  return load.kind === 'torque'
    ? { ...load, torque: load.torque / energy }
    : { ...load, on: on(load.on), force: [load.force[0] / force, load.force[1] / force] };
}

function scaledDrive(drive: Drive, joints: readonly Joint[], units: Units): Drive {
  const isSlide = joints.some(({ id, kind }) => id === drive.on && kind === 'slide');
  const effort = isSlide ? forceUnit(units) : energyUnit(units);
  const rate = isSlide ? speedUnit(units) : 1 / units.time;
  const { law } = drive;
  switch (law.kind) {
    case 'effort':
      return { ...drive, law: { ...law, value: law.value / effort } };
    case 'effortCurve': {
      const over = law.over === 'time' ? units.time : isSlide ? units.length : 1;
      return { ...drive, law: { ...law, curve: law.curve.map(([x, f]): Vec => [x / over, f / effort]) } };
    }
    case 'motor':
      return {
        ...drive,
        law: { ...law, stallTorque: law.stallTorque / effort, noLoadSpeed: law.noLoadSpeed / rate },
      };
    case 'speed': {
      const value =
        typeof law.value === 'number' ? law.value / rate : law.value.map(([x, s]): Vec => [x / units.time, s / rate]);
      return { ...drive, law: { ...law, value, ...(law.limit === undefined ? {} : { limit: law.limit / effort }) } };
    }
  }
}
