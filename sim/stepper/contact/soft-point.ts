import { AxisRow } from '../axis-row.js';
import type { Friction } from '../element.js';
import { MANIFOLD_CIRCLES, MANIFOLD_FACE_A, type Pose } from '../planck-internals.js';
import { partInner, type Scene } from '../scene.js';
import { addWork, type Pair } from './pair.js';
import type { Touch } from './touch.js';

/** Share of its bound at which friction has reached it: impulses of short steps are no more exact than this. */
const SATURATED = 1 - 1e-6;

/** Speed of a surface along its path at an engine time. */
export type Belt = (time: number) => number;
export const STANDS_STILL: Belt = () => 0;

/**
 * A compliant contact point: along the normal a one-sided spring (explicit, at mid-step) and damper (implicit) that never
 * pull together, along the tangent Coulomb friction.
 */
export class SoftPoint implements Friction {
  sliding: 1 | -1 | 0 = 0;
  readonly a: number;
  readonly b: number;
  readonly normal: AxisRow;
  /** The tangential row, of the friction. */
  readonly row: AxisRow;
  readonly drops: boolean;
  gap = 0;
  /** Gap at the end of the step before. */
  gapBefore = 0;
  x = 0;
  y = 0;
  /** Energy stored, and whether it pressed in the last step. */
  stored = 0;
  isEngaged = false;
  /** The points of its touch in the present solve. */
  face: SoftPoint[] = [this];
  springWork = 0;
  private readonly stiffness: number;
  private readonly damping: number;
  /** Speed of a belt's surface along its path at an engine time, and which way the path runs along the row. */
  private belt: Belt = STANDS_STILL;
  private beltSense = 1;
  /** A belt's speed along the row at mid-step. */
  private surfaceSpeed = 0;

  constructor(
    private readonly scene: Scene,
    readonly touch: Touch,
    readonly key: number,
    readonly pair: Pair,
  ) {
    this.a = touch.bodyA;
    this.b = touch.bodyB;
    this.normal = new AxisRow(partInner(scene, this.a), partInner(scene, this.b));
    this.row = new AxisRow(partInner(scene, this.a), partInner(scene, this.b));
    this.drops = pair.staticFriction !== pair.kineticFriction;
    // The pair's value is shared among the points of a face: two, unless one of the two is round.
    const isFaced = touch.shapeB.vertices.length > 1 || touch.shapeB.isCorner;
    const meetsFace = touch.shapeA.kind !== 'core' || touch.shapeA.vertices.length > 1;
    const points = isFaced && meetsFace ? 2 : 1;
    this.stiffness = pair.stiffness / points;
    this.damping = pair.damping / points;
  }

  energyOf(gap: number): number {
    return gap < 0 ? 0.5 * this.stiffness * gap * gap : 0;
  }

  /** Aims the rows at the present configuration, for a solve at `time`. */
  aimAt(index: 0 | 1, belt: Belt, time: number): void {
    const { nx, ny, x, y } = frameOf(this.touch, index);
    this.normal.aim(nx, ny, x, y);
    this.row.aim(ny, -nx, x, y);
    this.x = x;
    this.y = y;
    this.normal.impulse = 0;
    this.row.impulse = 0;
    const { foot } = this.touch.foot;
    this.belt = belt;
    this.beltSense = Math.sign(foot.tx * ny - foot.ty * nx);
    this.surfaceSpeed = this.beltSpeed(time);
  }

  private beltSpeed(time: number): number {
    return this.belt(time) * this.beltSense;
  }

  startSliding(): void {
    const slip = this.row.rate() - this.surfaceSpeed;
    this.sliding = Math.abs(slip) < 1e-8 ? 0 : slip > 0 ? 1 : -1;
  }

  private coefficient(): number {
    return this.sliding === 0 ? this.pair.staticFriction : this.pair.kineticFriction;
  }

  solve(half: number): void {
    const { normal, row } = this;
    const strength = half * this.damping;
    const free = normal.rate() - normal.impulse / normal.mass;
    const wanted = (-half * this.stiffness * this.gap - strength * free) / (1 + strength / normal.mass);
    const next = Math.max(0, wanted);
    normal.apply(next - normal.impulse);
    normal.impulse = next;
    const most = this.coefficient() * next;
    row.solve(this.surfaceSpeed, -most, most);
  }

  /** Friction of the whole face: one of its points may well be at its bound while the others hold them all. */
  private friction(): number {
    return this.face.reduce((sum, { row }) => sum + row.impulse, 0);
  }

  private isSaturated(): boolean {
    const most = this.face.reduce((sum, point) => sum + point.coefficient() * point.normal.impulse, 0);
    return Math.abs(this.friction()) >= most * SATURATED;
  }

  isHolding(): boolean {
    return this.sliding === 0 && this.normal.impulse > 0 && !this.isSaturated();
  }

  breakaway(): 1 | -1 | 0 {
    const friction = this.friction();
    if (this.normal.impulse === 0 || friction === 0 || !this.isSaturated()) return 0;
    return friction > 0 ? -1 : 1;
  }

  slip(time: number): number {
    return this.row.rate() - this.beltSpeed(time);
  }

  aim(): void {
    // The rows stay as aimed at mid-step: half a step's turn is of no weight in a correction.
    this.row.impulse = 0;
  }

  hold(): void {
    this.row.solve(this.beltSpeed(this.scene.time), -Infinity, Infinity);
  }

  book(half: number): void {
    const { normal, pair, a } = this;
    const springImpulse = normal.impulse > 0 ? -2 * half * this.stiffness * this.gap : 0;
    const rest = 2 * normal.impulse - springImpulse;
    this.springWork = springImpulse * normal.rate();
    addWork(pair.accounts.spring, pair, a, -springImpulse * normal.rateA(), springImpulse * normal.rateB());
    addWork(pair.accounts.damper, pair, a, -rest * normal.rateA(), rest * normal.rateB());
    pair.accounts.damper?.heat(-rest * normal.rate());
    this.bookFriction();
    this.note(half > 0 ? 1 / half : 0);
  }

  private bookFriction(): void {
    const { row, pair, a, b } = this;
    const impulse = 2 * row.impulse;
    if (impulse === 0) return;
    const slip = row.rate() - this.surfaceSpeed;
    let onA = -impulse * row.rateA();
    let onB = impulse * row.rateB();
    if (this.isSaturated()) pair.accounts.friction?.heat(-impulse * slip);
    else {
      const left = impulse * slip;
      this.scene.numerical.share('solver-residual', a, b, left);
      const half = a >= 0 ? left / 2 : left;
      onA -= a >= 0 ? half : 0;
      onB -= half;
    }
    addWork(pair.accounts.friction, pair, a, onA, onB);
  }

  private note(force: number): void {
    const { pair, normal } = this;
    const { reading } = pair;
    const sign = pair.first === this.b ? 1 : -1;
    reading.points += 1;
    reading.normal += normal.impulse * force;
    reading.friction += this.row.impulse * force;
    reading.slip = this.row.rate() - this.surfaceSpeed;
    reading.x = this.x;
    reading.y = this.y;
    reading.nx = sign * normal.nx;
    reading.ny = sign * normal.ny;
    reading.segment = this.touch.segment;
  }
}

const frame = { nx: 0, ny: 0, x: 0, y: 0 };

/**
 * Normal (from A to B) and place of a candidate at the bodies' present transforms.
 * @returns an object that the next call overwrites
 */
export function frameOf(touch: Touch, index: 0 | 1): Readonly<typeof frame> {
  const poseA = touch.contact.m_fixtureA.m_body.m_xf;
  const poseB = touch.contact.m_fixtureB.m_body.m_xf;
  const { local } = touch.candidates[index];
  if (touch.type === MANIFOLD_CIRCLES) {
    const bx = placeX(poseB, local);
    const by = placeY(poseB, local);
    const dx = bx - placeX(poseA, touch.point);
    const dy = by - placeY(poseA, touch.point);
    const away = Math.hypot(dx, dy);
    return framed(dx / away, dy / away, bx, by, touch.shapeB.m_radius);
  }
  const isA = touch.type === MANIFOLD_FACE_A;
  const { q } = isA ? poseA : poseB;
  const sign = isA ? 1 : -1;
  const nx = sign * (q.c * touch.normal.x - q.s * touch.normal.y);
  const ny = sign * (q.s * touch.normal.x + q.c * touch.normal.y);
  const pose = isA ? poseB : poseA;
  const radius = isA ? touch.shapeB.m_radius : -touch.shapeA.m_radius;
  return framed(nx, ny, placeX(pose, local), placeY(pose, local), radius);
}

function framed(nx: number, ny: number, x: number, y: number, radius: number): typeof frame {
  frame.nx = nx;
  frame.ny = ny;
  frame.x = x - nx * radius;
  frame.y = y - ny * radius;
  return frame;
}

const placeX = ({ p, q }: Pose, v: { x: number; y: number }): number => p.x + q.c * v.x - q.s * v.y;
const placeY = ({ p, q }: Pose, v: { x: number; y: number }): number => p.y + q.s * v.x + q.c * v.y;
