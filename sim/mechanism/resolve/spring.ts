import type { Place } from '../../core/problem.js';
import { distance, type Vec } from '../../core/vec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { PointOn } from '../kinds/joint.js';
import type { LinearSpring, Spring, SpringDocument, WireData } from '../kinds/spring.js';
import { formatQuantity } from '../units/format.js';

/** A spring in SI, its rate and free length worked out. @param touching things nearer than this touch [m] */
export function resolveSpring(
  spring: SpringDocument,
  touching: number,
  place: Place,
  reading: Reading,
): Spring | undefined {
  if (spring.kind === 'torsion') {
    const { id, kind, between, rate, freeAngle } = spring;
    if (between[0] !== between[1]) return { id, kind, between, rate, freeAngle };
    const found = `"${between[0]}" twice`;
    reading.report('same-part', inside(place, 'between'), { found, accepted: 'two different ones' });
    return undefined;
  }
  checkOnePart(spring.between, place, reading);
  const drawn = distance(spring.between[0].at, spring.between[1].at);
  const needsLine = spring.kind === 'gas' || (spring.freeLength ?? 0) > 0;
  if (needsLine && drawn <= touching && !checkLine(place, reading)) return undefined;
  if (spring.kind === 'linear') return linear(spring, drawn, place, reading);
  const { id, kind, between, force, stroke, ratio } = spring;
  return { id, kind, between, force, stroke, ratio };
}

/** The ends of a spring or damper on one part do no work; it is drawn for nothing. */
export function checkOnePart([a, b]: [PointOn, PointOn], place: Place, reading: Reading): void {
  if (a.of !== b.of) return;
  const values = { found: `both ends on "${a.of}"`, accepted: 'ends on two parts' };
  reading.report('ends-on-one-part', inside(place, 'between'), values);
}

export function checkLine(place: Place, reading: Reading): false {
  const values = { found: 'both ends in one place', accepted: 'ends apart, so that there is a line to act along' };
  reading.report('no-line', inside(place, 'between'), values);
  return false;
}

function linear(
  spring: Extract<SpringDocument, { kind: 'linear' }>,
  drawn: number,
  place: Place,
  reading: Reading,
): LinearSpring {
  const { id, kind, between, acts, curve, wire, solidLength, initialTension } = spring;
  if (spring.freeLength === undefined) {
    reading.applied(`${place.pointer}/freeLength`, formatQuantity(drawn, 'length'), 'relaxed as drawn');
  }
  if (wire) applyWire(wire, place, reading);
  const freeLength = spring.freeLength ?? drawn;
  checkSolid(solidLength, freeLength, place, reading);
  return {
    id,
    kind,
    between,
    freeLength,
    acts,
    rate: spring.rate ?? (wire ? wireRate(wire) : slopeAtFreeLength(curve ?? [])),
    ...(curve && { curve }),
    ...(wire && { wire }),
    ...(solidLength !== undefined && { solidLength }),
    ...(initialTension !== undefined && { initialTension }),
  };
}

/** R = G d⁴ / (8 D³ n) [N/m]: EN 13906-1:2013, cylindrical helical springs of round wire. */
export const wireRate = ({ diameter, meanDiameter, activeCoils, shearModulus }: WireData): number =>
  (shearModulus * diameter ** 4) / (8 * meanDiameter ** 3 * activeCoils);

function applyWire(wire: WireData, place: Place, reading: Reading): void {
  const why = 'EN 13906-1 from the wire: G d^4 / (8 D^3 n)';
  reading.applied(`${place.pointer}/rate`, formatQuantity(wireRate(wire), 'rate'), why);
  const index = wire.meanDiameter / wire.diameter;
  if (index >= 4 && index <= 20) return;
  const found = `D/d = ${Number(index.toPrecision(4))}`;
  reading.report('spring-index', inside(place, 'wire'), { found, accepted: 'a spring index D/d from 4 to 20' });
}

function checkSolid(solid: number | undefined, free: number, place: Place, reading: Reading): void {
  if (solid === undefined || solid < free) return;
  const found = formatQuantity(solid, 'length');
  const accepted = `a length below the free length, ${formatQuantity(free, 'length')}`;
  reading.report('solid-length', inside(place, 'solidLength'), { found, accepted });
}

/** Slope of the curve where the deflection is nil [N/m]; that of its nearest span where the curve does not reach it. */
function slopeAtFreeLength(curve: Vec[]): number {
  const next = curve.findIndex(([x], i) => i > 0 && x > 0);
  const i = next < 0 ? curve.length - 1 : next;
  return (curve[i][1] - curve[i - 1][1]) / (curve[i][0] - curve[i - 1][0]);
}
