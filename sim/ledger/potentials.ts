import type { Vec } from '../core/vec.js';
import { distance } from '../core/vec.js';
import type { LinearSpring, TorsionSpring } from '../mechanism/kinds/spring.js';
import type { Mechanism } from '../mechanism/model.js';
import type { AccountSpec, Recording } from '../recording/index.js';
import { bodyAtRow, bodyOf, endAtRow } from '../recording/index.js';

/**
 * What an account holds at a row [J] by the document's own data and the places the run recorded, whatever the solver
 * booked: gravity −m g·r of the document's mass, a spring ∫F dδ from relaxed. Nothing for an account that stores none,
 * and for a gas spring or a compliant contact, whose laws are the solvers' alone.
 */
export function potentialAt(
  mechanism: Mechanism,
  recording: Recording,
  { account, of }: Pick<AccountSpec, 'account' | 'of'>,
  row: number,
): number | undefined {
  if (typeof of !== 'string') return undefined;
  if (account === 'gravity') return heightEnergy(mechanism, recording, of, row);
  if (account !== 'spring') return undefined;
  const spring = mechanism.springs.find(({ id }) => id === of);
  if (spring?.kind === 'linear') return linearEnergy(spring, recording, row);
  return spring?.kind === 'torsion' ? torsionEnergy(spring, recording, row) : undefined;
}

function heightEnergy({ bodies, gravity }: Mechanism, recording: Recording, id: string, row: number) {
  const [spec, body] = [bodyOf(recording, id), bodies.find((each) => each.id === id)];
  if (!spec || !body) return undefined;
  const { x, y } = bodyAtRow(recording, spec, row);
  return -body.mass * (gravity[0] * x + gravity[1] * y);
}

function linearEnergy(spring: LinearSpring, recording: Recording, row: number): number | undefined {
  const [a, b] = spring.between.map((end) => endAtRow(recording, end, row));
  if (!a || !b) return undefined;
  const deflection = distance(a, b) - spring.freeLength;
  if (spring.acts === 'compression' && deflection > 0) return 0;
  if (spring.acts === 'extension' && deflection < 0) return 0;
  return spring.curve ? curveEnergy(spring.curve, deflection) : 0.5 * spring.rate * deflection ** 2;
}

function torsionEnergy({ between, rate, freeAngle }: TorsionSpring, recording: Recording, row: number): number {
  const [first, second] = between.map((id) => {
    const body = bodyOf(recording, id);
    return body ? bodyAtRow(recording, body, row).angle - bodyAtRow(recording, body, 0).angle : 0;
  });
  return 0.5 * rate * (first - second - freeAngle) ** 2;
}

/** ∫F dδ from nil to a deflection under a broken line whose last slopes go on: a trapezium for each piece. */
function curveEnergy(curve: readonly Vec[], deflection: number): number {
  const [low, high] = deflection < 0 ? [deflection, 0] : [0, deflection];
  const marks = [low, ...curve.map(([at]) => at).filter((at) => at > low && at < high), high];
  const area = marks.slice(1).reduce((sum, to, i) => {
    return sum + 0.5 * (forceOf(curve, marks[i]) + forceOf(curve, to)) * (to - marks[i]);
  }, 0);
  return deflection < 0 ? -area : area;
}

function forceOf(curve: readonly Vec[], deflection: number): number {
  const above = curve.findIndex(([at]) => at >= deflection);
  const to = above < 0 ? curve.length - 1 : Math.max(1, above);
  const [[d0, f0], [d1, f1]] = [curve[to - 1], curve[to]];
  return f0 + ((f1 - f0) * (deflection - d0)) / (d1 - d0);
}
