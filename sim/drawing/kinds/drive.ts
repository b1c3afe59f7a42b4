import type { Drive, DriveLaw } from '../../mechanism/kinds/drive.js';
import type { DrawingContext, Figure } from '../figure.js';
import { circle, outline } from '../operations.js';
import { toPaper } from '../paper.js';
import { carried } from '../pose.js';
import { forceArrow, turningArrow } from './arrow.js';

/** A drive: circle and turning arrow on a pin, an arrow along the guide on a slide. */
export function driveFigures(drive: Drive, context: DrawingContext): Figure[] {
  const { mechanism, drawn, pixels } = context;
  const joint = mechanism.joints.find((each) => each.id === drive.on);
  if (joint?.kind !== 'pin' && joint?.kind !== 'slide') return [];
  const of = joint.between[0] === 'ground' ? joint.between[1] : joint.between[0];
  const sign = signOf(drive.law);
  const live: Extract<Figure, { live: unknown }>['live'] = (now) => {
    const at = toPaper(carried({ of, at: joint.at }, drawn, now), pixels);
    if (joint.kind === 'pin') return [circle(at, 10, { stroke: outline }), ...turningArrow(at, 17, sign)];
    const [ux, uy] = [joint.axis[0] * sign, -joint.axis[1] * sign];
    return forceArrow([at[0] + ux * 14 - uy * 12, at[1] + uy * 14 + ux * 12], [ux * 30, uy * 30]);
  };
  return [{ key: `drive:${drive.id}`, layer: 'forces', item: drive.id, live }];
}

/** The sense in which a drive starts out: + counter-clockwise or along the axis. */
function signOf(law: DriveLaw): number {
  const first = (curve: readonly (readonly [number, number])[]) => curve.find(([, value]) => value !== 0)?.[1] ?? 1;
  const value = {
    effort: () => (law.kind === 'effort' ? law.value : 1),
    effortCurve: () => (law.kind === 'effortCurve' ? first(law.curve) : 1),
    speed: () => (law.kind !== 'speed' ? 1 : typeof law.value === 'number' ? law.value : first(law.value)),
    motor: () => (law.kind === 'motor' ? law.stallTorque : 1),
  } satisfies Record<DriveLaw['kind'], () => number>;
  return value[law.kind]() < 0 ? -1 : 1;
}
