/** Positions of the mass centres, angles, velocities and spins of all bodies, in engine units. */
export interface State {
  x: Float64Array;
  y: Float64Array;
  a: Float64Array;
  vx: Float64Array;
  vy: Float64Array;
  w: Float64Array;
}

export const newState = (count: number): State => ({
  x: new Float64Array(count),
  y: new Float64Array(count),
  a: new Float64Array(count),
  vx: new Float64Array(count),
  vy: new Float64Array(count),
  w: new Float64Array(count),
});

export function copyState(from: State, to: State): void {
  to.x.set(from.x);
  to.y.set(from.y);
  to.a.set(from.a);
  to.vx.set(from.vx);
  to.vy.set(from.vy);
  to.w.set(from.w);
}

/** Far beyond what any machine does, and far from where squares of it overflow [engine units]. */
const FARTHEST = 1e14;
const FASTEST = 1e10;

/** Whether a state is finite, and not on its way to being infinite. */
export function isBounded({ x, y, a, vx, vy, w }: State): boolean {
  return (
    [x, y, a].every((column) => isWithin(column, FARTHEST)) && [vx, vy, w].every((column) => isWithin(column, FASTEST))
  );
}

function isWithin(column: Float64Array, most: number): boolean {
  return column.every((value) => Math.abs(value) <= most);
}
