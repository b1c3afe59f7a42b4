import { buildLayout, extendLayout, RecordingWriter } from '../recording/index.js';
import type { RecordingLayout } from '../recording/recording.js';
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
    const offset = this.writer.offset(row);
    const put = (column: number, value: number): void => {
      buffer[offset + column] = value;
    };
    this.bodies(put);
    this.accounts(put);
    this.contacts(put);
    this.links(put);
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

  private bodies(put: (column: number, value: number) => void): void {
    const { scene } = this.recorded;
    const { length, speed, time } = scene.scale;
    const { state } = scene;
    this.layout.bodies.forEach(({ columns }, i) => {
      put(columns.x, state.x[i] * length);
      put(columns.y, state.y[i] * length);
      put(columns.angle, state.a[i]);
      put(columns.vx, state.vx[i] * speed);
      put(columns.vy, state.vy[i] * speed);
      put(columns.spin, state.w[i] / time);
    });
  }

  private accounts(put: (column: number, value: number) => void): void {
    const { scene } = this.recorded;
    const { energy } = scene.scale;
    this.layout.accounts.forEach(({ columns }, index) => {
      const booked = scene.books.booked[index];
      columns.work.forEach((column, slot) => {
        put(column, booked.workSoFar(slot) * energy);
      });
      if (columns.heat !== undefined) put(columns.heat, booked.heatSoFar() * energy);
      if (columns.stored !== undefined) put(columns.stored, booked.stored * energy);
      if (columns.input !== undefined) put(columns.input, booked.input * energy);
    });
  }

  private contacts(put: (column: number, value: number) => void): void {
    const { scene, manager } = this.recorded;
    const { force, speed, length } = scene.scale;
    this.layout.contacts.forEach(({ columns }, index) => {
      const { reading } = manager.met[index];
      put(columns.points, reading.points);
      put(columns.normal, reading.normal * force);
      put(columns.friction, reading.friction * force);
      put(columns.slip, reading.slip * speed);
      put(columns.x, reading.x * length);
      put(columns.y, reading.y * length);
      put(columns.nx, reading.nx);
      put(columns.ny, reading.ny);
      put(columns.segment, reading.segment);
    });
  }

  private links(put: (column: number, value: number) => void): void {
    const { joints, springs, dampers } = this.recorded;
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
