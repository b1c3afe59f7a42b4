import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import type { RunEnd } from '../recording/recording.js';
import { AT_REST, StationWatch } from '../recording/station-watch.js';
import { armAtStart, armOnTheWay } from './arming.js';
import { assemble, type Assembly } from './assembly.js';
import { findEvent } from './event-finder.js';
import { Impacts } from './impacts.js';
import { unrest } from './rest.js';
import { RunLog } from './run-log.js';
import { controlledStep } from './method/controlled-step.js';
import { Dop853 } from './method/dop853.js';
import { Modes, type Decided } from './modes.js';
import { StateMotion } from './motion.js';
import { Latches } from './latches.js';
import { hasCome, momentsOf } from './moments.js';
import { Pace } from './pace.js';
import { Projection } from './projection.js';
import { Recorder } from './recorder.js';
import { connectStores } from './stores.js';
import type { ContactPoint } from './unilateral.js';
import { watchList, type Watch } from './watch-list.js';

export interface EngineOptions {
  /** Relative tolerance of the integration. */
  tolerance: number;
  /** About how many rows over the whole run. */
  rows: number;
}

const LEAST_STEP = 1e-14;
const MOST_EVENTS = 200_000;

/** Integrates a mechanism event by event and records it. */
export class Engine {
  readonly recorder: Recorder;
  end: RunEnd | null = null;
  t = 0;
  drift = 0;
  private readonly assembly: Assembly;
  private readonly y: Float64Array;
  private readonly q: Float64Array;
  private readonly v: Float64Array;
  private readonly works: Float64Array;
  private readonly scale: Float64Array;
  private readonly method: Dop853;
  private readonly modes: Modes;
  private readonly impacts: Impacts;
  private readonly projection: Projection;
  private readonly motion: StateMotion;
  private readonly stations: StationWatch;
  private readonly log: RunLog;
  private readonly moments: number[];
  private readonly pace: Pace;
  private readonly latches: Latches;
  private h: number;
  /** Longest step in which nothing near can be missed. */
  private limit = Infinity;
  private nextRow = 0;
  private events = 0;
  private steps = 0;

  constructor(
    private readonly mechanism: Mechanism,
    private readonly options: EngineOptions,
  ) {
    this.assembly = assemble(mechanism, (from, until) => this.isOn(from, until));
    connectStores(this.assembly);
    const { system, dynamics, numerical } = this.assembly;
    const n = 3 * system.count;
    this.y = new Float64Array(2 * n + system.ledgers.slots);
    this.q = this.y.subarray(0, n);
    this.v = this.y.subarray(n, 2 * n);
    this.works = this.y.subarray(2 * n);
    this.q.set(system.startPositions);
    this.v.set(system.startVelocities);
    this.scale = new Float64Array(this.y.length);
    this.method = new Dop853((t, y, dy) => this.derivative(t, y, dy), this.y.length);
    this.modes = new Modes(dynamics);
    this.impacts = new Impacts(dynamics);
    this.projection = new Projection(dynamics, numerical);
    this.motion = new StateMotion(system.units, this.q, this.v);
    this.stations = new StationWatch(mechanism, this.motion);
    this.recorder = new Recorder(this.assembly);
    this.log = new RunLog(this.assembly, this.recorder, this.stations);
    this.moments = momentsOf(mechanism, this.stations, system.units.time);
    this.latches = new Latches(mechanism, this.assembly, this.stations);
    this.pace = new Pace(system, options.tolerance, this.duration(), this.meetsNothing());
    this.h = 1e-4 * this.duration();
    this.begin();
  }

  private duration(): number {
    return this.mechanism.run.atMost / this.assembly.system.units.time;
  }

  private meetsNothing(): boolean {
    const { dynamics, soft } = this.assembly;
    return dynamics.parts.unilaterals.length === 0 && soft.length === 0;
  }

  private seconds(): number {
    return this.t * this.assembly.system.units.time;
  }

  private isOn(from: Moment | undefined, until: Moment | undefined): boolean {
    const come = (moment: Moment): boolean => hasCome(moment, this.seconds(), this.stations);
    return (!from || come(from)) && !(until && come(until));
  }

  private derivative(t: number, y: Float64Array, dy: Float64Array): void {
    const n = this.q.length;
    const q = y.subarray(0, n);
    const v = y.subarray(n, 2 * n);
    const { dynamics } = this.assembly;
    dynamics.accelerate(t, q, v);
    dy.set(v, 0);
    dy.set(dynamics.acceleration, n);
    dynamics.powers(dy.subarray(2 * n), v);
  }

  private begin(): void {
    const { dynamics, points, soft } = this.assembly;
    armAtStart(points, this.q, this.v);
    for (const point of soft) if (point.point.isValid && point.point.gap < 0) point.isPressed = true;
    // What slides at the start must not be taken to stick while velocities are made to fit the joints.
    for (const friction of dynamics.parts.frictions) friction.sliding = 1;
    this.projection.apply(0, this.q, this.v, this.works);
    this.works.fill(0);
    this.settle({});
    dynamics.accelerate(0, this.q, this.v);
    this.record();
    this.log.reach(
      this.stations.reach(({ when }) => when.kind === 'start' || (when.kind === 'time' && when.time <= 0), 0),
      this.seconds(),
      () => this.record(),
    );
    this.strike(false);
    this.settle({});
    this.place();
    this.log.modes(this.seconds(), () => this.record());
    this.noticeRest();
    this.checkEnd();
  }

  /** One step of the integration, up to the first event in it. */
  step(): void {
    this.steps += 1;
    this.pace.measure(this.v, this.scale);
    const watches = this.watches();
    const next = this.moments.find((moment) => moment > this.t * (1 + 1e-14) + 1e-300) ?? Infinity;
    this.method.restart(this.t, this.y);
    const longest = Math.min(this.pace.longest(this.v, this.assembly.dynamics.acceleration), this.limit);
    const first = Math.min(this.h, longest, next - this.t);
    const step = controlledStep(this.method, first, this.scale, LEAST_STEP * Math.max(1, this.t));
    if (!step) {
      this.finish('stepTooSmall');
      return;
    }
    this.h = step.next;
    const { taken } = step;
    const look = (t: number, y: Float64Array): { q: Float64Array; v: Float64Array } => this.look(t, y);
    const event = findEvent(this.method, watches, this.y.length, taken, this.scale, look, this.t);
    const length = event ? event.taken : taken;
    this.recordBetween(length);
    const isExact = !event && Math.abs(this.t + taken - next) <= 1e-12 * Math.max(1, next);
    if (length > 0) this.y.set(this.method.end);
    this.t = isExact ? next : this.t + length;
    this.log.moved();
    if (this.y.some((value) => !Number.isFinite(value))) {
      this.finish('nonFinite');
      return;
    }
    const { drift } = this.projection.apply(this.t, this.q, this.v, this.works);
    this.drift = Math.max(this.drift, drift);
    armOnTheWay(this.assembly.points, this.q, this.v);
    this.assembly.dynamics.accelerate(this.t, this.q, this.v);
    this.handle(event?.watches ?? [], isExact);
    this.stations.settle(this.motion.at(this.q, this.v));
    this.checkEnd();
  }

  /** Brings a copy of a state through the dynamics, for watches to read. */
  private look(t: number, y: Float64Array): { q: Float64Array; v: Float64Array } {
    const n = this.q.length;
    const q = y.subarray(0, n);
    const v = y.subarray(n, 2 * n);
    this.assembly.dynamics.accelerate(t, q, v);
    return { q, v };
  }

  private watches(): Watch[] {
    const { acceleration } = this.assembly.dynamics;
    const h = Math.min(this.h, this.pace.longest(this.v, acceleration));
    const motion = this.motion.at(this.q, this.v);
    this.limit = Infinity;
    const isNear = (point: ContactPoint): boolean => {
      const meets = this.pace.canMeet(point, this.q, this.v, h);
      if (meets) this.limit = Math.min(this.limit, this.pace.unmissable(point, this.v));
      return meets;
    };
    const list = watchList(this.assembly, this.stations, motion, this.latches.watched(), isNear);
    for (const of of this.stations.resting()) {
      const value = (_q: Float64Array, v: Float64Array): number => this.unrest(of, v) - AT_REST;
      list.push({ value, tolerance: 0, happening: { kind: 'rests' } });
    }
    return list;
  }

  private handle(met: readonly Watch[], isExact: boolean): void {
    let decided: Decided | null = null;
    for (const { happening } of met) {
      this.events += 1;
      const next = this.happen(happening);
      if (next) decided = { ...(decided ?? {}), ...next };
    }
    if (this.events > MOST_EVENTS) {
      this.finish('eventsAccumulate');
      return;
    }
    if (isExact) {
      this.log.reach(
        this.stations.reach(
          ({ when }) => when.kind === 'time' && this.seconds() >= when.time * (1 - 1e-12),
          this.seconds(),
        ),
        this.seconds(),
        () => this.record(),
      );
      this.releaseDue();
      decided ??= {};
    }
    if (!decided) return;
    const struck = this.strike(true);
    this.settle(struck ? {} : decided);
    this.log.modes(this.seconds(), () => this.record());
    this.releaseDue();
    this.noticeRest();
    this.h = Math.max(this.h, 1e-6 * this.duration());
  }

  /** Does what an event says; returns what it has decided for the modes, or null where they stay. */
  private happen(happening: Watch['happening']): Decided | null {
    switch (happening.kind) {
      case 'closes':
        return {};
      case 'opens':
        return { opened: happening.what };
      case 'breaksLoose':
        return { loose: { what: happening.what, sliding: happening.sliding() } };
      case 'stops':
      case 'restart':
      case 'rests':
        return {};
      case 'presses':
        this.log.press(happening.what, this.q, this.v, this.works, this.seconds(), () => this.record());
        return {};
      case 'letsGo':
        this.log.letGo(happening.what, this.works);
        return {};
      case 'clears':
        happening.what.hasLetGo = false;
        return null;
      case 'releases':
        this.release(happening.latch);
        return {};
      case 'station': {
        const id = this.stations.passed(happening.index, this.motion.at(this.q, this.v), this.seconds());
        if (id !== null) this.log.reach([id], this.seconds(), () => this.record());
        return id === null ? null : {};
      }
    }
  }

  /** Impacts due now; returns whether there were any. */
  private strike(counts: boolean): boolean {
    let any = false;
    for (let round = 0; round < 20; round += 1) {
      const before = this.stationValues();
      let row = -1;
      const outcome = this.impacts.resolve(this.t, this.q, this.v, this.works, (strikes) => {
        row = this.record();
        if (counts) this.log.struck(strikes, row, this.seconds());
      });
      if (outcome === 'noSolution') {
        this.log.noSolution(this.seconds());
        this.finish('noSolution');
        return true;
      }
      if (!outcome) return any;
      any = true;
      if (outcome.cut < 1) this.log.restitutionCut(outcome, this.seconds());
      this.log.moved();
      this.turned(before, row);
      this.settle({});
      this.assembly.dynamics.accelerate(this.t, this.q, this.v);
      this.record();
    }
    return any;
  }

  private stationValues(): Map<number, number> {
    const motion = this.motion.at(this.q, this.v);
    return new Map(this.stations.smooth().map((index) => [index, this.stations.signedValue(index, motion)]));
  }

  private turned(before: ReadonlyMap<number, number>, row: number): void {
    const motion = this.motion.at(this.q, this.v);
    for (const [index, value] of before) {
      if (!(value > 0) || this.stations.signedValue(index, motion) > -this.stations.blurOf(index)) continue;
      const id = this.stations.passed(index, motion, this.seconds());
      if (id !== null) this.log.station(id, row, this.seconds());
    }
  }

  private settle(decided: Decided): void {
    if (this.end !== null) return;
    if (this.modes.settle(this.t, this.q, this.v, decided)) return;
    this.log.noSolution(this.seconds());
    this.finish('noSolution');
  }

  /** Puts what is closed as drawn exactly onto its surface: how far a drawing was off it is no drift. */
  private place(): void {
    this.projection.apply(this.t, this.q, this.v, this.works);
    this.assembly.dynamics.accelerate(this.t, this.q, this.v);
  }

  private releaseDue(): void {
    for (const id of this.latches.due(this.seconds())) {
      this.release(id);
      this.settle({});
    }
  }

  private release(id: string): void {
    this.latches.release(id, () => this.log.release(id, this.seconds(), this.record()));
  }

  private unrest(of: string, v: Float64Array): number {
    return unrest(this.assembly.system, of, v, this.assembly.dynamics.acceleration);
  }

  private noticeRest(): void {
    if (this.stations.resting().length === 0) return;
    const reached = this.stations.reach(
      ({ when }) => when.kind === 'rests' && this.unrest(when.of, this.v) <= AT_REST,
      this.seconds(),
    );
    this.log.reach(reached, this.seconds(), () => this.record());
  }

  private recordBetween(length: number): void {
    const interval = this.duration() / this.options.rows;
    while (this.nextRow <= this.t) this.nextRow += interval;
    const state = new Float64Array(this.y.length);
    while (this.nextRow < this.t + length * (1 - 1e-9)) {
      this.method.interpolate((this.nextRow - this.t) / length, state);
      const { q, v } = this.look(this.nextRow, state);
      this.recorder.row(this.nextRow, q, v, state.subarray(2 * this.q.length));
      this.nextRow += interval;
    }
  }

  private record(): number {
    return this.log.record(() => this.recorder.row(this.t, this.q, this.v, this.works));
  }

  private checkEnd(): void {
    const { until, atMost } = this.mechanism.run;
    const time = this.seconds() * (1 + 1e-12);
    const isDone = 'station' in until ? this.stations.isReached(until.station) : time >= until.time;
    if (isDone || time >= atMost) this.finish('reachedEnd');
  }

  /** Ends the run and records its last state. */
  finish(end: RunEnd): void {
    if (this.end !== null) return;
    this.end = end;
    this.log.reach(
      this.stations.reach(({ when }) => when.kind === 'end', this.seconds()),
      this.seconds(),
      () => this.record(),
    );
    this.record();
    this.recorder.writer.finish(end, {
      steps: this.steps,
      evaluations: this.method.evaluations,
      events: this.events,
      drift: this.drift,
    });
  }
}
