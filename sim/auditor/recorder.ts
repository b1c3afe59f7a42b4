import { buildLayout, RecordingWriter } from '../recording/index.js';
import type { RecordingLayout } from '../recording/recording.js';
import type { Assembly } from './assembly.js';
import { energyUnit, forceUnit, speedUnit } from './units.js';

/** Writes states of the auditor as rows of a recording, in SI. */
export class Recorder {
  readonly writer: RecordingWriter;
  private readonly layout: RecordingLayout;

  constructor(private readonly assembly: Assembly) {
    const { source, ledgers } = assembly.system;
    this.layout = buildLayout({
      bodies: source.bodies.map(({ id, mass, inertia }) => ({ id, mass, inertia })),
      accounts: ledgers.requests,
      contacts: assembly.pairs.map(({ between }) => ({ between })),
      joints: assembly.joints.map(({ id }) => ({ id })),
      springs: source.springs.map(({ id, between }) => ({ id, between })),
      dampers: source.dampers.map(({ id, between }) => ({ id, between })),
    });
    this.writer = new RecordingWriter({ solver: 'auditor', layout: this.layout });
  }

  /** Adds a row for a state; the dynamics must have been solved at it. */
  row(t: number, q: Float64Array, v: Float64Array, works: Float64Array): number {
    const { units } = this.assembly.system;
    const row = this.writer.addRow(Math.max(t * units.time, this.writer.lastTime));
    const { buffer } = this.writer;
    const offset = this.writer.offset(row);
    const put = (column: number, value: number): void => {
      buffer[offset + column] = value;
    };
    this.bodies(q, v, put);
    this.accounts(q, works, put);
    this.contacts(v, put);
    this.joints(q, put);
    this.links(q, v, put);
    return row;
  }

  private bodies(q: Float64Array, v: Float64Array, put: (column: number, value: number) => void): void {
    const { units } = this.assembly.system;
    const speed = speedUnit(units);
    this.layout.bodies.forEach(({ columns }, i) => {
      put(columns.x, q[3 * i] * units.length);
      put(columns.y, q[3 * i + 1] * units.length);
      put(columns.angle, q[3 * i + 2]);
      put(columns.vx, v[3 * i] * speed);
      put(columns.vy, v[3 * i + 1] * speed);
      put(columns.spin, v[3 * i + 2] / units.time);
    });
  }

  private accounts(q: Float64Array, works: Float64Array, put: (column: number, value: number) => void): void {
    const { system } = this.assembly;
    const energy = energyUnit(system.units);
    this.layout.accounts.forEach(({ columns }, index) => {
      const account = system.ledgers.accounts[index];
      columns.work.forEach((column, k) => {
        put(column, works[account.first + k] * energy);
      });
      if (columns.heat !== undefined) put(columns.heat, works[account.heatSlot] * energy);
      if (columns.input !== undefined) put(columns.input, works[account.inputSlot] * energy);
      if (columns.stored !== undefined) put(columns.stored, (account.stored?.(q) ?? 0) * energy);
    });
  }

  private contacts(v: Float64Array, put: (column: number, value: number) => void): void {
    const { pairs, dynamics, soft, system } = this.assembly;
    const force = forceUnit(system.units);
    const { length } = system.units;
    this.layout.contacts.forEach(({ columns }, index) => {
      const pair = pairs[index];
      const groups = dynamics.groups.filter((group) => group.pair === pair);
      const pressed = soft.filter(({ isPressed, point }) => isPressed && point.pair === pair);
      const points = [
        ...groups.flatMap(({ members }) => members.map((point) => ({ point, normal: point.lambda }))),
        ...pressed.map(({ point, normal }) => ({ point, normal })),
      ];
      put(columns.points, points.length);
      put(columns.segment, points[0]?.point.segment ?? -1);
      if (points.length === 0) return;
      const total = points.reduce((sum, { normal }) => sum + normal, 0);
      const share = (normal: number): number => (total > 0 ? normal / total : 1 / points.length);
      const rubbing = [...groups, ...pressed.map(({ friction }) => ({ lambda: friction }))];
      const [{ point: lead }] = points;
      const sign = pair.first === lead.bodyB ? 1 : -1;
      put(columns.normal, total * force);
      put(columns.friction, rubbing.reduce((sum, { lambda }) => sum + lambda, 0) * force);
      put(columns.slip, lead.slip(v) * speedUnit(system.units));
      put(columns.x, points.reduce((sum, { point, normal }) => sum + share(normal) * point.x, 0) * length);
      put(columns.y, points.reduce((sum, { point, normal }) => sum + share(normal) * point.y, 0) * length);
      put(columns.nx, sign * lead.nx);
      put(columns.ny, sign * lead.ny);
    });
  }

  private joints(q: Float64Array, put: (column: number, value: number) => void): void {
    const { joints, system } = this.assembly;
    const { length } = system.units;
    this.layout.joints.forEach(({ columns }, index) => {
      const joint = joints[index];
      const { fx, fy, torque, at } = joint.reaction(q);
      put(columns.fx, fx * forceUnit(system.units));
      put(columns.fy, fy * forceUnit(system.units));
      put(columns.torque, torque * energyUnit(system.units));
      put(columns.x, at.x * length);
      put(columns.y, at.y * length);
      put(columns.position, joint.position(q) * (joint.kind === 'slide' ? length : 1));
    });
  }

  private links(q: Float64Array, v: Float64Array, put: (column: number, value: number) => void): void {
    const { springs, dampers, system } = this.assembly;
    const { units, source } = system;
    const of = (link: { read: (typeof springs)[number]['read'] }, isTurning: boolean): [number, number] => {
      const { deflection, force } = link.read(q, v);
      return [deflection * (isTurning ? 1 : units.length), force * (isTurning ? energyUnit(units) : forceUnit(units))];
    };
    this.layout.springs.forEach(({ columns }, i) => {
      const [deflection, force] = of(springs[i], source.springs[i].kind === 'torsion');
      put(columns.deflection, deflection);
      put(columns.force, force);
    });
    this.layout.dampers.forEach(({ columns }, i) => {
      const [deflection, force] = of(dampers[i], source.dampers[i].kind === 'rotary');
      put(columns.deflection, deflection);
      put(columns.force, force);
    });
  }
}
