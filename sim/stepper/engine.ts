import type { Vec } from '../core/vec.js';
import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import type { RunEnd } from '../recording/recording.js';
import { StationWatch } from '../recording/station-watch.js';
import { assemble, hasCome, type Assembly } from './assembly.js';
import type { Pair } from './contact/pair.js';
import type { Touch } from './contact/touch.js';
import { SKIN } from './contact/manager.js';
import type { Friction } from './element.js';
import { SceneMotion } from './motion.js';
import { Projection } from './projection.js';
import { Recorder } from './recorder.js';
import { RestWatch } from './rest-watch.js';
import { poseBodies, setVelocities } from './scene.js';
import { Shock, type Strike } from './shock.js';
import { VelocitySolver } from './solver.js';
import { copyState, isFinite_ } from './state.js';
import { findStep } from './step-finder.js';
import { STILL, Trial, type Passage } from './trial.js';

/** Events within one step beyond which they are taken to accumulate: impacts are then plastic. */
const MOST_EVENTS = 200;

export interface EngineOptions {
  /** Step [s]. */
  step: number;
  /** A row is recorded every so many steps; events have rows of their own. */
  rowEvery: number;
}

/** Steps a mechanism and records it. */
export class Engine {
  readonly recorder: Recorder;
  end: RunEnd | null = null;
  steps = 0;
  private readonly assembly: Assembly;
  private readonly motion: SceneMotion;
  private readonly watch: StationWatch;
  private readonly solver: VelocitySolver;
  private readonly shock: Shock;
  private readonly projection: Projection;
  private readonly trial: Trial;
  private readonly rests: RestWatch;
  private readonly released = new Set<string>();
  /** Row of the state now, where it has been recorded. */
  private rowNow = -1;
  private cutReported = false;
  private accumulationReported = false;

  constructor(
    private readonly mechanism: Mechanism,
    private readonly options: EngineOptions,
  ) {
    this.assembly = assemble(mechanism, { isOn: (from, until) => this.isOn(from, until) });
    const { scene, manager, elements, joints, springs, dampers, gravity } = this.assembly;
    this.motion = new SceneMotion(scene);
    this.watch = new StationWatch(mechanism, this.motion);
    this.solver = new VelocitySolver(scene, manager, elements, joints);
    this.shock = new Shock(scene, manager, this.solver);
    this.projection = new Projection(scene, manager, this.solver);
    this.trial = new Trial(scene, manager, this.solver, this.watch, this.motion);
    this.rests = new RestWatch(scene, options.step / scene.scale.time);
    this.recorder = new Recorder({ scene, manager, joints, springs, dampers, gravity }, options.step);
    this.begin();
  }

  private get time(): number {
    return this.assembly.scene.time * this.assembly.scene.scale.time;
  }

  private isOn(from: Moment | undefined, until: Moment | undefined): boolean {
    const reached = (id: string): number | undefined => this.watch.timeOf(id);
    if (from && !hasCome(from, this.time, reached)) return false;
    return !(until && hasCome(until, this.time, reached));
  }

  private begin(): void {
    const { scene, manager } = this.assembly;
    poseBodies(scene, scene.state.x, scene.state.y, scene.state.a);
    manager.refresh();
    for (const touch of manager.touches) manager.settle(touch);
    this.settleStops();
    this.bookGravity();
    this.record();
    this.reach(this.watch.reach(({ when }) => when.kind === 'start' || (when.kind === 'time' && when.time <= 0), 0));
    this.shock.remember();
    for (const touch of manager.touches) touch.sliding = 0;
    this.strike(false);
    this.renewSliding(() => true);
    this.checkEnd();
  }

  /** Takes one step (less where the run ends within it). */
  step(): void {
    const { scene } = this.assembly;
    const whole = this.options.step / scene.scale.time;
    let left = whole;
    let events = 0;
    while (left > 1e-12 * whole && this.end === null) {
      const tau = Math.min(left, this.untilNextMoment());
      left -= this.substep(tau, events > MOST_EVENTS);
      events += 1;
    }
    this.steps += 1;
    if (events > MOST_EVENTS) this.reportAccumulation();
    if (this.end === null && this.steps % this.options.rowEvery === 0) this.record();
  }

  /** Engine time until the next moment that a step must not run over. */
  private untilNextMoment(): number {
    const { scene } = this.assembly;
    const moments = [...this.watch.times(), ...this.momentTimes()];
    const now = this.time;
    const next = Math.min(...moments.filter((moment) => moment > now * (1 + 1e-13) + 1e-300));
    const until = this.mechanism.run.atMost;
    return Math.max(0, (Math.min(next, until) - now) / scene.scale.time);
  }

  private momentTimes(): number[] {
    const { loads, drives, latches, run } = this.mechanism;
    const of = (moment: Moment | undefined): number[] => (moment && 'time' in moment ? [moment.time] : []);
    return [
      ...[...loads, ...drives].flatMap(({ from, until }) => [...of(from), ...of(until)]),
      ...latches.flatMap(({ releasesAt }) => ('time' in releasesAt ? [releasesAt.time] : [])),
      ...('time' in run.until ? [run.until.time] : []),
    ];
  }

  private substep(tau: number, isCrowded: boolean): number {
    const { scene } = this.assembly;
    this.trial.begin();
    const { taken, met } = findStep(this.trial, scene.state, tau);
    this.commit(taken, met, isCrowded);
    if (!isFinite_(scene.state)) this.finish('nonFinite');
    return Math.max(taken, 1e-15 * tau);
  }

  private commit(taken: number, met: Passage[], isCrowded: boolean): void {
    const { scene, manager } = this.assembly;
    this.rowNow = -1;
    this.book(taken / 2);
    scene.time += taken;
    copyState(this.trial.next, scene.state);
    this.motion.state = scene.state;
    this.arrive();
    this.shock.remember();
    for (const touch of manager.touches) manager.settle(touch);
    this.settleStops();
    this.stopSliding(met);
    this.passStations(met);
    this.noticePartings();
    this.shock.isPlastic = isCrowded;
    this.strike(true);
    this.watch.settle(this.motion);
    this.release();
    this.reach(this.watch.reach(({ when }) => when.kind === 'time' && this.time >= when.time * (1 - 1e-13), this.time));
    this.noticeRest();
    this.checkEnd();
  }

  private book(half: number): void {
    const { scene, elements } = this.assembly;
    const { mean, middle } = this.trial;
    setVelocities(scene, mean.vx, mean.vy, mean.w);
    scene.bodies.forEach(({ c_position }, i) => {
      c_position.c.x = middle.x[i]!;
      c_position.c.y = middle.y[i]!;
      c_position.a = middle.a[i]!;
    });
    this.projection.resetReadings();
    this.solver.rigid.book();
    this.solver.soft.book();
    for (const rolling of this.solver.rolling) rolling.book();
    for (const element of elements) element.book?.(half);
  }

  /** Stored energies at the step's end, and the move back onto the constraints. */
  private arrive(): void {
    const { scene, manager, elements } = this.assembly;
    const { state } = scene;
    poseBodies(scene, state.x, state.y, state.a);
    for (const element of elements) element.arrive?.();
    this.solver.soft.arrive();
    if (this.projection.apply(state)) {
      scene.bodies.forEach(({ c_position: { c, a } }, i) => {
        this.bookMove(i, c.x - state.x[i], c.y - state.y[i]);
        state.x[i] = c.x;
        state.y[i] = c.y;
        state.a[i] = a;
      });
      poseBodies(scene, state.x, state.y, state.a);
      manager.refresh();
      for (const element of elements) element.project?.();
      this.solver.soft.project();
    }
    this.bookGravity();
  }

  /** Gravity's account counts every change of height; a projected one did no work on the speed. */
  private bookMove(body: number, dx: number, dy: number): void {
    const { scene } = this.assembly;
    const work = scene.mass[body] * (scene.gravity.x * dx + scene.gravity.y * dy);
    if (work !== 0) scene.numerical.add('position-projection', body, -work);
  }

  private bookGravity(): void {
    const { scene, gravity } = this.assembly;
    gravity.forEach((booked, i) => {
      const weight = scene.mass[i];
      const stored = -weight * (scene.gravity.x * scene.state.x[i] + scene.gravity.y * scene.state.y[i]);
      const atStart = -weight * (scene.gravity.x * scene.start.x[i] + scene.gravity.y * scene.start.y[i]);
      booked.setWork(0, atStart - stored);
      booked.stored = stored;
    });
  }

  private settleStops(): void {
    for (const { stops } of this.assembly.joints) {
      for (const stop of stops) {
        stop.gapAtStart = stop.gap();
        stop.isClosed = stop.gapAtStart <= SKIN;
      }
    }
  }

  private stopSliding(met: Passage[]): void {
    for (const passage of met) {
      if (passage.kind !== 'slip') continue;
      passage.source.sliding = 0;
    }
    this.noticeSlipChanges();
  }

  private passStations(met: Passage[]): void {
    for (const passage of met) {
      if (passage.kind !== 'station') continue;
      const id = this.watch.passed(passage.source, this.motion, this.time);
      if (id !== null) this.reach([id]);
    }
  }

  /** Impacts and corrections at the step's end. `counts`: touches are events of the run (not those at its start). */
  private strike(counts: boolean): void {
    const { scene, manager } = this.assembly;
    for (let round = 0; round < 20; round += 1) {
      const before = { ...this.signs() };
      let beforeRow = -1;
      const strikes = this.shock.resolve(scene.state, (struck) => {
        beforeRow = this.record();
        if (counts) this.announce(struck, beforeRow);
      });
      if (strikes.length === 0) {
        if (round > 0) this.renewSliding(() => true);
        return;
      }
      this.rowNow = -1;
      this.reportCut(strikes);
      this.turnStations(before, beforeRow);
      this.record();
      this.shock.remember();
      for (const touch of manager.touches) manager.settle(touch);
      this.renewSliding(() => true);
    }
  }

  private signs(): Record<number, number> {
    return Object.fromEntries(this.watch.smooth().map((index) => [index, this.watch.signedValue(index, this.motion)]));
  }

  /** A velocity that an impact turned round. */
  private turnStations(before: Record<number, number>, row: number): void {
    for (const [key, value] of Object.entries(before)) {
      const index = Number(key);
      if (!(value > 0) || this.watch.signedValue(index, this.motion) > -this.watch.blurOf(index)) continue;
      const id = this.watch.passed(index, this.motion, this.time);
      if (id !== null) this.stationEvent(id, row);
    }
  }

  private announce(struck: Strike[], row: number): void {
    const { scale } = this.assembly.scene;
    for (const { pair, stop, x, y, approachSpeed, effectiveMass } of struck) {
      if (pair) {
        const at: Vec = [x * scale.length, y * scale.length];
        this.touchEvent(pair, row, at, approachSpeed * scale.speed, effectiveMass * scale.mass);
      } else if (stop) {
        const isSlide = this.mechanism.joints.some(({ id, kind }) => id === stop.joint && kind === 'slide');
        this.recorder.writer.event({
          kind: 'limit',
          time: this.time,
          row,
          joint: stop.joint,
          approachSpeed: approachSpeed * (isSlide ? scale.speed : 1 / scale.time),
          effectiveMass: effectiveMass * (isSlide ? scale.mass : scale.inertia),
        });
      }
    }
  }

  private touchEvent(pair: Pair, row: number, at: Vec, approachSpeed: number, effectiveMass: number): void {
    const touch = { approachSpeed, effectiveMass };
    this.recorder.writer.event({ kind: 'touch', time: this.time, row, pair: pair.between, at, ...touch });
    for (const id of this.watch.happened('touch', pair.between, this.time)) this.stationEvent(id, row, touch);
  }

  /** Closed contacts start again sticking or sliding, by the rates they are left with. */
  private renewSliding(which: (touch: Touch) => boolean): void {
    const { scene, manager } = this.assembly;
    setVelocities(scene, scene.state.vx, scene.state.vy, scene.state.w);
    this.solver.rigid.prepare(0, 0, scene.time);
    for (const touch of this.solver.rigid.live) {
      if (!which(touch)) continue;
      const slip = this.solver.rigid.slip(touch);
      touch.sliding = Math.abs(slip) <= 10 * STILL ? 0 : slip > 0 ? 1 : -1;
    }
    const frictions: Friction[] = [
      ...this.assembly.joints.flatMap(({ frictionRow }) => frictionRow ?? []),
      ...this.solver.rolling,
    ];
    for (const friction of frictions) {
      friction.aim();
      const slip = friction.slip();
      friction.sliding = Math.abs(slip) <= 10 * STILL ? 0 : slip > 0 ? 1 : -1;
    }
    for (const pair of manager.pairs) pair.wasSliding = this.isSliding(pair);
  }

  private isSliding(pair: Pair): boolean {
    return this.solver.rigid.live.some((touch) => touch.pair === pair.index && touch.sliding !== 0);
  }

  private noticeSlipChanges(): void {
    for (const pair of this.assembly.manager.pairs) {
      if (pair.reading.points === 0 || pair.isSoft) continue;
      const slides = this.isSliding(pair);
      if (slides === pair.wasSliding) continue;
      pair.wasSliding = slides;
      this.pairEvent(slides ? 'slips' : 'sticks', pair);
    }
  }

  private pairEvent(kind: 'parts' | 'sticks' | 'slips', pair: Pair): void {
    const { length } = this.assembly.scene.scale;
    const row = this.record();
    const at: Vec = [pair.reading.x * length, pair.reading.y * length];
    this.recorder.writer.event({ kind, time: this.time, row, pair: pair.between, at });
    this.reach(this.watch.happened(kind, pair.between, this.time));
  }

  /** A pair that carried force over a step and now carries none has parted; a soft one touches when its overlap starts. */
  private noticePartings(): void {
    for (const pair of this.assembly.manager.pairs) {
      const { reading } = pair;
      const carries = reading.normal > 0;
      if (pair.isLasting && !carries) {
        pair.isLasting = false;
        this.pairEvent('parts', pair);
      } else if (carries) pair.isLasting = true;
    }
  }

  private release(): void {
    for (const latch of this.mechanism.latches) {
      if (this.released.has(latch.id)) continue;
      const joint = this.assembly.joints.find(({ id }) => id === latch.joint);
      if (!joint) continue;
      const { releasesAt } = latch;
      const lets =
        'force' in releasesAt
          ? joint.reactionForce() * this.assembly.scene.scale.force >= releasesAt.force
          : hasCome(releasesAt, this.time, (id) => this.watch.timeOf(id));
      if (!lets) continue;
      this.released.add(latch.id);
      const row = this.record();
      joint.release();
      this.recorder.writer.event({ kind: 'release', time: this.time, row, latch: latch.id });
    }
  }

  private noticeRest(): void {
    const waiting = this.watch.resting();
    if (waiting.length === 0) return;
    const { scene } = this.assembly;
    const resting = this.rests.look(scene.state, scene.time);
    this.reach(this.watch.reach(({ when }) => when.kind === 'rests' && resting(when.of), this.time));
  }

  private reach(ids: string[]): void {
    for (const id of ids) this.stationEvent(id, this.record());
  }

  private stationEvent(station: string, row: number, touch?: { approachSpeed: number; effectiveMass: number }): void {
    this.recorder.writer.event({ kind: 'station', time: this.time, row, station, ...(touch ? { touch } : {}) });
  }

  /** Records the present state, once. */
  private record(): number {
    if (this.rowNow < 0) this.rowNow = this.recorder.row();
    return this.rowNow;
  }

  private checkEnd(): void {
    const { until, atMost } = this.mechanism.run;
    const time = this.time * (1 + 1e-12);
    const isDone = 'station' in until ? this.watch.isReached(until.station) : time >= until.time;
    if (isDone || time >= atMost) this.finish('reachedEnd');
  }

  /** Ends the run and records its last state. */
  finish(end: RunEnd): void {
    if (this.end !== null) return;
    this.end = end;
    this.reach(this.watch.reach(({ when }) => when.kind === 'end', this.time));
    this.record();
    this.recorder.writer.finish(end, {
      steps: this.steps,
      trials: this.trial.count,
      sweeps: this.solver.sweeps,
      unconvergedSolves: this.solver.unconverged,
    });
  }

  private reportCut(strikes: Strike[]): void {
    if (this.shock.restitutionCut >= 1 || this.cutReported) return;
    this.cutReported = true;
    this.recorder.writer.finding({
      severity: 'warning',
      code: 'restitution-reduced',
      text: `An impact would have added energy with the restitution given; it was reduced to ${(100 * this.shock.restitutionCut).toFixed(1)} % of it there.`,
      of: strikes.flatMap(({ pair, stop }) => pair?.between ?? stop?.joint ?? []),
      at: this.time,
    });
  }

  private reportAccumulation(): void {
    if (this.accumulationReported) return;
    this.accumulationReported = true;
    this.recorder.writer.finding({
      severity: 'warning',
      code: 'events-accumulate',
      text: `More than ${MOST_EVENTS} events fell within one step of the stepper; impacts there were taken as plastic, their loss is booked to them.`,
      of: [],
      at: this.time,
    });
  }
}
