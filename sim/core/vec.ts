/** A point or a free vector of the plane, [x, y]. Units are those of the quantity it holds. */
export type Vec = readonly [number, number];

/** a + b */
export const add = (a: Vec, b: Vec): Vec => [a[0] + b[0], a[1] + b[1]];

/** a − b */
export const subtract = (a: Vec, b: Vec): Vec => [a[0] - b[0], a[1] - b[1]];

/** k a */
export const scale = (a: Vec, k: number): Vec => [a[0] * k, a[1] * k];

/** a · b */
export const dot = (a: Vec, b: Vec): number => a[0] * b[0] + a[1] * b[1];

/** Out-of-plane component of a × b: positive where b points to the left of a. */
export const cross = (a: Vec, b: Vec): number => a[0] * b[1] - a[1] * b[0];

/** |a|, without overflow. */
export const norm = (a: Vec): number => Math.hypot(a[0], a[1]);

/** |b − a| */
export const distance = (a: Vec, b: Vec): number => Math.hypot(b[0] - a[0], b[1] - a[1]);

/** a turned a quarter counter-clockwise: the left normal of a unit tangent. */
export const left = (a: Vec): Vec => [-a[1], a[0]];

/** a turned by `angle` [rad], counter-clockwise. */
export function rotate(a: Vec, angle: number): Vec {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  return [c * a[0] - s * a[1], s * a[0] + c * a[1]];
}

/** a / |a|; the null vector stays null. */
export function unit(a: Vec): Vec {
  const n = norm(a);
  return n === 0 ? [0, 0] : [a[0] / n, a[1] / n];
}

/** a + (b − a) t */
export const mix = (a: Vec, b: Vec, t: number): Vec => [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t];

/** Body coordinates to sheet coordinates: `origin` + `local` turned by `angle` [rad]. */
export const toSheet = (origin: Vec, angle: number, local: Vec): Vec => add(origin, rotate(local, angle));

/** Sheet coordinates to body coordinates, the inverse of `toSheet`. */
export const toBody = (origin: Vec, angle: number, point: Vec): Vec => rotate(subtract(point, origin), -angle);
