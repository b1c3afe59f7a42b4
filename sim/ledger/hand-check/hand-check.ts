import { dot, unit, type Vec } from '../../core/vec.js';
import type { Mechanism } from '../../mechanism/model.js';
import { bodyAtRow, bodyOf, type Recording } from '../../recording/index.js';
import { stationRows, stationSpans, type StationRow } from '../stations.js';
import type { HandCheck } from './check.js';
import { writeStage } from './equation.js';
import { pinArm } from './pin-course.js';
import { NoHandSum, refuse } from './refusal.js';
import { Scene } from './scene.js';
import { leftOf, type Mover, type Stage } from './stage.js';
import { number, operator, plainText, symbol, words, type Expression } from './tokens.js';
import { Walk, type Route, type Speeds } from './walk.js';

/**
 * The work–energy equation T₁ + V₁ + U = T₂ + V₂ of each body between each two consecutive stations, and from the first
 * to the last where one equation goes through: in symbols, in numbers, solved for the speed at the second.
 *
 * It takes masses, geometry, springs, coefficients and restitutions from the document alone. The recording tells it where
 * a body was at the stations and at what happened between, what it touched, and whether it slid or rolled; no force,
 * energy or account of it is read. Each speed at a start is the one that the hand gave before, nil where the station
 * means rest, or the document's. Where an assumption fails there is no number, and the sentence says which.
 */
export function handCheck(mechanism: Mechanism, recording: Recording): HandCheck[] {
  const stations = stationRows(recording);
  const hand = new Hand(new Scene(mechanism, recording), stations);
  const spans = stationSpans(stations);
  const pairs = spans.slice(0, Math.max(0, stations.length - 1));
  const checks = pairs.flatMap((_, i) => mechanism.bodies.map(({ id }) => hand.check(id, i, i + 1)));
  if (spans.length === pairs.length) return checks;
  const whole = mechanism.bodies
    .filter(({ id }) => checks.every(({ of, speed }) => of !== id || speed !== null))
    .map(({ id }) => hand.check(id, 0, stations.length - 1))
    .filter(({ speed, equation }) => speed !== null && equation.includes('½') && !equation.includes(';'));
  return [...checks, ...whole];
}

const UNKNOWN = 'is not known by hand';

/** What a walk found. */
interface Way {
  stages: Stage[];
  remarks: Expression[];
  speeds: Speeds;
}

class Hand {
  private readonly ways = new Map<string, Way | NoHandSum>();
  private readonly known = new Map<string, Speeds | string>();

  constructor(
    private readonly scene: Scene,
    private readonly stations: readonly StationRow[],
  ) {}

  /** The check of a body between two stations, by their indexes. */
  check(body: string, from: number, to: number): HandCheck {
    const [start, end] = [this.stations[from], this.stations[to]];
    const base = { from: start.id, to: end.id, of: body, with: [], equation: '', lines: [], typeset: [] };
    try {
      const { stages, remarks, speeds } = this.walk(body, from, to);
      return { ...base, ...written(stages, remarks, end.id), ...answer(this.scene, body, end, speeds, stages) };
    } catch (error) {
      if (!(error instanceof NoHandSum)) throw error;
      return { ...base, speed: null, reason: error.message };
    }
  }

  /** The way between two stations, gone once; a refusal is remembered too. */
  private walk(body: string, from: number, to: number): Way {
    const key = `${body} ${from} ${to}`;
    const way = this.ways.get(key) ?? this.attempt(body, from, to);
    this.ways.set(key, way);
    if (way instanceof NoHandSum) throw way;
    return way;
  }

  private attempt(body: string, from: number, to: number): Way | NoHandSum {
    const [start, end] = [this.stations[from], this.stations[to]];
    const route: Route = {
      body,
      from: start.id,
      to: end.id,
      fromRow: start.row,
      toRow: end.row,
      restsAt: (mover, tangent) => restAt(this.scene, end.id, mover, tangent),
    };
    try {
      const { walk, speeds } = this.walkOn(route, this.speedsAt(body, from));
      return { stages: walk.stages, remarks: walk.remarks, speeds };
    } catch (error) {
      if (error instanceof NoHandSum) return error;
      throw error;
    }
  }

  private walkOn(route: Route, speeds: Speeds): { walk: Walk; speeds: Speeds } {
    const walk = new Walk(this.scene, route, speeds, (other, row) => this.speedAtRow(other, row, route));
    return { walk, speeds: walk.run() };
  }

  /** What the hand knows of a body at a station: rest, what it worked out up to there, or the document. */
  private speedsAt(body: string, index: number): Speeds {
    const key = `${body} ${index}`;
    const known = this.known.get(key) ?? this.workOut(body, index);
    this.known.set(key, known);
    return typeof known === 'string' ? refuse(known) : known;
  }

  private workOut(body: string, index: number): Speeds | string {
    const { id, row } = this.stations[index];
    try {
      if (index > 0) return this.walk(body, index - 1, index).speeds;
      const start = this.asDrawn(body);
      return row === 0 ? start : this.walkOn({ body, from: '0', to: id, fromRow: 0, toRow: row }, start).speeds;
    } catch (error) {
      if (!(error instanceof NoHandSum)) throw error;
      if (meansRest(this.scene, id, body)) return { speed: 0, spin: 0 };
      const { message } = error;
      return message.includes(UNKNOWN) ? message : `The speed of ${body} at station ${id} ${UNKNOWN}: ${message}`;
    }
  }

  private asDrawn(body: string): Speeds {
    const { velocity, spin, inertia } = this.scene.body(body);
    const speed = Math.hypot(...velocity);
    const pin = this.scene.jointsOf(body, 0).find((joint) => joint.kind === 'pin');
    const swings = inertia === 0 && pin?.kind === 'pin';
    return { speed, spin: swings ? speed / pinArm(this.scene, body, pin) : Math.abs(spin) };
  }

  /** Speed of another body at a row within a route, followed from the same station. */
  private speedAtRow(body: string, row: number, { fromRow, from, body: asker }: Route): number {
    const at = this.stations.findIndex((station) => station.row === fromRow && station.id === from);
    const start = at < 0 ? this.asDrawn(body) : this.speedsAt(body, at);
    if (row === fromRow) return start.speed;
    const route: Route = { body, from, to: '′', fromRow, toRow: row };
    const walk = new Walk(this.scene, route, start, (other) =>
      refuse(`${asker} and ${other} strike each other in turns.`),
    );
    return walk.run().speed;
  }
}

/** Where a station's own meaning puts a body at rest: `rests` of it or of all. */
function meansRest({ mechanism }: Scene, station: string, body: string): boolean {
  const when = mechanism.stations.find(({ id }) => id === station)?.when;
  return when?.kind === 'rests' && (when.of === 'all' || when.of === body);
}

/** Why what moves is at rest at a station: it rests, or turns back on its one way. */
function restAt(
  scene: Scene,
  station: string,
  { members }: Mover,
  tangent: readonly [number, number] | undefined,
): string | undefined {
  const when = scene.mechanism.stations.find(({ id }) => id === station)?.when;
  if (members.some((id) => meansRest(scene, station, id))) return `${members.join(' and ')} at rest`;
  if (when?.kind !== 'turns' || !members.includes(when.of) || !tangent) return undefined;
  const along: Vec = unit([tangent[0], tangent[1]]);
  return Math.abs(dot(along, unit(when.along))) > 1e-3 ? `${members.join(' and ')} turning back` : undefined;
}

function written(
  stages: readonly Stage[],
  remarks: Expression[],
  to: string,
): Pick<HandCheck, 'equation' | 'lines' | 'typeset' | 'with'> {
  const parts = stages.map(writeStage);
  const still: Expression[] = [
    [symbol('v', { sub: to }), operator('='), number('0'), operator(','), words('it does not move')],
  ];
  const typeset = [
    ...parts.flatMap(({ lines }) => lines),
    ...remarks,
    ...(parts.length + remarks.length === 0 ? still : []),
  ];
  const equations = parts.length > 0 ? parts.map(({ equation }) => equation) : typeset;
  return {
    with: stages.at(-1)?.end.members.slice(1) ?? [],
    equation: equations.map(plainText).join('; '),
    lines: typeset.map(plainText),
    typeset,
  };
}

function answer(
  { recording }: Scene,
  body: string,
  { id, row }: StationRow,
  { speed, spin }: Speeds,
  stages: readonly Stage[],
): Pick<HandCheck, 'speed' | 'spin' | 'left' | 'difference' | 'spinDifference'> {
  if (!Number.isFinite(speed + spin))
    refuse(`Where ${body} is before station ${id} is not a finite place in this run.`);
  const last = stages.at(-1);
  const isPin = last?.end.kind === 'pin';
  const spec = bodyOf(recording, body);
  const state = spec && bodyAtRow(recording, spec, row);
  const difference = state && speed - Math.hypot(state.vx, state.vy);
  const spinDifference = state && isPin && spec.inertia > 0 ? spin - Math.abs(state.spin) : undefined;
  return {
    speed,
    ...(isPin ? { spin } : {}),
    ...(last?.rests === undefined ? {} : { left: leftOf(last) }),
    ...(Number.isFinite(difference) ? { difference } : {}),
    ...(Number.isFinite(spinDifference) ? { spinDifference } : {}),
  };
}
