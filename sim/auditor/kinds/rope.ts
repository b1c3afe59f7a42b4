import type { Rope } from '../../mechanism/kinds/joint.js';
import type { Account } from '../ledgers.js';
import { markOf, newPlaced, placeMark, type Mark, type Placed, type System } from '../system.js';
import { Unilateral } from '../unilateral.js';

/** A rope: it cannot be longer than it is. Taut is closed; inner points are frictionless pulleys. */
export class RopeParts extends Unilateral {
  readonly restitution = 0;
  readonly restSpeed = 0;
  readonly id: string;
  readonly account: Account;
  readonly impactAccount: Account;
  readonly bodies: readonly number[];
  private readonly marks: Mark[];
  private readonly places: Placed[];
  private readonly length: number;

  constructor(system: System, rope: Rope) {
    super();
    this.id = rope.id;
    this.length = rope.length;
    this.marks = rope.through.map((point) => markOf(system, point));
    this.places = this.marks.map(newPlaced);
    this.bodies = [...new Set(this.marks.map(({ body }) => body))];
    this.account = system.ledgers.open('rope', rope.id, this.bodies);
    this.impactAccount = system.ledgers.open('impact', rope.id, this.bodies, { heat: true });
  }

  locate(q: Float64Array): void {
    this.marks.forEach((mark, i) => placeMark(mark, q, null, this.places[i]));
    this.gap = this.length - this.spans().reduce((sum, { length }) => sum + length, 0);
  }

  private spans(): { a: number; b: number; nx: number; ny: number; length: number }[] {
    return this.places.slice(1).map((to, i) => {
      const from = this.places[i];
      const length = Math.hypot(to.x - from.x, to.y - from.y);
      const scale = length > 0 ? 1 / length : 0;
      return { a: i, b: i + 1, nx: (to.x - from.x) * scale, ny: (to.y - from.y) * scale, length };
    });
  }

  aim(q: Float64Array, v: Float64Array): void {
    this.marks.forEach((mark, i) => placeMark(mark, q, v, this.places[i]));
    const row = this.normal.clear();
    row.gamma = 0;
    for (const { a, b, nx, ny, length } of this.spans()) {
      const [from, to] = [this.places[a], this.places[b]];
      row.addPoint(this.marks[b].body, nx, ny, to.rx, to.ry, -1);
      row.addPoint(this.marks[a].body, nx, ny, from.rx, from.ry, 1);
      const across = nx * (to.vy - from.vy) - ny * (to.vx - from.vx);
      const turning = length > 0 ? (across * across) / length : 0;
      row.gamma -= nx * (to.cx - from.cx) + ny * (to.cy - from.cy) + turning;
    }
  }
}
