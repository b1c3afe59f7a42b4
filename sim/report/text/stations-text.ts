import type { CheckResult, ReachedStation, ResultStation } from '../result.js';
import type { Column } from './layout.js';
import { table } from './layout.js';
import type { PrintUnit } from './quantities.js';
import { figure, massUnit, speedUnit } from './quantities.js';

/** The stations as a table: when, how fast each body is, and how it strikes where a station falls on an impact. */
export function stationsText({ stepper, auditor }: CheckResult, width: number): string[] {
  const stations = stepper?.stations ?? [];
  if (stations.length === 0) return [];
  const reached = stations.filter((station): station is ReachedStation => station.reached);
  const bodies = Object.keys(reached.at(0)?.bodies ?? {});
  const columns: Column[] = [
    { head: 'Station', cells: stations.map(({ id }) => id), align: 'left' },
    column('Time, s', stations, ({ time }) => time.toFixed(4)),
    ...touchColumns(stations, reached),
    ...speedColumns(stations, reached, bodies),
  ];
  return ['', 'Stations', ...table(columns, 2, width), ...errorText(auditor?.stations ?? [], width)];
}

/** What the auditor itself says that its figures may be off by, the greatest of any body. */
function errorText(stations: readonly ResultStation[], width: number): string[] {
  const known = stations.filter((station): station is ReachedStation => station.reached && station.error !== undefined);
  if (known.length === 0) return [];
  const cells = (of: (error: NonNullable<ReachedStation['error']>) => number): string[] =>
    known.map(({ error }) => (error ? of(error).toExponential(0) : '–'));
  const columns: Column[] = [
    { head: 'Auditor’s own error at', cells: known.map(({ id }) => id), align: 'left' },
    { head: 'Time, s', cells: cells(({ time }) => time), align: 'right' },
    { head: 'Place, m', cells: cells(({ position }) => position), align: 'right' },
    { head: 'Speed, m/s', cells: cells(({ speed }) => speed), align: 'right' },
  ];
  return ['', ...table(columns, 2, width)];
}

function touchColumns(stations: readonly ResultStation[], reached: readonly ReachedStation[]): Column[] {
  const touches = reached.flatMap(({ touch }) => (touch ? [touch] : []));
  if (touches.length === 0) return [];
  const speed = speedUnit(touches.map(({ approachSpeed }) => approachSpeed));
  const mass = massUnit(touches.map(({ effectiveMass }) => effectiveMass));
  return [
    column(`Approach, ${speed.symbol}`, stations, ({ touch }) => (touch ? figure(touch.approachSpeed, speed) : '')),
    column(`Eff. mass, ${mass.symbol}`, stations, ({ touch }) => (touch ? figure(touch.effectiveMass, mass) : '')),
  ];
}

/** A body's speed; its spin where its centre of mass stands still at every station and it turns, as a flywheel does. */
function speedColumns(
  stations: readonly ResultStation[],
  reached: readonly ReachedStation[],
  bodies: string[],
): Column[] {
  const unit: PrintUnit = speedUnit(reached.flatMap(({ bodies: at }) => bodies.map((body) => at[body].speed)));
  return bodies.map((body) => {
    const onlyTurns =
      reached.every((at) => isNil(at.bodies[body].speed, unit)) && reached.some((at) => at.bodies[body].spin !== 0);
    return onlyTurns
      ? column(`${body}, rad/s`, stations, (at) => figure(at.bodies[body].spin, RADIANS))
      : column(`${body}, ${unit.symbol}`, stations, (at) => figure(at.bodies[body].speed, unit));
  });
}

const RADIANS: PrintUnit = { symbol: 'rad/s', size: 1, decimals: 3 };

function isNil(value: number, unit: PrintUnit): boolean {
  return Number(figure(Math.abs(value), unit)) === 0;
}

/** A column of figures; a station that was not reached has dashes. */
function column(head: string, stations: readonly ResultStation[], cell: (station: ReachedStation) => string): Column {
  return { head, cells: stations.map((station) => (station.reached ? cell(station) : '–')), align: 'right' };
}
