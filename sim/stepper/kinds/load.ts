import type { Load, Moment } from '../../mechanism/kinds/load.js';
import { AxisRow } from '../axis-row.js';
import type { BookedAccount } from '../books.js';
import type { Element } from '../element.js';
import { anchorAt, anchorOf, partIndex, partInner, type Anchor, type Scene } from '../scene.js';
import { turnOf } from './spring.js';

/** Whether something that runs from one moment until another is on. */
export interface Timetable {
  isOn(from: Moment | undefined, until: Moment | undefined): boolean;
}

/** A force at a point or a torque on a body. */
export class LoadElement implements Element {
  private readonly row: AxisRow;
  private readonly booked: BookedAccount;
  private readonly body: number;
  private readonly anchor: Anchor;
  private readonly point = { x: 0, y: 0 };

  constructor(
    private readonly scene: Scene,
    private readonly load: Load,
    private readonly timetable: Timetable,
  ) {
    this.body = partIndex(scene, load.kind === 'force' ? load.on.of : load.on);
    this.row = new AxisRow(scene.groundInner, partInner(scene, this.body));
    this.anchor = load.kind === 'force' ? anchorOf(scene, load.on) : { body: this.body, x: 0, y: 0 };
    this.booked = scene.books.open('load', load.id, this.body < 0 ? [] : [scene.ids[this.body]]);
    this.row.turn();
  }

  push(half: number): void {
    const { load, row, scene } = this;
    row.impulse = 0;
    if (this.body < 0 || !this.timetable.isOn(load.from, load.until)) return;
    if (load.kind === 'torque') row.impulse = (load.torque / scene.scale.energy) * half;
    else row.impulse = this.aimForce(load) * half;
    row.apply(row.impulse);
  }

  /** Aims the row along the force; returns its size. */
  private aimForce(load: Load & { kind: 'force' }): number {
    const [fx, fy] = load.force;
    const size = Math.hypot(fx, fy);
    if (size === 0) return 0;
    const angle = load.follows === 'body' ? turnOf(this.scene, this.body) : 0;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const { x, y } = anchorAt(this.scene, this.anchor, this.point);
    this.row.aim((c * fx - s * fy) / size, (s * fx + c * fy) / size, x, y);
    return size / this.scene.scale.force;
  }

  book(): void {
    if (this.body >= 0) this.booked.work(0, 2 * this.row.impulse * this.row.rateB());
  }
}
