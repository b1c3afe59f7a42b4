import type { Drive } from '../../mechanism/kinds/drive.js';
import { curveAt } from '../contact/candidates.js';
import type { Bilateral, Force } from '../element.js';
import { Row } from '../row.js';
import type { System } from '../system.js';
import type { JointParts } from './joint.js';

export type DriveParts = { force: Force; held: null } | { force: null; held: Bilateral };

/** A drive on a joint's free motion: an effort, a motor's line, or a held speed. */
export function buildDrive(system: System, drive: Drive, joint: JointParts, isOn: () => boolean): DriveParts {
  const bodies = [joint.first, joint.second];
  const account = system.ledgers.open('drive', drive.id, bodies, { input: true });
  const row = new Row();
  const { law } = drive;
  if (law.kind === 'speed') {
    const value = law.value;
    const held: Bilateral = {
      id: drive.id,
      rows: [row],
      errors: new Float64Array(1),
      speeds: new Float64Array(1),
      changes: new Float64Array(1),
      lambda: new Float64Array(1),
      account,
      get isReleased() {
        return joint.isReleased || !isOn();
      },
      set isReleased(_value) {
        // Its moments and its joint decide.
      },
      update(q, v, t) {
        joint.aimFreedom(row, q, v);
        const { speed, change } = curveAt(value, t);
        held.speeds[0] = speed;
        held.changes[0] = change;
      },
    };
    return { force: null, held };
  }
  const sizeAt = (t: number, position: number, rate: number): number => {
    if (law.kind === 'effort') return law.value;
    if (law.kind === 'motor') return law.stallTorque * (1 - rate / law.noLoadSpeed);
    return curveAt(law.curve, law.over === 'time' ? t : position).speed;
  };
  const force: Force = {
    row,
    size: 0,
    account,
    isLossy: false,
    inputRatio: 1 / drive.efficiency,
    update(q, v, t) {
      force.size = 0;
      if (joint.isReleased || !isOn()) return;
      joint.aimFreedom(row, q, v);
      force.size = sizeAt(t, joint.position(q), row.rate(v));
    },
  };
  return { force, held: null };
}
