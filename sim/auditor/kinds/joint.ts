import type { Pin, Slide, Weld } from '../../mechanism/kinds/joint.js';
import type { Bilateral, DryFriction } from '../element.js';
import type { Account } from '../ledgers.js';
import { Row } from '../row.js';
import {
  markOf,
  newPlaced,
  partOf,
  placeMark,
  spinOf,
  turnOf,
  type Mark,
  type Placed,
  type System,
} from '../system.js';
import { Unilateral } from '../unilateral.js';

export type AuditedJoint = Pin | Slide | Weld;

/** A joint of the auditor: its constraints, its free motion, and what rubs or stops on that. */
export class JointParts implements Bilateral {
  readonly id: string;
  readonly kind: AuditedJoint['kind'];
  readonly first: number;
  readonly second: number;
  readonly rows: Row[];
  readonly errors: Float64Array;
  readonly speeds: Float64Array;
  readonly changes: Float64Array;
  readonly lambda: Float64Array;
  readonly account: Account;
  isReleased = false;
  readonly friction: DryFriction | null = null;
  readonly stops: Unilateral[] = [];
  private readonly a: Mark;
  private readonly b: Mark;
  private readonly pa = newPlaced();
  private readonly pb = newPlaced();
  /** Axis of a slide in the frame of the second part. */
  private readonly axis: [number, number] = [1, 0];
  /** Length of the massless link of a particle pinned away from itself. */
  private readonly link: number;

  constructor(
    private readonly system: System,
    joint: AuditedJoint,
  ) {
    this.id = joint.id;
    this.kind = joint.kind;
    this.first = partOf(system, joint.between[0]);
    this.second = partOf(system, joint.between[1]);
    const at = joint.kind === 'weld' ? this.weldPoint() : joint.at;
    this.link = joint.kind === 'pin' ? this.linkLength(at) : 0;
    this.a = this.markAt(joint.between[0], this.first, at);
    this.b = this.markAt(joint.between[1], this.second, at);
    if (joint.kind === 'slide') this.axis = this.localAxis(joint.axis);
    const rows = this.link > 0 ? 1 : joint.kind === 'weld' ? 3 : 2;
    this.rows = Array.from({ length: rows }, () => new Row());
    this.errors = new Float64Array(rows);
    this.speeds = new Float64Array(rows);
    this.changes = new Float64Array(rows);
    this.lambda = new Float64Array(rows);
    this.account = system.ledgers.open('reaction', joint.id, [this.first, this.second]);
    if (joint.kind !== 'weld') {
      if (joint.friction) this.friction = this.rubbing(joint);
      if (joint.limits) {
        const { from, to, restitution } = joint.limits;
        const impact = system.ledgers.open('impact', joint.id, [this.first, this.second], { heat: true });
        this.stops.push(
          new JointStop(this, from, 1, restitution, impact),
          new JointStop(this, to, -1, restitution, impact),
        );
      }
    }
  }

  private weldPoint(): [number, number] {
    const body = this.first >= 0 ? this.first : this.second;
    const q = this.system.startPositions;
    return [q[3 * body], q[3 * body + 1]];
  }

  private linkLength([x, y]: readonly [number, number]): number {
    const point = [this.first, this.second].find((part) => part >= 0 && this.isPointAway(part, x, y));
    if (point === undefined) return 0;
    const q = this.system.startPositions;
    return Math.hypot(x - q[3 * point], y - q[3 * point + 1]);
  }

  private isPointAway(part: number, x: number, y: number): boolean {
    const { startPositions: q, inverseMass } = this.system;
    return inverseMass[3 * part + 2] === 0 && Math.hypot(x - q[3 * part], y - q[3 * part + 1]) > 1e-9;
  }

  /** Where a part carries the joint: the end of a massless link is the particle itself. */
  private markAt(id: string, part: number, at: readonly [number, number]): Mark {
    if (this.link > 0 && part >= 0 && this.isPointAway(part, at[0], at[1])) return { body: part, x: 0, y: 0 };
    return markOf(this.system, { of: id, at });
  }

  private localAxis([x, y]: readonly [number, number]): [number, number] {
    const angle = this.second < 0 ? 0 : this.system.startPositions[3 * this.second + 2];
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    return [c * x + s * y, -s * x + c * y];
  }

  private place(q: Float64Array, v: Float64Array | null): void {
    placeMark(this.a, q, v, this.pa);
    placeMark(this.b, q, v, this.pb);
  }

  update(q: Float64Array, v: Float64Array): void {
    this.place(q, v);
    if (this.link > 0) this.updateLink();
    else if (this.kind === 'slide') this.updateSlide(q, v);
    else this.updatePoint(q);
  }

  private updateLink(): void {
    const { pa, pb, a, b } = this;
    const [dx, dy] = [pa.x - pb.x, pa.y - pb.y];
    const away = Math.hypot(dx, dy);
    const [nx, ny] = [dx / away, dy / away];
    const [ux, uy] = [pa.vx - pb.vx, pa.vy - pb.vy];
    const across = nx * uy - ny * ux;
    const [row] = this.rows;
    row.clear().addPoint(a.body, nx, ny, pa.rx, pa.ry, 1);
    row.addPoint(b.body, nx, ny, pb.rx, pb.ry, -1);
    row.gamma = nx * (pa.cx - pb.cx) + ny * (pa.cy - pb.cy) + (across * across) / away;
    this.errors[0] = away - this.link;
  }

  private updatePoint(q: Float64Array): void {
    const { pa, pb, a, b, rows } = this;
    rows[0].clear().addPoint(a.body, 1, 0, pa.rx, pa.ry, 1);
    rows[0].addPoint(b.body, 1, 0, pb.rx, pb.ry, -1);
    rows[0].gamma = pa.cx - pb.cx;
    rows[1].clear().addPoint(a.body, 0, 1, pa.rx, pa.ry, 1);
    rows[1].addPoint(b.body, 0, 1, pb.rx, pb.ry, -1);
    rows[1].gamma = pa.cy - pb.cy;
    this.errors[0] = pa.x - pb.x;
    this.errors[1] = pa.y - pb.y;
    if (this.kind === 'weld') this.updateAngle(2, q);
  }

  private updateAngle(index: number, q: Float64Array): void {
    const row = this.rows[index].clear();
    row.addTurn(this.first, 1);
    row.addTurn(this.second, -1);
    row.gamma = 0;
    this.errors[index] = turnOf(this.system, this.first, q) - turnOf(this.system, this.second, q);
  }

  private updateSlide(q: Float64Array, v: Float64Array): void {
    const { rows, pa, pb } = this;
    const [ex, ey] = this.axisNow(q);
    this.updateAlong(rows[0], -ey, ex, v);
    this.errors[0] = -ey * (pa.x - pb.x) + ex * (pa.y - pb.y);
    this.updateAngle(1, q);
  }

  private axisNow(q: Float64Array): [number, number] {
    const angle = this.second < 0 ? 0 : q[3 * this.second + 2];
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    return [c * this.axis[0] - s * this.axis[1], s * this.axis[0] + c * this.axis[1]];
  }

  /** Row of the distance between the two points along a direction (nx, ny) that turns with the second part. */
  private updateAlong(row: Row, nx: number, ny: number, v: Float64Array): void {
    const { pa, pb, a, second } = this;
    const w = spinOf(second, v);
    const [dx, dy] = [pa.x - pb.x, pa.y - pb.y];
    row.clear().addPoint(a.body, nx, ny, pa.rx, pa.ry, 1);
    // The second part's own point under the first: lever pb + d.
    row.addPoint(second, nx, ny, pb.rx + dx, pb.ry + dy, -1);
    const [ux, uy] = [pa.vx - pb.vx, pa.vy - pb.vy];
    row.gamma =
      nx * (pa.cx - pb.cx) + ny * (pa.cy - pb.cy) + 2 * w * (-ny * ux + nx * uy) - w * w * (nx * dx + ny * dy);
  }

  /** Turn [rad] or travel of the first part relative to the second, from drawn. */
  position(q: Float64Array): number {
    if (this.kind !== 'slide') return turnOf(this.system, this.first, q) - turnOf(this.system, this.second, q);
    this.place(q, null);
    const [ex, ey] = this.axisNow(q);
    return ex * (this.pa.x - this.pb.x) + ey * (this.pa.y - this.pb.y);
  }

  /** Aims a row at the joint's free motion. */
  aimFreedom(row: Row, q: Float64Array, v: Float64Array): void {
    this.place(q, v);
    if (this.kind === 'slide') {
      const [ex, ey] = this.axisNow(q);
      this.updateAlong(row, ex, ey, v);
      return;
    }
    row.clear().addTurn(this.first, 1);
    row.addTurn(this.second, -1);
    row.gamma = 0;
  }

  /** Size of the reaction force of the last solve: of a slide, what presses across it. */
  reactionSize(): number {
    if (this.isReleased) return 0;
    return this.kind === 'slide' || this.link > 0
      ? Math.abs(this.lambda[0])
      : Math.hypot(this.lambda[0], this.lambda[1]);
  }

  private rubbing(joint: Pin | Slide): DryFriction {
    const { friction } = joint;
    const lever =
      friction && 'coefficient' in friction ? friction.coefficient * ('radius' in friction ? friction.radius : 1) : 0;
    const fixed =
      friction && 'torque' in friction ? friction.torque : friction && 'force' in friction ? friction.force : 0;
    const bodies = [this.first, this.second];
    const account = this.system.ledgers.open('joint-friction', joint.id, bodies, { heat: true });
    const row = new Row();
    const isReleased = (): boolean => this.isReleased;
    return {
      row,
      sliding: 0,
      get isActive() {
        return !isReleased();
      },
      account,
      lambda: 0,
      bound: () => fixed + lever * this.reactionSize(),
      update: (q, v) => {
        this.aimFreedom(row, q, v);
      },
    };
  }

  /** Reaction on the first part, with its moment about the joint's point, and that point. */
  reaction(q: Float64Array): { fx: number; fy: number; torque: number; at: Placed } {
    this.place(q, null);
    const l = this.lambda;
    if (this.isReleased) return { fx: 0, fy: 0, torque: 0, at: this.pa };
    if (this.link > 0) {
      const [row] = this.rows;
      const on = row.index.findIndex((index) => index === 3 * this.a.body);
      const sign = on >= 0 ? 1 : -1;
      const k = on >= 0 ? on : row.index.findIndex((index) => index === 3 * this.b.body);
      return { fx: sign * l[0] * row.value[k], fy: sign * l[0] * row.value[k + 1], torque: 0, at: this.pa };
    }
    if (this.kind !== 'slide') return { fx: l[0], fy: l[1], torque: this.kind === 'weld' ? l[2] : 0, at: this.pa };
    const [ex, ey] = this.axisNow(q);
    return { fx: -ey * l[0], fy: ex * l[0], torque: l[1], at: this.pa };
  }
}

/** A hard stop on a joint's free motion. */
export class JointStop extends Unilateral {
  readonly restSpeed = 0;

  constructor(
    readonly joint: JointParts,
    private readonly limit: number,
    private readonly sign: 1 | -1,
    readonly restitution: number,
    readonly impactAccount: Account,
  ) {
    super();
  }

  get account(): Account {
    return this.joint.account;
  }
  get bodies(): readonly number[] {
    return [this.joint.first, this.joint.second];
  }

  locate(q: Float64Array): void {
    this.isValid = !this.joint.isReleased;
    this.gap = this.sign * (this.joint.position(q) - this.limit);
  }

  aim(q: Float64Array, v: Float64Array): void {
    this.joint.aimFreedom(this.normal, q, v);
    if (this.sign > 0) return;
    this.normal.value.forEach((value, k) => {
      this.normal.value[k] = -value;
    });
    this.normal.gamma = -this.normal.gamma;
  }
}
