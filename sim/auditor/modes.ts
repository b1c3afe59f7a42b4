import { ContactProblem, forceRow, type Tangential } from './contact-problem.js';
import type { Dynamics, FrictionGroup } from './dynamics.js';
import type { SoftPoint } from './contact/soft-point.js';
import type { DryFriction } from './element.js';
import { ContactPoint, type Unilateral } from './unilateral.js';

/** A gap below this is closed [auditor length]. */
export const TOUCHING = 1e-9;
/**
 * A point so little behind a surface is held to be at it (a corner that turned over the surface's edge); further on it is
 * behind it, where nothing is solid [auditor length].
 */
export const BEHIND = 1e-6;
/** A closed point that opens slower than this stays closed; sliding slower than this sticks [auditor speed]. */
export const STILL = 1e-9;
/** A closed point may seem to open this fast where it comes onto another piece of track. */
const LANDING = 1e-6;
/** A force below this holds nothing [auditor force or acceleration]. */
const NIL = 1e-11;
const MOST_ROUNDS = 12;

/** What an event has decided already. */
export interface Decided {
  /** Opened: its force fell to nil. */
  opened?: Unilateral;
  /** Broke loose: its friction met the static limit, sliding this way from now on. */
  loose?: { what: FrictionGroup | DryFriction | SoftPoint; sliding: 1 | -1 };
}

/**
 * Finds which contacts hold and which friction sticks from now on: a complementarity problem on accelerations, never trial
 * and error. What breaks loose is solved once more with its kinetic coefficient.
 */
export class Modes {
  constructor(private readonly dynamics: Dynamics) {}

  /** Settles the mode at a state. Returns false where the problem has no solution. */
  settle(t: number, q: Float64Array, v: Float64Array, decided: Decided = {}): boolean {
    const { dynamics } = this;
    const closed = this.candidates(t, q, v, decided.opened);
    dynamics.groups = groupsOf(closed);
    this.classify(t, q, v, decided);
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      const outcome = this.round(t, q, v, closed);
      if (outcome === 'noSolution') return false;
      if (outcome === 'settled') break;
      if (outcome === 'rebound') {
        // What a joint's or a roller's friction could not hold may have made a contact slip that need not.
        for (const unilateral of closed) unilateral.isClosed = true;
        dynamics.groups = groupsOf(closed);
        this.classifyGroups(v, decided);
      }
    }
    return true;
  }

  /** Everything that touches and does not part already. */
  private candidates(t: number, q: Float64Array, v: Float64Array, opened: Unilateral | undefined): Unilateral[] {
    const closed: Unilateral[] = [];
    for (const unilateral of this.dynamics.parts.unilaterals) {
      const wasClosed = unilateral.isClosed;
      // One that was closed goes on by the law of where it is now: the next piece of track, the next face.
      if (wasClosed && unilateral instanceof ContactPoint) unilateral.mark(q, v);
      else unilateral.locate(q);
      unilateral.isClosed = false;
      const isNear = unilateral.isValid && touches(unilateral);
      const isArmed = !(unilateral instanceof ContactPoint) || unilateral.isArmed;
      if (unilateral !== opened && isNear && isArmed) {
        unilateral.aim(q, v, t);
        // One that was closed is not let go by the rounding of a landing; the next projection takes that out.
        unilateral.isClosed = unilateral.rate(v) <= (wasClosed ? LANDING : STILL);
        if (unilateral.isClosed && !wasClosed && unilateral instanceof ContactPoint) unilateral.mark(q, v);
      }
      if (unilateral.isClosed && isDouble(unilateral, closed)) unilateral.isClosed = false;
      if (unilateral.isClosed) closed.push(unilateral);
      else if (wasClosed || isNear) unilateral.slack = Math.max(0, -unilateral.gap) + 1e-13;
      unilateral.lambda = 0;
    }
    return closed;
  }

  private classifyGroups(v: Float64Array, { loose }: Decided): void {
    for (const group of this.dynamics.groups) {
      const known =
        loose && 'members' in loose.what && loose.what.members.some((member) => group.members.includes(member));
      group.sliding = known ? loose.sliding : signOf(group.members[0].slip(v));
    }
  }

  private classify(t: number, q: Float64Array, v: Float64Array, { loose }: Decided): void {
    const { dynamics } = this;
    dynamics.update(t, q, v);
    this.classifyGroups(v, { loose });
    for (const friction of dynamics.parts.frictions) {
      friction.sliding = loose?.what === friction ? loose.sliding : signOf(friction.row.rate(v));
      if (friction.sliding !== 0) friction.lambda = -friction.sliding * friction.bound();
    }
    for (const point of dynamics.parts.soft) {
      if (!point.isPressed) continue;
      point.sliding = loose?.what === point ? loose.sliding : signOf(point.point.slip(v));
    }
  }

  /** One complementarity problem with the present classes; reclassifies what breaks loose in it. */
  private round(
    t: number,
    q: Float64Array,
    v: Float64Array,
    closed: readonly Unilateral[],
  ): 'settled' | 'again' | 'rebound' | 'noSolution' {
    const { dynamics } = this;
    const { system, parts } = dynamics;
    for (const unilateral of closed) unilateral.isClosed = true;
    dynamics.groups = dynamics.groups.map((group) => ({ ...group, members: group.members }));
    const sticking = this.tangentials(closed);
    const free = dynamics.applied(t, q, v);
    // Friction that rides on a reaction not known yet is taken to hold, and checked afterwards.
    const held = parts.frictions.filter((friction) => holdsUnknown(friction)).map(({ row }) => row);
    const problem = new ContactProblem(system, parts.joints, held);
    const joints = parts.joints.filter(({ isReleased }) => !isReleased);
    const targets = Float64Array.from([
      ...joints.flatMap(({ rows, changes }) => rows.map(({ gamma }, k) => changes[k] - gamma)),
      ...held.map(({ gamma }) => -gamma),
    ]);
    problem.holdJoints(free, targets);
    const groupOf = (unilateral: Unilateral): FrictionGroup | undefined =>
      dynamics.groups.find(({ members }) => members.includes(unilateral as ContactPoint));
    const solution = problem.solve(
      closed.map((unilateral) => ({ row: unilateral.normal, along: forceRow(unilateral, groupOf(unilateral)) })),
      sticking.map(({ tangential }) => tangential),
      Float64Array.from(closed, ({ normal }) => normal.rate(free) + normal.gamma),
      Float64Array.from(sticking, ({ tangential: { row }, change }) => row.rate(free) + row.gamma - change),
    );
    if (!solution) return 'noSolution';
    let again = false;
    sticking.forEach(({ what, drops }, k) => {
      const rate = solution.tangentialRates[k];
      if (Math.abs(rate) <= NIL * 100) return;
      what.sliding = rate > 0 ? 1 : -1;
      again ||= drops;
    });
    if (again) return 'again';
    closed.forEach((unilateral, i) => {
      unilateral.isClosed = solution.normals[i] > NIL;
      if (!unilateral.isClosed) unilateral.slack = Math.max(0, -unilateral.gap) + 1e-13;
    });
    dynamics.groups = dynamics.groups
      .map((group) => ({ ...group, members: group.members.filter(({ isClosed }) => isClosed) }))
      .filter(({ members }) => members.length > 0);
    return this.checkBounds(t, q, v);
  }

  /** Friction that rides on a joint's reaction has its bound only now: once more where it changed the verdict. */
  private checkBounds(t: number, q: Float64Array, v: Float64Array): 'settled' | 'rebound' {
    const { dynamics } = this;
    dynamics.accelerate(t, q, v);
    let again = false;
    for (const friction of dynamics.parts.frictions) {
      if (!friction.isActive || friction.sliding !== 0) continue;
      if (Math.abs(friction.lambda) <= friction.bound() * (1 + 1e-12)) continue;
      friction.sliding = friction.lambda > 0 ? -1 : 1;
      friction.lambda = -friction.sliding * friction.bound();
      again = true;
    }
    return again ? 'rebound' : 'settled';
  }

  private tangentials(closed: readonly Unilateral[]): Sticking[] {
    const { dynamics } = this;
    const list: Sticking[] = [];
    for (const group of dynamics.groups) {
      const { pair, members, sliding } = group;
      if (sliding !== 0 || pair.staticFriction === 0) continue;
      const [lead] = members;
      const normals = members.map((member) => closed.indexOf(member));
      list.push({
        what: group,
        drops: true,
        change: lead.surfaceChange,
        tangential: { row: lead.tangent, coefficient: pair.staticFriction, normals, constant: 0 },
      });
    }
    for (const friction of dynamics.parts.frictions) {
      if (!friction.isActive || friction.sliding !== 0 || holdsUnknown(friction)) continue;
      const constant = friction.bound();
      list.push({
        what: friction,
        drops: false,
        change: 0,
        tangential: { row: friction.row, coefficient: 0, normals: [], constant },
      });
    }
    for (const point of dynamics.parts.soft) {
      if (!point.isPressed || point.sliding !== 0 || !point.rubs) continue;
      const constant = point.point.pair.staticFriction * Math.max(0, point.normal);
      list.push({
        what: point,
        drops: true,
        change: point.point.surfaceChange,
        tangential: { row: point.point.tangent, coefficient: 0, normals: [], constant },
      });
    }
    return list;
  }
}

interface Sticking {
  what: { sliding: 1 | -1 | 0 };
  tangential: Tangential;
  /** Its kinetic coefficient differs (or it must be mixed into the normals), so that the problem is solved again. */
  drops: boolean;
  change: number;
}

/** Two corners that meet corner to corner are each on the other's face: one point is enough. */
export function isDouble(one: Unilateral, others: readonly Unilateral[]): boolean {
  if (!(one instanceof ContactPoint)) return false;
  return others.some(
    (other) =>
      other instanceof ContactPoint &&
      other.pair === one.pair &&
      Math.hypot(other.x - one.x, other.y - one.y) <= 10 * TOUCHING &&
      Math.abs(other.nx * one.ny - other.ny * one.nx) <= 1e-6,
  );
}

/** It is at its surface, or so little behind that it is held to be. */
export const touches = ({ gap }: Unilateral): boolean => gap <= TOUCHING && gap >= -BEHIND;

const holdsUnknown = (friction: DryFriction): boolean =>
  friction.isActive && friction.sliding === 0 && friction.bound() === 0;

const signOf = (slip: number): 1 | -1 | 0 => (Math.abs(slip) <= STILL ? 0 : slip > 0 ? 1 : -1);

/** Closed points of one pair along one tangent. */
export function groupsOf(closed: readonly Unilateral[]): FrictionGroup[] {
  const groups: FrictionGroup[] = [];
  for (const point of closed) {
    if (!(point instanceof ContactPoint)) continue;
    const { pair, nx, ny } = point;
    const mate = groups.find(
      ({ pair: other, members: [lead] }) =>
        other === pair &&
        lead.bodyA === point.bodyA &&
        lead.bodyB === point.bodyB &&
        Math.abs(lead.nx * ny - lead.ny * nx) < 1e-7 &&
        lead.nx * nx + lead.ny * ny > 0,
    );
    if (mate) mate.members.push(point);
    else groups.push({ pair, members: [point], sliding: 0, lambda: 0 });
  }
  return groups;
}
