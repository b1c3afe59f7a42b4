import type { PointOn } from '../mechanism/kinds/joint.js';
import type { Mechanism } from '../mechanism/model.js';
import { Ledgers } from './ledgers.js';
import { inUnits, unitsFor, type Units } from './units.js';

/** The mechanism as the auditor integrates it: coordinates (x, y, θ) of every mass centre, in its own units. */
export interface System {
  /** In SI, as the document has it, and in the auditor's units. */
  source: Mechanism;
  mechanism: Mechanism;
  units: Units;
  ids: string[];
  count: number;
  /** 1/m, 1/m, 1/I of each body; nil where a body does not turn. */
  inverseMass: Float64Array;
  mass: Float64Array;
  /** Where everything is at the start. */
  startPositions: Float64Array;
  startVelocities: Float64Array;
  ledgers: Ledgers;
}

export function buildSystem(source: Mechanism): System {
  const units = unitsFor(source);
  const mechanism = inUnits(source, units);
  const count = mechanism.bodies.length;
  const mass = new Float64Array(3 * count);
  const inverseMass = new Float64Array(3 * count);
  const startPositions = new Float64Array(3 * count);
  const startVelocities = new Float64Array(3 * count);
  mechanism.bodies.forEach((body, i) => {
    mass.set([body.mass, body.mass, body.inertia], 3 * i);
    inverseMass.set([1 / body.mass, 1 / body.mass, body.inertia > 0 ? 1 / body.inertia : 0], 3 * i);
    const [c, s] = [Math.cos(body.angle), Math.sin(body.angle)];
    const [x, y] = body.centerOfMass;
    startPositions.set([body.at[0] + c * x - s * y, body.at[1] + s * x + c * y, body.angle], 3 * i);
    startVelocities.set([body.velocity[0], body.velocity[1], body.inertia > 0 ? body.spin : 0], 3 * i);
  });
  const ids = mechanism.bodies.map(({ id }) => id);
  const ledgers = new Ledgers(ids);
  return { source, mechanism, units, ids, count, inverseMass, mass, startPositions, startVelocities, ledgers };
}

export const partOf = ({ ids }: System, id: string): number => ids.indexOf(id);

/** A point fixed to a part: its index (−1 for the ground) and coordinates in the part's frame at its mass centre. */
export interface Mark {
  body: number;
  x: number;
  y: number;
}

export function markOf(system: System, { of, at }: PointOn): Mark {
  const body = partOf(system, of);
  if (body < 0) return { body, x: at[0], y: at[1] };
  const q = system.startPositions;
  const dx = at[0] - q[3 * body];
  const dy = at[1] - q[3 * body + 1];
  const [c, s] = [Math.cos(q[3 * body + 2]), Math.sin(q[3 * body + 2])];
  return { body, x: c * dx + s * dy, y: -s * dx + c * dy };
}

/** A mark on the sheet: position, lever from the mass centre, velocity, and the acceleration that spin alone gives it. */
export interface Placed {
  x: number;
  y: number;
  rx: number;
  ry: number;
  vx: number;
  vy: number;
  /** −ω² r. */
  cx: number;
  cy: number;
}

export const newPlaced = (): Placed => ({ x: 0, y: 0, rx: 0, ry: 0, vx: 0, vy: 0, cx: 0, cy: 0 });

/** Places a mark; `v` may be left out where only the position matters. */
export function placeMark(mark: Mark, q: Float64Array, v: Float64Array | null, out: Placed): Placed {
  const { body } = mark;
  if (body < 0) {
    out.x = mark.x;
    out.y = mark.y;
    out.rx = out.ry = out.vx = out.vy = out.cx = out.cy = 0;
    return out;
  }
  const angle = q[3 * body + 2];
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  out.rx = c * mark.x - s * mark.y;
  out.ry = s * mark.x + c * mark.y;
  out.x = q[3 * body] + out.rx;
  out.y = q[3 * body + 1] + out.ry;
  if (!v) return out;
  const w = v[3 * body + 2];
  out.vx = v[3 * body] - w * out.ry;
  out.vy = v[3 * body + 1] + w * out.rx;
  out.cx = -w * w * out.rx;
  out.cy = -w * w * out.ry;
  return out;
}

/** Turn of a part since drawn [rad]. */
export const turnOf = (system: System, part: number, q: Float64Array): number =>
  part < 0 ? 0 : q[3 * part + 2] - system.startPositions[3 * part + 2];

/** Spin of a part [rad per unit of time]. */
export const spinOf = (part: number, v: Float64Array): number => (part < 0 ? 0 : v[3 * part + 2]);
