import type { LinearSpring, Spring, TorsionSpring } from '../../mechanism/kinds/spring.js';
import type { Force, Link, Store } from '../element.js';
import { Row } from '../row.js';
import { markOf, newPlaced, partOf, placeMark, turnOf, type Mark, type System } from '../system.js';

/** A spring's force law: force over deflection, and the energy stored. */
interface Law {
  force(deflection: number): number;
  energy(deflection: number): number;
  /** Deflections at which the law bends. */
  knots: number[];
}

export interface SpringParts extends Link, Store {
  force: Force;
  /** Signed distance of the deflection from each bend of the law, for the event finder. */
  bends(q: Float64Array): number[];
}

export function buildSpring(system: System, spring: Spring): SpringParts {
  if (spring.kind === 'gas') throw new RangeError(`gas spring ${spring.id} is not audited`);
  return spring.kind === 'linear' ? linear(system, spring) : torsion(system, spring);
}

function linear(system: System, spring: LinearSpring): SpringParts {
  const [a, b] = spring.between.map((end) => markOf(system, end)) as [Mark, Mark];
  const law = lawOf(spring);
  const account = system.ledgers.open('spring', spring.id, [a.body, b.body], { stored: true });
  const row = new Row();
  const [pa, pb] = [newPlaced(), newPlaced()];
  const length = (q: Float64Array): number => {
    placeMark(a, q, null, pa);
    placeMark(b, q, null, pb);
    return Math.hypot(pb.x - pa.x, pb.y - pa.y);
  };
  const deflection = (q: Float64Array): number => length(q) - spring.freeLength;
  const force: Force = {
    row,
    size: 0,
    account,
    isLossy: false,
    inputRatio: 0,
    update(q) {
      const l = length(q);
      const [nx, ny] = l > 0 ? [(pb.x - pa.x) / l, (pb.y - pa.y) / l] : [0, 0];
      row.clear().addPoint(b.body, nx, ny, pb.rx, pb.ry, 1);
      row.addPoint(a.body, nx, ny, pa.rx, pa.ry, -1);
      force.size = -law.force(l - spring.freeLength);
    },
  };
  return {
    id: spring.id,
    force,
    account,
    energy: (q) => law.energy(deflection(q)),
    read: (q) => ({ deflection: deflection(q), force: law.force(deflection(q)) }),
    bends: (q) => law.knots.map((knot) => deflection(q) - knot),
  };
}

function torsion(system: System, spring: TorsionSpring): SpringParts {
  const [first, second] = spring.between.map((id) => partOf(system, id));
  const account = system.ledgers.open('spring', spring.id, [first, second], { stored: true });
  const row = new Row();
  row.addTurn(first, 1);
  row.addTurn(second, -1);
  const deflection = (q: Float64Array): number =>
    turnOf(system, first, q) - turnOf(system, second, q) - spring.freeAngle;
  const force: Force = {
    row,
    size: 0,
    account,
    isLossy: false,
    inputRatio: 0,
    update(q) {
      force.size = -spring.rate * deflection(q);
    },
  };
  return {
    id: spring.id,
    force,
    account,
    energy: (q) => 0.5 * spring.rate * deflection(q) ** 2,
    read: (q) => ({ deflection: deflection(q), force: spring.rate * deflection(q) }),
    bends: () => [],
  };
}

function lawOf({ curve, rate, acts }: LinearSpring): Law {
  const whole = curve
    ? curved(curve)
    : { force: (d: number) => rate * d, energy: (d: number) => 0.5 * rate * d * d, knots: [] };
  if (acts === 'both') return whole;
  const isOn = acts === 'compression' ? (d: number) => d < 0 : (d: number) => d > 0;
  return {
    force: (d) => (isOn(d) ? whole.force(d) : 0),
    energy: (d) => (isOn(d) ? whole.energy(d) : 0),
    knots: [0, ...whole.knots],
  };
}

/** Straight pieces between the points; energy by trapezia from nil deflection, which is exact for them. */
function curved(points: readonly (readonly [number, number])[]): Law {
  const piece = (d: number): number => {
    const next = points.findIndex(([x]) => x > d);
    return next < 0 ? points.length - 2 : Math.min(Math.max(next - 1, 0), points.length - 2);
  };
  const force = (d: number): number => {
    const i = piece(d);
    const [x0, f0] = points[i];
    const [x1, f1] = points[i + 1];
    return f0 + ((f1 - f0) / (x1 - x0)) * (d - x0);
  };
  const energy = (d: number): number => {
    const [low, high] = d < 0 ? [d, 0] : [0, d];
    const inner = points.map(([x]) => x).filter((x) => x > low && x < high);
    const stops = [low, ...inner, high];
    let sum = 0;
    for (let i = 1; i < stops.length; i += 1) {
      sum += 0.5 * (force(stops[i - 1]) + force(stops[i])) * (stops[i] - stops[i - 1]);
    }
    return d < 0 ? -sum : sum;
  };
  return { force, energy, knots: points.slice(1, -1).map(([x]) => x) };
}
