import type { Damper } from '../../mechanism/kinds/damper.js';
import type { Force, Link } from '../element.js';
import { Row } from '../row.js';
import { markOf, newPlaced, partOf, placeMark, turnOf, type System } from '../system.js';

export interface DamperParts extends Link {
  force: Force;
  /** Rate at which one that acts in one sense begins or ceases to; Infinity for one that always acts. */
  onset(q: Float64Array, v: Float64Array): number;
}

/** A damper: −c |u|ᵖ sgn u along its line, or against its turn. */
export function buildDamper(system: System, damper: Damper): DamperParts {
  const { coefficient, exponent, acts } = damper;
  const size = (u: number): number => {
    const isIdle = (acts === 'compression' && u > 0) || (acts === 'extension' && u < 0);
    return isIdle ? 0 : -coefficient * Math.sign(u) * Math.abs(u) ** exponent;
  };
  const geometry = damper.kind === 'linear' ? along(system, damper.between) : about(system, damper.between);
  const { row, aim, deflection, bodies } = geometry;
  const drawn = deflection(system.startPositions);
  const account = system.ledgers.open('damper', damper.id, bodies, { heat: true });
  const force: Force = {
    row,
    size: 0,
    account,
    isLossy: true,
    inputRatio: 0,
    update(q, v) {
      aim(q);
      force.size = size(row.rate(v));
    },
  };
  return {
    id: damper.id,
    force,
    read(q, v) {
      aim(q);
      return { deflection: deflection(q) - drawn, force: -size(row.rate(v)) };
    },
    onset(q, v) {
      if (acts === 'both') return Infinity;
      aim(q);
      return row.rate(v);
    },
  };
}

interface Geometry {
  row: Row;
  bodies: number[];
  aim: (q: Float64Array) => void;
  deflection: (q: Float64Array) => number;
}

function along(system: System, between: (Damper & { kind: 'linear' })['between']): Geometry {
  const [a, b] = [markOf(system, between[0]), markOf(system, between[1])];
  const [pa, pb] = [newPlaced(), newPlaced()];
  const row = new Row();
  const deflection = (q: Float64Array): number => {
    placeMark(a, q, null, pa);
    placeMark(b, q, null, pb);
    return Math.hypot(pb.x - pa.x, pb.y - pa.y);
  };
  const aim = (q: Float64Array): void => {
    const l = deflection(q);
    const [nx, ny] = l > 0 ? [(pb.x - pa.x) / l, (pb.y - pa.y) / l] : [0, 0];
    row.clear().addPoint(b.body, nx, ny, pb.rx, pb.ry, 1);
    row.addPoint(a.body, nx, ny, pa.rx, pa.ry, -1);
  };
  return { row, bodies: [a.body, b.body], aim, deflection };
}

function about(system: System, between: [string, string]): Geometry {
  const [first, second] = between.map((id) => partOf(system, id));
  const row = new Row();
  row.addTurn(first, 1);
  row.addTurn(second, -1);
  const deflection = (q: Float64Array): number => turnOf(system, first, q) - turnOf(system, second, q);
  return { row, bodies: [first, second], aim: () => undefined, deflection };
}
