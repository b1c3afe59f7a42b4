import type { LinearSpring, TorsionSpring } from '../../mechanism/kinds/spring.js';
import { AxisRow } from '../axis-row.js';
import { PairAccount } from '../books.js';
import type { Element } from '../element.js';
import { anchorAt, anchorOf, partIndex, partInner, type Anchor, type Scene } from '../scene.js';

/** Force of a spring over its deflection and the energy stored, in engine units. */
interface Law {
  force(deflection: number): number;
  energy(deflection: number): number;
}

/** What the recorder reads of a spring or damper, in SI. */
export interface LinkReading {
  deflection: number;
  force: number;
}

/**
 * A spring as an explicit force at mid-step: for a conservative force the midpoint rule is the position Verlet method
 * (Hairer, Lubich & Wanner, *Geometric Numerical Integration*, 2006, I.1.4): second order, no drift of the energy. What
 * its impulses miss of the stored energy is booked as force-truncation.
 */
export abstract class SpringElement implements Element {
  readonly row: AxisRow;
  private readonly account: PairAccount;
  private energy = 0;
  private workA = 0;
  private workB = 0;
  protected pull = 0;
  /** Direction of its row at mid-step, a step ago, and whether that has turned round since. */
  private beforeX = 0;
  private beforeY = 0;
  hasTurnedRound = false;

  constructor(
    protected readonly scene: Scene,
    readonly id: string,
    protected readonly a: number,
    protected readonly b: number,
  ) {
    this.row = new AxisRow(partInner(scene, a), partInner(scene, b));
    const booked = scene.books.open('spring', id, PairAccount.bodies(scene.ids, a, b), { stored: true });
    this.account = new PairAccount(booked, a, b);
  }

  /** Aims the row along the spring at the present configuration; returns its force, positive when it pulls. */
  protected abstract aim(): number;
  protected abstract storedNow(): number;
  /** Greatest slope of its law, in engine units. */
  protected abstract readonly stiffest: number;
  abstract reading(): LinkReading;

  begin(): void {
    this.energy = this.storedNow();
    this.account.booked.stored = this.energy;
  }

  /** Aims the row at the present configuration; returns how stiff the spring is at the most. */
  ready(): number {
    this.aim();
    return this.stiffest;
  }

  push(half: number): void {
    this.pull = this.aim();
    this.row.impulse = -this.pull * half;
    this.row.apply(this.row.impulse);
  }

  book(): void {
    const impulse = 2 * this.row.impulse;
    this.workA = -impulse * this.row.rateA();
    this.workB = impulse * this.row.rateB();
    const { nx, ny } = this.row;
    this.hasTurnedRound = nx * this.beforeX + ny * this.beforeY < 0;
    this.beforeX = nx;
    this.beforeY = ny;
  }

  arrive(): void {
    const { a, b, scene } = this;
    const now = this.storedNow();
    const missed = this.workA + this.workB + (now - this.energy);
    scene.numerical.share('force-truncation', a, b, missed);
    const half = a >= 0 && b >= 0 ? missed / 2 : missed;
    this.account.add(this.workA - half, this.workB - half);
    this.setEnergy(now);
  }

  project(): void {
    const { a, b, scene } = this;
    const now = this.storedNow();
    const change = now - this.energy;
    scene.numerical.share('position-projection', a, b, change);
    const half = a >= 0 && b >= 0 ? change / 2 : change;
    this.account.add(-half, -half);
    this.setEnergy(now);
  }

  private setEnergy(now: number): void {
    this.energy = now;
    this.account.booked.stored = now;
  }
}

class LinearSpringElement extends SpringElement {
  private readonly anchorA: Anchor;
  private readonly anchorB: Anchor;
  private readonly free: number;
  private readonly law: Law;
  protected readonly stiffest: number;
  private readonly pointA = { x: 0, y: 0 };
  private readonly pointB = { x: 0, y: 0 };

  constructor(scene: Scene, spring: LinearSpring) {
    const [from, to] = spring.between;
    super(scene, spring.id, partIndex(scene, from.of), partIndex(scene, to.of));
    this.anchorA = anchorOf(scene, from);
    this.anchorB = anchorOf(scene, to);
    this.free = spring.freeLength / scene.scale.length;
    this.law = lawOf(spring, scene);
    this.stiffest = (spring.curve ? steepest(spring.curve) : spring.rate) / scene.scale.rate;
  }

  private length(): number {
    anchorAt(this.scene, this.anchorA, this.pointA);
    anchorAt(this.scene, this.anchorB, this.pointB);
    return Math.hypot(this.pointB.x - this.pointA.x, this.pointB.y - this.pointA.y);
  }

  protected aim(): number {
    const { pointA: p, pointB: q, row } = this;
    const length = this.length();
    // Ends that coincide leave no line to pull along.
    const scale = length > 0 ? 1 / length : 0;
    row.aimBetween((q.x - p.x) * scale, (q.y - p.y) * scale, p.x, p.y, q.x, q.y);
    return this.law.force(length - this.free);
  }

  protected storedNow(): number {
    return this.law.energy(this.length() - this.free);
  }

  reading(): LinkReading {
    const deflection = this.length() - this.free;
    const { length, force } = this.scene.scale;
    return { deflection: deflection * length, force: this.law.force(deflection) * force };
  }
}

class TorsionSpringElement extends SpringElement {
  private readonly rate: number;
  protected readonly stiffest: number;
  private readonly free: number;

  constructor(scene: Scene, spring: TorsionSpring) {
    // Row B is the first part, so that its rate is the first's spin relative to the second.
    super(scene, spring.id, partIndex(scene, spring.between[1]), partIndex(scene, spring.between[0]));
    this.rate = spring.rate / scene.scale.energy;
    this.stiffest = this.rate;
    this.free = spring.freeAngle;
    this.row.turn();
  }

  private deflection(): number {
    return turnOf(this.scene, this.b) - turnOf(this.scene, this.a) - this.free;
  }

  protected aim(): number {
    return this.rate * this.deflection();
  }

  protected storedNow(): number {
    return 0.5 * this.rate * this.deflection() ** 2;
  }

  reading(): LinkReading {
    const deflection = this.deflection();
    return { deflection, force: this.rate * deflection * this.scene.scale.energy };
  }
}

/** How far a part has turned since drawn [rad]. */
export const turnOf = (scene: Scene, part: number): number =>
  part < 0 ? 0 : scene.bodies[part].m_sweep.a - scene.start.a[part];

function lawOf(spring: LinearSpring, { scale }: Scene): Law {
  const law = spring.curve
    ? curveLaw(spring.curve.map(([d, f]) => [d / scale.length, f / scale.force]))
    : rateLaw(spring.rate / scale.rate);
  if (spring.acts === 'both') return law;
  const acts = spring.acts === 'compression' ? (d: number) => d < 0 : (d: number) => d > 0;
  return {
    force: (d) => (acts(d) ? law.force(d) : 0),
    energy: (d) => (acts(d) ? law.energy(d) : 0),
  };
}

/** Greatest slope of a curve of force over deflection. */
export function steepest(curve: readonly (readonly [number, number])[]): number {
  return Math.max(...curve.slice(1).map(([d, f], i) => Math.abs((f - curve[i][1]) / (d - curve[i][0]))));
}

const rateLaw = (rate: number): Law => ({ force: (d) => rate * d, energy: (d) => 0.5 * rate * d * d });

/** Piecewise linear force; its energy is counted from nil deflection, and the last slopes go on. */
function curveLaw(points: number[][]): Law {
  const slope = (i: number): number => (points[i + 1][1] - points[i][1]) / (points[i + 1][0] - points[i][0]);
  const span = (d: number): number => {
    let i = 0;
    while (i < points.length - 2 && d > points[i + 1][0]) i += 1;
    return i;
  };
  const force = (d: number): number => {
    const i = span(d);
    return points[i][1] + slope(i) * (d - points[i][0]);
  };
  const primitive = (d: number): number => {
    const last = span(d);
    let sum = 0;
    for (let i = 0; i < last; i += 1) {
      sum += 0.5 * (points[i][1] + points[i + 1][1]) * (points[i + 1][0] - points[i][0]);
    }
    return sum + 0.5 * (points[last][1] + force(d)) * (d - points[last][0]);
  };
  const zero = primitive(0);
  return { force, energy: (d) => primitive(d) - zero };
}

export const linearSpring = (scene: Scene, spring: LinearSpring): SpringElement =>
  new LinearSpringElement(scene, spring);
export const torsionSpring = (scene: Scene, spring: TorsionSpring): SpringElement =>
  new TorsionSpringElement(scene, spring);
