import type { BodySpec } from '../../recording/index.js';
import { bodyAtRow, bodyOf } from '../../recording/index.js';
import { ofLabel } from '../names.js';
import type { CommonStation } from './common.js';
import type { Quantity, StationComparison, StationFigure } from './figures.js';
import { compareFigures } from './figures.js';
import { gyration, reachUntil, type Compared } from './scales.js';

/**
 * All figures of a station in both runs: time, then each body's position, angle, speed and spin, then the touch.
 *
 * A position is measured on how far the body has been from where it started, so that the verdict is the same wherever on
 * the sheet the mechanism is drawn; an angle on how far the body has turned. Turning is measured at the radius of
 * gyration; a body without one does not turn.
 */
export function compareStation(compared: Compared, station: CommonStation): StationComparison {
  const { stepper, scales, least, tolerance } = compared;
  const { time } = station.stepper;
  const clock = compareFigures(time, station.auditor.time, least * scales.duration, tolerance);
  const bodies = stepper.layout.bodies.flatMap((body) => compareBody(compared, station, body));
  const figures = [{ quantity: 'time' as const, of: '', ...clock }, ...bodies, ...compareTouch(compared, station)];
  return { station: station.id, figures };
}

function compareBody(compared: Compared, station: CommonStation, body: BodySpec): StationFigure[] {
  const { stepper, auditor, scales, least, tolerance } = compared;
  const other = bodyOf(auditor, body.id);
  if (!other) return [];
  const [a, b] = [bodyAtRow(stepper, body, station.stepper.row), bodyAtRow(auditor, other, station.auditor.row)];
  const [here, there] = [
    reachUntil(stepper, body, station.stepper.row),
    reachUntil(auditor, other, station.auditor.row),
  ];
  const { extent, speed } = scales;
  const way = Math.max(least * extent, here.way, there.way);
  const radius = gyration(other);
  const turn = Math.max((least * extent) / radius, here.turn, there.turn);
  const figure = (quantity: Quantity, first: number, second: number, floor: number): StationFigure => {
    return { quantity, of: body.id, ...compareFigures(first, second, floor, tolerance) };
  };
  return [
    { quantity: 'x', of: body.id, ...offset(a.x, b.x, way, tolerance) },
    { quantity: 'y', of: body.id, ...offset(a.y, b.y, way, tolerance) },
    figure('speed', Math.hypot(a.vx, a.vy), Math.hypot(b.vx, b.vy), least * speed),
    ...(radius > 0
      ? [
          { quantity: 'angle' as const, of: body.id, ...offset(a.angle, b.angle, turn, tolerance) },
          figure('spin', a.spin, b.spin, (least * speed) / radius),
        ]
      : []),
  ];
}

/** Places have no nil of their own: only how far the body has come says whether they are near each other. */
function offset(
  first: number,
  second: number,
  scale: number,
  tolerance: number,
): Omit<StationFigure, 'quantity' | 'of'> {
  const share = first === second ? 0 : Math.abs(first - second) / scale;
  return { stepper: first, auditor: second, difference: first - second, share, within: share <= tolerance };
}

/** A station of kind `touch` strikes in both runs; one that only happens to fall on an impact may do so in one. */
function compareTouch({ mechanism, scales, least, tolerance }: Compared, station: CommonStation): StationFigure[] {
  const [a, b] = [station.stepper.touch, station.auditor.touch];
  const when = mechanism.stations.find(({ id }) => id === station.id)?.when;
  const pair = when?.kind === 'touch' ? when.pair : null;
  if ((!a || !b) && !(pair && (a ?? b))) return [];
  const of = ofLabel(pair);
  const speed = [a?.approachSpeed ?? null, b?.approachSpeed ?? null, least * scales.speed] as const;
  const mass = [a?.effectiveMass ?? null, b?.effectiveMass ?? null, 0] as const;
  return [
    { quantity: 'approachSpeed', of, ...compareFigures(...speed, tolerance) },
    { quantity: 'effectiveMass', of, ...compareFigures(...mass, tolerance) },
  ];
}
