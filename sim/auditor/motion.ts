import type { Motion } from '../recording/station-watch.js';
import type { Units } from './units.js';

/** A state of the auditor read in SI. */
export class StateMotion implements Motion {
  constructor(
    private readonly units: Units,
    public q: Float64Array,
    public v: Float64Array,
  ) {}

  at(q: Float64Array, v: Float64Array): this {
    this.q = q;
    this.v = v;
    return this;
  }
  x(body: number): number {
    return this.q[3 * body] * this.units.length;
  }
  y(body: number): number {
    return this.q[3 * body + 1] * this.units.length;
  }
  angle(body: number): number {
    return this.q[3 * body + 2];
  }
  vx(body: number): number {
    return (this.v[3 * body] * this.units.length) / this.units.time;
  }
  vy(body: number): number {
    return (this.v[3 * body + 1] * this.units.length) / this.units.time;
  }
}
