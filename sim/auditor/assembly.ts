import type { Joint } from '../mechanism/kinds/joint.js';
import type { Spring } from '../mechanism/kinds/spring.js';
import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import { buildCandidates } from './contact/candidates.js';
import { buildPairs, type Pair } from './contact/pair.js';
import { SoftPoint } from './contact/soft-point.js';
import { Dynamics } from './dynamics.js';
import type { Bilateral, DryFriction, Force } from './element.js';
import { buildDamper, type DamperParts } from './kinds/damper.js';
import { buildDrive } from './kinds/drive.js';
import { JointParts } from './kinds/joint.js';
import { buildLoad } from './kinds/load.js';
import { buildRolling } from './kinds/rolling.js';
import { RopeParts } from './kinds/rope.js';
import { buildSpring, type SpringParts } from './kinds/spring.js';
import type { Account } from './ledgers.js';
import { buildSystem, type System } from './system.js';
import type { ContactPoint, Unilateral } from './unilateral.js';

/** The mechanism as the auditor runs it. */
export interface Assembly {
  system: System;
  dynamics: Dynamics;
  pairs: Pair[];
  joints: JointParts[];
  springs: SpringParts[];
  dampers: DamperParts[];
  points: ContactPoint[];
  soft: SoftPoint[];
  numerical: Account;
  gravity: Account[];
}

/** Kinds that are audited; the rest are refused by `unaudited`. */
export const auditedJoints = {
  pin: true,
  slide: true,
  weld: true,
  rope: true,
  gear: false,
  rack: false,
  screw: false,
} satisfies Record<Joint['kind'], boolean>;

export const auditedSprings = { linear: true, torsion: true, gas: false } satisfies Record<Spring['kind'], boolean>;

export function assemble(
  mechanism: Mechanism,
  isOn: (from: Moment | undefined, until: Moment | undefined) => boolean,
): Assembly {
  const system = buildSystem(mechanism);
  const { ledgers, mechanism: scaled } = system;
  const numerical = ledgers.open(
    'numerical',
    null,
    system.ids.map((_, i) => i),
    { cause: 'velocity-projection' },
  );
  const isHeavy = scaled.gravity[0] !== 0 || scaled.gravity[1] !== 0;
  const gravity = isHeavy ? system.ids.map((id, i) => ledgers.open('gravity', id, [i], { stored: true })) : [];
  const springs = scaled.springs.map((spring) => buildSpring(system, spring));
  const dampers = scaled.dampers.map((damper) => buildDamper(system, damper));
  const loads = scaled.loads.map((load) => buildLoad(system, load, () => isOn(load.from, load.until)));
  const joints = scaled.joints.flatMap((joint) =>
    joint.kind === 'pin' || joint.kind === 'slide' || joint.kind === 'weld' ? [new JointParts(system, joint)] : [],
  );
  const ropes = scaled.joints.flatMap((joint) => (joint.kind === 'rope' ? [new RopeParts(system, joint)] : []));
  const forces: Force[] = [...springs.map(({ force }) => force), ...dampers.map(({ force }) => force), ...loads];
  const held: Bilateral[] = [];
  for (const drive of scaled.drives) {
    const joint = joints.find(({ id }) => id === drive.on);
    if (!joint) continue;
    const parts = buildDrive(system, drive, joint, () => isOn(drive.from, drive.until));
    if (parts.force) forces.push(parts.force);
    else held.push(parts.held);
  }
  const pairs = buildPairs(system);
  const points = buildCandidates(system, pairs);
  const soft = points.filter(({ pair }) => pair.compliant).map((point) => new SoftPoint(point, shareOf(system, point)));
  const rigid: Unilateral[] = points.filter(({ pair }) => !pair.compliant);
  const frictions: DryFriction[] = joints.flatMap(({ friction }) => friction ?? []);
  const dynamics: Dynamics = new Dynamics(system, {
    forces,
    joints: [...joints, ...held],
    unilaterals: [...rigid, ...ropes, ...joints.flatMap(({ stops }) => stops)],
    frictions,
    soft,
    gravity,
  });
  for (const pair of pairs) {
    const rolling = buildRolling(pair, () => dynamics);
    if (rolling) frictions.push(rolling);
  }
  return { system, dynamics, pairs, joints, springs, dampers, points, soft, numerical, gravity };
}

/** A compliant pair's value is shared among the points of a face: two, unless one of the two is round. */
function shareOf({ mechanism }: System, { bodyA, bodyB }: ContactPoint): number {
  const isRound = (body: number): boolean => {
    const kind = body < 0 ? 'none' : mechanism.bodies[body].shape.kind;
    return kind === 'disc' || kind === 'particle';
  };
  return isRound(bodyA) || isRound(bodyB) ? 1 : 0.5;
}
