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

export function isFiniteState(state: State): boolean {
  let sum = 0;
  for (const column of [state.x, state.y, state.a, state.vx, state.vy, state.w]) {
    for (const value of column) sum += value - value;
  }
  return sum === 0;
}
