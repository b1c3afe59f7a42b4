import { add, dot, norm, scale, subtract, type Vec } from '../../../core/vec.js';
import type { Pin, Slide } from '../../../mechanism/kinds/joint.js';
import { workTerm, type Cause, type Factor, type Term } from '../cause.js';
import type { Rub } from '../course.js';
import { operator, type Token } from '../tokens.js';
import type { Push, PushingCause, Stretch } from './force.js';
import { gravityFactor, massFactors, massShape } from './gravity.js';

/** Friction and rolling resistance where the bodies touch, and friction of the joint. @param others the other causes */
export function frictionCauses(stretch: Stretch, others: readonly PushingCause[]): Cause[] {
  const pushes = others.flatMap((cause) => cause.pushes ?? []);
  const { rubs, joints } = stretch.course;
  return [
    ...rubs.filter((rub) => strength(rub) > 0).map((rub) => rubCause(stretch, rub, pushes)),
    ...joints.flatMap((joint) => jointCause(stretch, joint, others, pushes)),
  ];
}

/** What the normal force is multiplied with: μ, or the lever of rolling resistance over the radius. */
const strength = ({ coefficient, rolling }: Rub): number => (rolling ? rolling.lever / rolling.radius : coefficient);

/** N = |Σ m (κ v² n − g)·n − F·n| of the bodies it carries; the rate is μ N for each metre of the centre's way. */
function rubCause({ scene, course }: Stretch, rub: Rub, pushes: readonly Push[]): Cause {
  const mass = rub.carried.reduce((total, id) => total + scene.body(id).mass, 0);
  const pressing = pushes.filter(({ on }) => rub.carried.includes(on));
  const forces = (q: number, square: number): number =>
    pressing.reduce((total, { force }) => total + dot(force(q, square), rub.normal(q)), 0);
  const load = (q: number, square: number): number => {
    const { bend } = course.rate(q);
    const wanted = mass * dot(subtract(scale(bend, square), scene.mechanism.gravity), rub.normal(q));
    return Math.abs(wanted - forces(q, square));
  };
  const sign = rub.rolling ? -1 : rub.sense;
  const rate = (q: number, square: number): number =>
    sign * strength(rub) * load(q, square) * norm(course.rate(q).tangent);
  const places = [0, 0.3, 0.7, 1].map((part) => part * course.length);
  const isWeightOnly = course.slope !== undefined && places.every((q) => Math.abs(forces(q, 1)) <= 1e-9 * load(q, 1));
  const isConstant = course.slope !== undefined && places.every((q) => isNear(load(q, 1), load(0, 0)));
  const constant = isWeightOnly || isConstant;
  return {
    rate,
    constant,
    term: (work) => {
      if (!constant) return workTerm(`rub ${rub.on}`, rub.on, rub.of, work);
      return constantTerm(
        work,
        rub,
        course.slope ?? 0,
        load(0, 0),
        isWeightOnly ? [...massFactors(scene, rub.carried), gravityFactor(scene)] : [],
      );
    },
  };
}

const isNear = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-9 * Math.abs(b);

/** μ m g cos α L, or μ N L. */
function constantTerm(value: number, rub: Rub, slope: number, load: number, weight: Factor[]): Term {
  const { rolling, of, carried, coefficient } = rub;
  const isSloped = weight.length > 0 && slope > 1e-9;
  const way = strength(rub) * load === 0 ? 0 : Math.abs(value) / (strength(rub) * load);
  const factors: Factor[] = [
    ...(rolling
      ? ([
          { name: 'b', value: rolling.lever, kind: 'length', joins: 'last', of },
          { name: 'r', value: rolling.radius, kind: 'length', joins: 'last' },
        ] as const)
      : ([{ name: 'μ', value: coefficient, kind: 'ratio', joins: 'last', of }] as const)),
    ...weight,
    ...(weight.length === 0 ? [{ name: 'N', value: load, kind: 'force', joins: 'last' } as const] : []),
    ...(isSloped ? [{ name: 'α', value: slope, kind: 'slope', joins: 'last' } as const] : []),
    { name: 'L', value: way, kind: 'length', joins: 'sum' },
  ];
  const shape = (factor: (name: string) => Token): Token[] => [
    ...(rolling ? [operator('('), factor('b'), operator('/'), factor('r'), operator(')')] : [factor('μ')]),
    ...(weight.length > 0 ? [...massShape(carried, factor), factor('g')] : [factor('N')]),
    ...(isSloped ? [operator('cos'), factor('α')] : []),
    factor('L'),
  ];
  const key = `rub ${of.join(' ')} ${slope.toFixed(9)} ${load.toPrecision(9)} ${Math.sign(value)}`;
  return { key, family: rolling ? 'rolling' : 'rub', value, factors, shape };
}

function jointCause(
  stretch: Stretch,
  joint: Pin | Slide,
  others: readonly PushingCause[],
  pushes: readonly Push[],
): Cause[] {
  const { friction } = joint;
  if (!friction) return [];
  if (joint.kind === 'pin' && friction.kind === 'coefficient' && 'radius' in friction) {
    return [journalCause(stretch, joint, friction.coefficient * friction.radius, others, pushes)];
  }
  if (friction.kind === 'torque') return [steady(joint.id, friction.torque, ['M', 'φ'])];
  if (friction.kind === 'force') return [steady(joint.id, friction.force, ['F', 's'])];
  return [];
}

function steady(id: string, effort: number, [name, way]: ['M', 'φ'] | ['F', 's']): Cause {
  return {
    rate: () => -effort,
    constant: true,
    term: (work) => ({
      key: `joint ${id}`,
      family: `effort ${name}`,
      value: work,
      factors: [
        { name, value: effort, kind: name === 'M' ? 'torque' : 'force', joins: 'last', of: [id] },
        {
          name: way,
          value: effort === 0 ? 0 : Math.abs(work) / effort,
          kind: way === 'φ' ? 'angle' : 'length',
          joins: 'sum',
        },
      ],
      shape: (factor) => [factor(name), factor(way)],
    }),
  };
}

/** Step for the slope of the given works [rad]. */
const NEAR = 1e-5;

/**
 * Friction torque of a journal, μ r |R|, with R = m a − m g − F; since a hangs on the torque itself, by repetition, which
 * gains a factor μ r / arm each time.
 */
function journalCause(
  { scene, course }: Stretch,
  pin: Pin,
  lever: number,
  others: readonly PushingCause[],
  pushes: readonly Push[],
): Cause {
  const { mass } = scene.body(course.members[0]);
  const given = (q: number): number => others.reduce((sum, cause) => sum + (cause.given?.(q) ?? 0), 0);
  const torque = (q: number, square: number): number => {
    const moved = others.reduce((sum, cause) => sum + (cause.rate?.(q, square) ?? 0), 0);
    const driving = (given(q + NEAR) - given(q - NEAR)) / (2 * NEAR) + moved;
    const { tangent, bend } = course.rate(q);
    const pushed = pushes.reduce<Vec>((sum, { force }) => add(sum, force(q, square)), [0, 0]);
    let friction = 0;
    for (let k = 0; k < 8; k += 1) {
      const acceleration = add(scale(bend, square), scale(tangent, (driving - friction) / course.measure));
      friction = lever * norm(subtract(scale(subtract(acceleration, scene.mechanism.gravity), mass), pushed));
    }
    return friction;
  };
  return { rate: (q, square) => -torque(q, square), term: (work) => workTerm(pin.id, pin.id, [pin.id], work) };
}
