import type { Vec } from '../../core/vec.js';
import { placedParts, pointToPart } from '../../geometry/index.js';
import type { Pin } from '../kinds/joint.js';
import { formatQuantity } from '../units/format.js';
import { placeOf, type Checked } from './checked.js';

/** How far outside an outline a pin may be before it is told: hand-written coordinates are round [of the extent]. */
const SLACK = 1e-3;

/**
 * Pins that a part with an outline does not reach. One part may stand for an arm nobody drew, which is a warning; where
 * neither part reaches the pin, they do not meet there, which is an error.
 */
export function checkJoints(checked: Checked): void {
  for (const joint of checked.mechanism.joints) {
    if (joint.kind === 'pin') checkPin(joint, checked);
  }
}

function checkPin(pin: Pin, checked: Checked): void {
  const distances = pin.between.map((id) => ({ id, away: distanceTo(id, pin.at, checked) }));
  const short = distances.filter(({ away }) => away > SLACK * checked.mechanism.extent);
  if (short.length === 0) return;
  const words = short.map(({ id, away }) => `${formatQuantity(away, 'length')} outside "${id}"`);
  const place = { ...placeOf(checked, pin.id, 'at'), of: [pin.id, ...short.map(({ id }) => id)] };
  const values = { found: `"${pin.id}" ${words.join(' and ')}`, accepted: 'a point that its parts reach' };
  checked.reading.report(short.length === 2 ? 'parts-apart' : 'pin-off-part', place, values);
}

/** Distance of a point outside the outline of a part [m]; 0 for the ground, a particle and a body without outline. */
function distanceTo(id: string, point: Vec, { placed }: Checked): number {
  const body = placed.find((each) => each.id === id);
  if (!body || body.shape.kind === 'particle' || body.shape.kind === 'none') return 0;
  return Math.max(0, Math.min(...placedParts(body).map((part) => pointToPart(point, part))));
}
