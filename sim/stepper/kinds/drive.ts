import type { Drive } from '../../mechanism/kinds/drive.js';
import { AxisRow } from '../axis-row.js';
import { PairAccount } from '../books.js';
import type { Element } from '../element.js';
import { partInner, type Scene } from '../scene.js';
import type { JointElement } from './joint.js';
import type { Timetable } from './load.js';

/** A constant torque on a pin or force on a slide, on the joint's first part, its reaction on the second. */
export class DriveElement implements Element {
  private readonly row: AxisRow;
  private readonly account: PairAccount;
  private readonly effort: number;

  constructor(
    scene: Scene,
    private readonly drive: Drive,
    private readonly joint: JointElement,
    private readonly timetable: Timetable,
  ) {
    const { a, b } = joint;
    this.row = new AxisRow(partInner(scene, a), partInner(scene, b));
    const unit = joint.kind === 'slide' ? scene.scale.force : scene.scale.energy;
    this.effort = (drive.law.kind === 'effort' ? drive.law.value : 0) / unit;
    const booked = scene.books.open('drive', drive.id, PairAccount.bodies(scene.ids, a, b), { input: true });
    this.account = new PairAccount(booked, a, b);
    this.row.turn();
  }

  push(half: number): void {
    const { row, drive } = this;
    row.impulse = 0;
    if (!this.timetable.isOn(drive.from, drive.until) || this.joint.isReleased) return;
    this.joint.aimFreedom(row);
    row.impulse = this.effort * half;
    row.apply(row.impulse);
  }

  book(): void {
    const impulse = 2 * this.row.impulse;
    const onA = -impulse * this.row.rateA();
    const onB = impulse * this.row.rateB();
    this.account.add(onA, onB);
    // While it brakes nothing comes back.
    this.account.booked.input += Math.max(0, onA + onB) / this.drive.efficiency;
  }
}
