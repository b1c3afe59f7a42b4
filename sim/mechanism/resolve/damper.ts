import type { Place } from '../../core/problem.js';
import { distance } from '../../core/vec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Damper, DamperDocument } from '../kinds/damper.js';
import type { PointOn } from '../kinds/joint.js';
import { dimensionText, fits, multiplyDimensions, quantityKinds, type Dimension } from '../units/dimension.js';
import { checkLine, checkOnePart } from './spring.js';

/** A damper in SI. @param touching things nearer than this touch [m] */
export function resolveDamper(
  damper: DamperDocument,
  touching: number,
  place: Place,
  reading: Reading,
): Damper | undefined {
  const { id, exponent, coefficient: given } = damper;
  const isRotary = isBetweenParts(damper.between);
  if (!checkCoefficient(damper, isRotary, place, reading)) return undefined;
  const coefficient = given.value;
  if (isBetweenParts(damper.between)) {
    const { between } = damper;
    if (between[0] !== between[1]) return { id, kind: 'rotary', between, coefficient, exponent, acts: 'both' };
    const found = `"${between[0]}" twice`;
    reading.report('same-part', inside(place, 'between'), { found, accepted: 'two different ones' });
    return undefined;
  }
  const { between } = damper;
  checkOnePart(between, place, reading);
  if (distance(between[0].at, between[1].at) <= touching && !checkLine(place, reading)) return undefined;
  return { id, kind: 'linear', between, coefficient, exponent, acts: 'acts' in damper ? damper.acts : 'both' };
}

const isBetweenParts = (between: [PointOn, PointOn] | [string, string]): between is [string, string] =>
  typeof between[0] === 'string';

/** Force over speed to the power of the exponent; only whole exponents can be written as a unit. */
function checkCoefficient(damper: DamperDocument, isRotary: boolean, place: Place, reading: Reading): boolean {
  const { coefficient, exponent } = damper;
  const at = inside(place, 'coefficient');
  const wanted = coefficientDimension(isRotary, exponent);
  if (coefficient.dimension && !(Number.isInteger(exponent) && fits(coefficient.dimension, wanted))) {
    const found = `"${coefficient.text}" (${dimensionText(coefficient.dimension)})`;
    const unit = Number.isInteger(exponent) ? `a coefficient in ${dimensionText(wanted)}` : 'a bare number in SI';
    reading.report('wrong-dimension', at, { found, accepted: `${unit} for the exponent ${exponent}` });
    return false;
  }
  if (coefficient.value > 0) return true;
  reading.report('out-of-range', at, { found: coefficient.text, accepted: 'a coefficient above 0' });
  return false;
}

function coefficientDimension(isRotary: boolean, exponent: number): Dimension {
  const effort = isRotary ? quantityKinds.torque : quantityKinds.force;
  const speed = isRotary ? quantityKinds.spin : quantityKinds.speed;
  return multiplyDimensions(effort.dimension, speed.dimension, -exponent);
}
