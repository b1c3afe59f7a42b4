import { gaussLegendre } from '../../core/quadrature.js';
import { CompensatedSum } from '../../core/sum.js';
import { bodyAtRow, type BodySpec } from '../../recording/index.js';
import type { MeasureKind } from '../measurement.js';
import type { Rows, RunView } from '../run-view.js';
import { ofBody } from './body-state.js';

/**
 * Length of the path of a body's centre of mass [m]: what goes to and fro counts both ways. Between rows the path is the
 * cubic through both places with both velocities (error of fourth order in the distance of the rows).
 */
export const travel: MeasureKind<'travel'> = {
  unit: 'm',
  take: (criterion, view) =>
    view.over(criterion, (rows) => ofBody(view, criterion.of, (body) => ({ value: pathLength(view, body, rows) }))),
};

function pathLength(view: RunView, body: BodySpec, { fromRow, toRow }: Rows): number {
  const sum = new CompensatedSum();
  for (let row = fromRow; row < toRow; row++) sum.add(lengthAfter(view, body, row));
  return sum.value;
}

function lengthAfter(view: RunView, body: BodySpec, row: number): number {
  const span = view.time(row + 1) - view.time(row);
  const [a, b] = [bodyAtRow(view.recording, body, row), bodyAtRow(view.recording, body, row + 1)];
  if (span <= 0) return Math.hypot(b.x - a.x, b.y - a.y);
  const vx = rate(span, a.x, a.vx, b.x, b.vx);
  const vy = rate(span, a.y, a.vy, b.y, b.vy);
  return span * gaussLegendre((s) => Math.hypot(vx(s), vy(s)), 0, 1);
}

/** Velocity along the Hermite cubic between two rows, over the share of the time between them. */
function rate(span: number, p0: number, v0: number, p1: number, v1: number): (s: number) => number {
  const mean = (p1 - p0) / span;
  return (s) => v0 * (1 - s) * (1 - 3 * s) + v1 * s * (3 * s - 2) + 6 * mean * s * (1 - s);
}
