import { restScales } from '../recording/station-watch.js';
import type { System } from './system.js';

/** A turning body counts by a point this far out [auditor length]. */
const REACH = 0.1;

/** How far a body (or 'all') is from rest: speed and acceleration on the scales of the mechanism. */
export function unrest(system: System, of: string, v: Float64Array, acceleration: Float64Array): number {
  const { ids, units, source } = system;
  const scales = restScales(source);
  const bodies = of === 'all' ? ids.map((_, i) => i) : [ids.indexOf(of)];
  const size = (x: Float64Array, i: number): number => Math.hypot(x[3 * i], x[3 * i + 1], x[3 * i + 2] * REACH);
  const speed = Math.max(...bodies.map((i) => size(v, i))) * (units.length / units.time);
  const change = Math.max(...bodies.map((i) => size(acceleration, i))) * (units.length / units.time ** 2);
  return speed / scales.speed + change / scales.acceleration;
}
