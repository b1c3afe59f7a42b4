import type { Mechanism } from '../../mechanism/model.js';
import type { BodySpec, Recording } from '../../recording/index.js';
import { valueAt } from '../../recording/index.js';
import { bookLedger } from '../book.js';

/** Speed of a mechanism that counts as idle, in √(g · extent). */
const IDLE = 1e-3;

/** What figures of two runs are measured on where they are small. */
export interface Scales {
  /** [m] */
  extent: number;
  /** Of the run [s]. */
  duration: number;
  /** Greatest in either run, of a centre of mass or of turning at the radius of gyration [m/s]. */
  speed: number;
  /** The greater of the two runs from start to end, around the system [J]. */
  turnover: number;
}

/** What a comparison is made of: the document, the two runs, their scales and the tolerance. */
export interface Compared {
  mechanism: Mechanism;
  stepper: Recording;
  auditor: Recording;
  scales: Scales;
  /** A figure below this share of its scale is compared on that. */
  least: number;
  /** Greatest share that counts as the same. */
  tolerance: number;
}

/**
 * Scales of two runs. Where nothing moves, solvers still leave different traces of their arithmetic; so no run is taken
 * for slower than 1e-3 √(g · extent), the default rest speed, nor to turn over less than its square times the mass.
 */
export function scalesOf(mechanism: Mechanism, runs: readonly Recording[]): Scales {
  const { extent, bodies, system, run } = mechanism;
  const idle = IDLE * Math.sqrt(Math.hypot(...mechanism.gravity) * extent);
  const mass = bodies.reduce((sum, body) => sum + body.mass, 0);
  const duration = 'time' in run.until ? Math.min(run.until.time, run.atMost) : run.atMost;
  return {
    extent,
    duration,
    speed: Math.max(idle, ...runs.map(greatestSpeed)),
    turnover: Math.max(mass * idle * idle, ...runs.map((recording) => wholeTurnover(recording, system))),
  };
}

/** √(I/m) [m]: turning at ω, as much of the body's energy is in its motion as in a speed of ω times this. */
export function gyration({ mass, inertia }: BodySpec): number {
  return Math.sqrt(inertia / mass);
}

function greatestSpeed(recording: Recording): number {
  let greatest = 0;
  for (const body of recording.layout.bodies) {
    const { vx, vy, spin } = body.columns;
    const radius = gyration(body);
    for (let row = 0; row < recording.rowCount; row++) {
      const turning = radius * Math.abs(valueAt(recording, row, spin));
      const speed = Math.max(turning, Math.hypot(valueAt(recording, row, vx), valueAt(recording, row, vy)));
      if (speed > greatest && speed < Infinity) greatest = speed;
    }
  }
  return greatest;
}

/** Turnover of a run from its first to its last row [J]. */
export function wholeTurnover(recording: Recording, system: readonly string[]): number {
  if (recording.rowCount === 0) return 0;
  const whole = { from: '', to: '', fromRow: 0, toRow: recording.rowCount - 1 };
  return bookLedger(recording, whole, system, { places: false }).turnover;
}

/** How far a body has been from where it started, until a row: its greatest distance [m] and turn [rad]. */
export function reachUntil(
  recording: Recording,
  { columns }: BodySpec,
  lastRow: number,
): { way: number; turn: number } {
  const read = (row: number, column: number): number => valueAt(recording, row, column) - valueAt(recording, 0, column);
  let [way, turn] = [0, 0];
  for (let row = 1; row <= lastRow; row++) {
    const distance = Math.hypot(read(row, columns.x), read(row, columns.y));
    const angle = Math.abs(read(row, columns.angle));
    if (distance > way) way = distance;
    if (angle > turn) turn = angle;
  }
  return { way, turn };
}
