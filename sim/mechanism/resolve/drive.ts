import type { Place } from '../../core/problem.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Drive, DriveDocument, DriveLaw } from '../kinds/drive.js';
import { resolveSpan } from './moment.js';

/** A drive in SI. */
export function resolveDrive(drive: DriveDocument, place: Place, reading: Reading): Drive | undefined {
  const law = lawOf(drive);
  if (!law) return undefined;
  if (drive.limit !== undefined && law.kind !== 'speed') {
    const values = { found: 'limit without speed', accepted: 'limit beside a speed that is held' };
    reading.report('no-effect', inside(place, 'limit'), values);
  }
  const { id, on, efficiency } = drive;
  return { id, on, law, efficiency, ...resolveSpan(drive, place, reading) };
}

function lawOf(drive: DriveDocument): DriveLaw | undefined {
  const effort = 'force' in drive ? drive.force : 'torque' in drive ? drive.torque : undefined;
  if (typeof effort === 'number') return { kind: 'effort', value: effort };
  if (effort) return { kind: 'effortCurve', over: effort.over, curve: effort.curve };
  if (drive.speed !== undefined) {
    const { speed, limit } = drive;
    const value = typeof speed === 'number' ? speed : speed.curve;
    return { kind: 'speed', value, ...(limit !== undefined && { limit }) };
  }
  return 'motor' in drive && drive.motor ? { kind: 'motor', ...drive.motor } : undefined;
}

/** Two drives that hold a speed on one joint contradict each other. */
export function checkDrives(drives: readonly Drive[], places: ReadonlyMap<string, Place>, reading: Reading): void {
  const holders = new Map<string, string>();
  for (const { id, on, law } of drives) {
    if (law.kind !== 'speed') continue;
    const first = holders.get(on);
    if (first === undefined) holders.set(on, id);
    else {
      const place = { pointer: `${places.get(id)?.pointer ?? ''}/on`, of: [first, id] };
      const found = `a second speed held on "${on}"`;
      reading.report('two-speeds', place, { found, accepted: `one, that of "${first}"` });
    }
  }
}
