import type { Mechanism } from '../mechanism/model.js';
import type { Body, Shape } from '../mechanism/kinds/body.js';

/**
 * Units of the engine. planck's tolerances are absolute, so the engine works in units in which bodies are about one unit
 * across, gravity (or the greatest speed, where there is none) is about one, and masses are about one: a 5 mm latch and
 * a 5 m chute of the same proportions then give the same numbers.
 */
export interface Scale {
  /** Metres, seconds and kilograms in one engine unit. */
  length: number;
  time: number;
  mass: number;
  speed: number;
  acceleration: number;
  force: number;
  energy: number;
  inertia: number;
  /** Linear rate [N/m] and damping [N s/m] of one engine unit. */
  rate: number;
  damping: number;
}

/** Greatest distance of a shape's outline from its origin [m]; 0 for a point. */
export function shapeReach(shape: Shape): number {
  switch (shape.kind) {
    case 'disc':
      return shape.radius;
    case 'box':
      return Math.hypot(shape.width, shape.height) / 2;
    case 'bar':
      return (shape.length + shape.width) / 2;
    case 'polygon':
      return Math.max(...shape.points.map(([x, y]) => Math.hypot(x, y)));
    case 'cam':
      return shape.baseRadius;
    case 'particle':
    case 'none':
      return 0;
  }
}

/** Builds the engine's units for a mechanism. */
export function scaleFor(mechanism: Mechanism): Scale {
  const reaches = mechanism.bodies.map((body) => shapeReach(body.shape)).filter((reach) => reach > 0);
  const length = reaches.length > 0 ? 2 * median(reaches) : mechanism.extent / 10 || 1;
  const mass = median(mechanism.bodies.map((body) => body.mass)) || 1;
  const time = timeUnit(mechanism, length, mass);
  const speed = length / time;
  const force = (mass * speed) / time;
  return {
    length,
    time,
    mass,
    speed,
    acceleration: speed / time,
    force,
    energy: force * length,
    inertia: mass * length * length,
    rate: force / length,
    damping: force / speed,
  };
}

function timeUnit(mechanism: Mechanism, length: number, mass: number): number {
  const g = Math.hypot(...mechanism.gravity);
  if (g > 0) return Math.sqrt(length / g);
  const speed = Math.max(0, ...mechanism.bodies.map((body) => startSpeed(body)));
  if (speed > 0) return length / speed;
  const rates = mechanism.springs.flatMap((spring) => (spring.kind === 'linear' ? [spring.rate] : []));
  if (rates.length > 0) return Math.sqrt(mass / Math.max(...rates));
  return 1;
}

function startSpeed(body: Body): number {
  return Math.hypot(...body.velocity) + Math.abs(body.spin) * shapeReach(body.shape);
}

function median(values: number[]): number {
  if (values.length === 0) return 0;
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}
