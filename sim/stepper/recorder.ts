import { buildLayout, extendLayout, RecordingWriter } from '../recording/index.js';
import type { AccountSpec, RecordingLayout } from '../recording/recording.js';
import type { ContactManager } from './contact/manager.js';
import type { DamperElement } from './kinds/damper.js';
import type { JointElement } from './kinds/joint.js';
import type { SpringElement } from './kinds/spring.js';
import type { BookedAccount } from './books.js';
import type { Scene } from './scene.js';

interface Recorded {
  scene: Scene;
  manager: ContactManager;
  joints: readonly JointElement[];
  springs: readonly SpringElement[];
  dampers: readonly DamperElement[];
  gravity: readonly BookedAccount[];
}

/** Writes the engine's state as rows of a recording, in SI. */
export class Recorder {
  readonly writer: RecordingWriter;
  private layout: RecordingLayout;
  /** Accounts whose sums have their columns listed, the columns, and the accounts that have more than sums. */
  private numbered = 0;
  private readonly sumColumns: number[] = [];
  private readonly held: { columns: AccountSpec['columns']; booked: BookedAccount }[] = [];

  constructor(
    private readonly recorded: Recorded,
    step: number,
  ) {
    const { scene, manager } = recorded;
    const { mechanism } = scene;
    openAccounts(manager);
    this.layout = buildLayout({
      bodies: mechanism.bodies.map(({ id, mass, inertia }) => ({ id, mass, inertia })),
      accounts: scene.books.accounts,
      contacts: manager.met.map(({ between }) => ({ between })),
      joints: recorded.joints.map(({ id }) => ({ id })),
      springs: mechanism.springs.map(({ id, between }) => ({ id, between })),
      dampers: mechanism.dampers.map(({ id, between }) => ({ id, between })),
    });
    this.writer = new RecordingWriter({ solver: 'stepper', layout: this.layout, step });
  }

  /** Adds a row for the state now in the scene (its transforms are in planck). */
  row(): number {
    const { scene } = this.recorded;
    this.widen();
    const row = this.writer.addRow(scene.time * scene.scale.time);
    const { buffer } = this.writer;
    const at = this.writer.offset(row);
    this.storeHeights();
    this.bodies(buffer, at);
    this.accounts(buffer, at);
    this.contacts(buffer, at);
    this.links(buffer, at);
    return row;
  }

  /** Columns for the pairs that met since the last row. */
  private widen(): void {
    const { scene, manager } = this.recorded;
    const { accounts, contacts } = this.layout;
    if (manager.met.length === contacts.length) return;
    openAccounts(manager);
    this.layout = extendLayout(this.layout, {
      accounts: scene.books.accounts.slice(accounts.length),
      contacts: manager.met.slice(contacts.length).map(({ between }) => ({ between })),
    });
    this.writer.widen(this.layout);
  }

  private bodies(row: Float64Array, at: number): void {
    const { state, scale } = this.recorded.scene;
    const { length, speed, time } = scale;
    const { bodies } = this.layout;
    for (let i = 0; i < bodies.length; i += 1) {
      const { columns } = bodies[i];
      row[at + columns.x] = state.x[i] * length;
      row[at + columns.y] = state.y[i] * length;
      row[at + columns.angle] = state.a[i];
      row[at + columns.vx] = state.vx[i] * speed;
      row[at + columns.vy] = state.vy[i] * speed;
      row[at + columns.spin] = state.w[i] / time;
    }
  }

  /** What gravity holds is a matter of where the bodies are, so that it is only asked for in a row. */
  private storeHeights(): void {
    const { scene, gravity } = this.recorded;
    const { x, y } = scene.state;
    gravity.forEach((booked, i) => {
      booked.stored = -scene.mass[i] * (scene.gravity.x * x[i] + scene.gravity.y * y[i]);
    });
  }

  private accounts(row: Float64Array, at: number): void {
    const { books, scale } = this.recorded.scene;
    const { energy } = scale;
    const { sums, rests } = books.sumsSoFar();
    const { sumColumns } = this;
    while (this.numbered < this.layout.accounts.length) this.numberSums();
    for (let i = 0; i < sumColumns.length; i += 1) {
      if (sumColumns[i] >= 0) row[at + sumColumns[i]] = (sums[i] + rests[i]) * energy;
    }
    for (const { columns, booked } of this.held) {
      if (columns.stored !== undefined) row[at + columns.stored] = booked.stored * energy;
      if (columns.input !== undefined) row[at + columns.input] = booked.input * energy;
    }
  }

  /** Columns of the next account's sums (−1: of no heat), and whether it also holds energy. */
  private numberSums(): void {
    const index = this.numbered;
    const { columns } = this.layout.accounts[index];
    this.sumColumns.push(...columns.work, columns.heat ?? -1);
    if (columns.stored !== undefined || columns.input !== undefined)
      this.held.push({ columns, booked: this.recorded.scene.books.booked[index] });
    this.numbered += 1;
  }

  private contacts(row: Float64Array, at: number): void {
    const { scene, manager } = this.recorded;
    const { force, speed, length } = scene.scale;
    const { contacts } = this.layout;
    for (let i = 0; i < contacts.length; i += 1) {
      const { columns } = contacts[i];
      const { reading } = manager.met[i];
      row[at + columns.points] = reading.points;
      row[at + columns.normal] = reading.normal * force;
      row[at + columns.friction] = reading.friction * force;
      row[at + columns.slip] = reading.slip * speed;
      row[at + columns.x] = reading.x * length;
      row[at + columns.y] = reading.y * length;
      row[at + columns.nx] = reading.nx;
      row[at + columns.ny] = reading.ny;
      row[at + columns.segment] = reading.segment;
    }
  }

  private links(row: Float64Array, at: number): void {
    const { joints, springs, dampers } = this.recorded;
    const put = (column: number, value: number): void => {
      row[at + column] = value;
    };
    this.layout.joints.forEach(({ columns }, index) => {
      const reading = joints[index].reading();
      put(columns.fx, reading.fx);
      put(columns.fy, reading.fy);
      put(columns.torque, reading.torque);
      put(columns.x, reading.x);
      put(columns.y, reading.y);
      put(columns.position, reading.position);
    });
    this.layout.springs.forEach(({ columns }, index) => {
      const { deflection, force } = springs[index].reading();
      put(columns.deflection, deflection);
      put(columns.force, force);
    });
    this.layout.dampers.forEach(({ columns }, index) => {
      const { deflection, force } = dampers[index].reading();
      put(columns.deflection, deflection);
      put(columns.force, force);
    });
  }
}

function openAccounts({ met }: ContactManager): void {
  for (const pair of met) pair.openAccounts();
}
