import { AxisRow } from '../axis-row.js';
import { MANIFOLD_CIRCLES, MANIFOLD_FACE_A } from '../planck-internals.js';
import { partInner, type Scene } from '../scene.js';
import type { ContactManager } from './manager.js';
import { addWork, type Pair } from './pair.js';
import type { Touch } from './touch.js';

const SATURATED = 1 - 1e-9;

/** A compliant contact point: a one-sided spring and damper along the normal, Coulomb friction along the tangent. */
interface SoftPoint {
  touch: Touch;
  pair: Pair;
  key: number;
  normal: AxisRow;
  tangent: AxisRow;
  gap: number;
  stiffness: number;
  damping: number;
  x: number;
  y: number;
  /** Energy stored at the start of the step. */
  stored: number;
  workSpring: number;
  sliding: 1 | -1 | 0;
}

/** Contacts with `stiffness`: forces of the overlap, so that no impact is needed and the energy stays booked. */
export class SoftContacts {
  private readonly points = new Map<string, SoftPoint>();
  private live: SoftPoint[] = [];
  private half = 0;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
  ) {}

  get isEmpty(): boolean {
    return !this.manager.pairs.some((pair) => pair.isSoft);
  }

  prepare(half: number): void {
    this.half = half;
    this.live = [];
    for (const touch of this.manager.touches) {
      if (!touch.armed || touch.pair < 0 || !this.manager.pairs[touch.pair].isSoft) continue;
      this.manager.evaluate(touch);
      if (touch.pair < 0) continue;
      for (let i = 0; i < touch.count; i += 1) {
        const candidate = touch.candidates[i as 0 | 1];
        if (candidate.gap < 0) this.live.push(this.ready(touch, candidate.key, candidate.gap, i as 0 | 1));
      }
    }
  }

  private ready(touch: Touch, key: number, gap: number, i: 0 | 1): SoftPoint {
    const name = `${touch.id}/${key}`;
    const pair = this.manager.pairs[touch.pair];
    let point = this.points.get(name);
    if (point?.touch !== touch) {
      point = this.newPoint(touch, pair, key);
      this.points.set(name, point);
    }
    const faces = touch.shapeA.kind === 'core' ? touch.shapeA.vertices.length > 1 : true;
    const shared = (touch.shapeB.vertices.length > 1 || touch.shapeB.isCorner) && faces ? 2 : 1;
    point.stiffness = pair.stiffness / shared;
    point.damping = pair.damping / shared;
    point.gap = gap;
    aimPoint(this.scene, touch, i, point);
    point.normal.impulse = 0;
    point.tangent.impulse = 0;
    return point;
  }

  private newPoint(touch: Touch, pair: Pair, key: number): SoftPoint {
    const a = partInner(this.scene, touch.bodyA);
    const b = partInner(this.scene, touch.bodyB);
    const rows = { normal: new AxisRow(a, b), tangent: new AxisRow(a, b) };
    const empty = { gap: 0, stiffness: 0, damping: 0, x: 0, y: 0, stored: 0, workSpring: 0, sliding: 0 as const };
    return { touch, pair, key, ...rows, ...empty };
  }

  /** The normal force at the mean rate: implicit in the damping, explicit in the spring; it never pulls. */
  solve(): void {
    for (const point of this.live) {
      const { normal, tangent, pair } = point;
      const strength = this.half * point.damping;
      const free = normal.rate() - normal.impulse / normal.mass;
      const wanted = (-this.half * point.stiffness * point.gap - strength * free) / (1 + strength / normal.mass);
      const next = Math.max(0, wanted);
      normal.apply(next - normal.impulse);
      normal.impulse = next;
      const coefficient = point.sliding === 0 ? pair.staticFriction : pair.kineticFriction;
      const speed = this.surfaceSpeed(point);
      tangent.solve(speed, -coefficient * next, coefficient * next);
    }
  }

  /** Normal impulse of a pair in the present solve. */
  normalImpulse(pair: Pair): number {
    let sum = 0;
    for (const point of this.live) if (point.pair === pair) sum += point.normal.impulse;
    return sum;
  }

  private surfaceSpeed({ touch, tangent }: SoftPoint): number {
    if (touch.shapeA.kind === 'core') return 0;
    const link = touch.shapeA.chain.links[touch.foot.link];
    const speed = this.manager.surfaceSpeed(link.track, this.scene.time);
    const { foot } = touch.foot;
    return speed === 0 ? 0 : speed * Math.sign(foot.tx * tangent.nx + foot.ty * tangent.ny);
  }

  book(): void {
    const { scene } = this;
    const force = this.half > 0 ? 1 / this.half : 0;
    for (const point of this.live) {
      const { normal, pair, touch } = point;
      const { bodyA } = touch;
      const springImpulse = -2 * this.half * point.stiffness * point.gap;
      const rest = 2 * normal.impulse - springImpulse;
      point.workSpring = springImpulse * normal.rate();
      addWork(pair.spring, pair, bodyA, -springImpulse * normal.rateA(), springImpulse * normal.rateB());
      addWork(pair.damper, pair, bodyA, -rest * normal.rateA(), rest * normal.rateB());
      pair.damper?.heat(-rest * normal.rate());
      this.bookFriction(point, scene, force);
    }
  }

  private bookFriction(point: SoftPoint, scene: Scene, force: number): void {
    const { normal, tangent, pair, touch } = point;
    const coefficient = point.sliding === 0 ? pair.staticFriction : pair.kineticFriction;
    const saturated = Math.abs(tangent.impulse) >= coefficient * normal.impulse * SATURATED;
    const impulse = 2 * tangent.impulse;
    const speed = this.surfaceSpeed(point);
    const slip = tangent.rate() - speed;
    let onA = -impulse * tangent.rateA();
    let onB = impulse * tangent.rateB();
    if (saturated) pair.friction?.heat(-impulse * slip);
    else {
      const left = impulse * slip;
      scene.numerical.share('solver-residual', touch.bodyA, touch.bodyB, left);
      const half = touch.bodyA >= 0 && touch.bodyB >= 0 ? left / 2 : left;
      onA -= touch.bodyA >= 0 ? half : 0;
      onB -= half;
    }
    if (impulse !== 0) addWork(pair.friction, pair, touch.bodyA, onA, onB);
    point.sliding = saturated && normal.impulse > 0 ? (slip > 0 ? 1 : -1) : 0;
    const { reading } = pair;
    reading.points += 1;
    reading.normal += normal.impulse * force;
    reading.friction += tangent.impulse * force;
    reading.slip = slip;
    reading.x = point.x;
    reading.y = point.y;
    const sign = pair.first === touch.bodyB ? 1 : -1;
    reading.nx = sign * normal.nx;
    reading.ny = sign * normal.ny;
    reading.segment = touch.segment;
  }

  /** At the step's end: stored energy, and what the springs' impulses missed of it. */
  arrive(): void {
    this.restore('force-truncation');
  }

  project(): void {
    for (const point of this.points.values()) point.workSpring = 0;
    this.restore('position-projection');
  }

  private restore(cause: 'force-truncation' | 'position-projection'): void {
    const stored = new Map<Pair, number>();
    for (const point of this.points.values()) {
      const { touch, pair } = point;
      const now = this.storedNow(point);
      const missed = point.workSpring + (now - point.stored);
      if (missed !== 0) {
        this.scene.numerical.share(cause, touch.bodyA, touch.bodyB, missed);
        const half = touch.bodyA >= 0 && touch.bodyB >= 0 ? missed / 2 : missed;
        addWork(pair.spring, pair, touch.bodyA, touch.bodyA >= 0 ? -half : 0, -half);
      }
      point.stored = now;
      point.workSpring = 0;
      stored.set(pair, (stored.get(pair) ?? 0) + now);
    }
    for (const [pair, energy] of stored) if (pair.spring) pair.spring.booked.stored = energy;
  }

  private storedNow(point: SoftPoint): number {
    const { touch, key } = point;
    for (let i = 0; i < touch.count; i += 1) {
      const candidate = touch.candidates[i as 0 | 1];
      if (candidate.key === key && candidate.gap < 0) return 0.5 * point.stiffness * candidate.gap ** 2;
    }
    return 0;
  }
}

/** Aims a point's rows at the present configuration. */
function aimPoint(scene: Scene, touch: Touch, i: 0 | 1, point: SoftPoint): void {
  const { m_fixtureA, m_fixtureB } = touch.contact;
  const poseA = m_fixtureA.m_body.m_xf;
  const poseB = m_fixtureB.m_body.m_xf;
  const { local } = touch.candidates[i];
  const place = (pose: typeof poseA, v: { x: number; y: number }): [number, number] => [
    pose.p.x + pose.q.c * v.x - pose.q.s * v.y,
    pose.p.y + pose.q.s * v.x + pose.q.c * v.y,
  ];
  let nx: number;
  let ny: number;
  let at: [number, number];
  if (touch.type === MANIFOLD_CIRCLES) {
    const [ax, ay] = place(poseA, touch.point);
    const [bx, by] = place(poseB, local);
    const away = Math.hypot(bx - ax, by - ay);
    [nx, ny] = [(bx - ax) / away, (by - ay) / away];
    at = [bx - nx * touch.shapeB.m_radius, by - ny * touch.shapeB.m_radius];
  } else {
    const isA = touch.type === MANIFOLD_FACE_A;
    const { q } = isA ? poseA : poseB;
    const sign = isA ? 1 : -1;
    nx = sign * (q.c * touch.normal.x - q.s * touch.normal.y);
    ny = sign * (q.s * touch.normal.x + q.c * touch.normal.y);
    const [px, py] = place(isA ? poseB : poseA, local);
    const radius = isA ? touch.shapeB.m_radius : -touch.shapeA.m_radius;
    at = [px - nx * radius, py - ny * radius];
  }
  point.normal.aim(nx, ny, at[0], at[1]);
  point.tangent.aim(ny, -nx, at[0], at[1]);
  [point.x, point.y] = at;
}
