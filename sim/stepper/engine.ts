import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import type { RunEnd } from '../recording/recording.js';
import { StationWatch } from '../recording/station-watch.js';
import { assemble, hasCome, type Assembly } from './assembly.js';
import { SKIN } from './contact/manager.js';
import { noticeGivingWay } from './giving-way.js';
import { noticeTurnedSprings } from './turned-springs.js';
import { SceneMotion } from './motion.js';
import { Projection } from './projection.js';
import { Recorder } from './recorder.js';
import { RestWatch } from './rest-watch.js';
import { RunLog } from './run-log.js';
import { poseBodies, setVelocities } from './scene.js';
import { Shock } from './shock.js';
import type { Strike } from './strike.js';
import { SlidingModes } from './sliding.js';
import { VelocitySolver } from './solver.js';
import { copyState, isBounded } from './state.js';
import { findStep } from './step-finder.js';
import { Trial, type Passage } from './trial.js';

/**
 * Events located within one step: at most 40, fewer the more contacts there are, none in a large pile. Touches beyond
 * that wait for the step's end.
 */
const MOST_LOCATED = 40;
const LOCATED_BY_CONTACTS = 300;
/** Impacts that one impact may set off at the same instant. */
const MOST_ROUNDS = 20;

export interface EngineOptions {
  /** Step [s]. */
  step: number;
  /** A row is recorded every so many steps; events have rows of their own. */
  rowEvery: number;
}

/**
 * Steps a mechanism and records it. A step is the midpoint rule (trial.ts), cut short at the first event in it
 * (step-finder.ts), booked, brought back onto joints and contacts (projection.ts), and followed by the impacts that are
 * due at its end (shock.ts).
 */
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
  private readonly sliding: SlidingModes;
  private readonly rests: RestWatch;
  private readonly log: RunLog;
  private readonly released = new Set<string>();
  /** Times [s] that a step must not run over. */
  private readonly moments: number[];

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
    this.sliding = new SlidingModes(scene, manager, this.solver);
    this.rests = new RestWatch(scene, options.step / scene.scale.time);
    this.recorder = new Recorder({ scene, manager, joints, springs, dampers, gravity }, options.step);
    this.log = new RunLog(mechanism, scene, this.watch, this.recorder);
    this.moments = momentsOf(mechanism, this.watch);
    this.begin();
  }

  private isOn(from: Moment | undefined, until: Moment | undefined): boolean {
    const reached = (id: string): number | undefined => this.watch.timeOf(id);
    const { time } = this.log;
    if (from && !hasCome(from, time, reached)) return false;
    return !(until && hasCome(until, time, reached));
  }

  private begin(): void {
    const { scene, manager } = this.assembly;
    poseBodies(scene, scene.state.x, scene.state.y, scene.state.a);
    manager.refresh();
    manager.settleAll();
    this.settleStops();
    setVelocities(scene, scene.state.vx, scene.state.vy, scene.state.w);
    this.solver.soft.begin();
    this.log.record();
    this.log.reach(this.watch.reach(({ when }) => when.kind === 'start' || isDue(when, 0), 0));
    this.sliding.renew();
    // Nothing was closed before the start, so a body drawn running into what it touches strikes it at once.
    this.strike(false);
    this.checkEnd();
  }

  /** Takes one step (less where the run ends within it). */
  step(): void {
    const whole = this.options.step / this.assembly.scene.scale.time;
    let left = whole;
    let events = 0;
    while (left > 1e-12 * whole && this.end === null) {
      const locates = events < this.mostLocated();
      if (!locates) this.reportCrowd(events);
      left -= this.substep(Math.min(left, this.untilNextMoment()), locates);
      events += 1;
    }
    this.steps += 1;
    if (this.end === null && this.steps % this.options.rowEvery === 0) this.log.record();
  }

  /** Engine time until the next moment that a step must not run over. */
  private untilNextMoment(): number {
    const now = this.log.time;
    let next = this.mechanism.run.atMost;
    for (const moment of this.moments) if (moment > now * (1 + 1e-13) && moment < next) next = moment;
    return Math.max(0, next - now) / this.assembly.scene.scale.time;
  }

  private mostLocated(): number {
    return Math.min(MOST_LOCATED, Math.floor(LOCATED_BY_CONTACTS / (this.assembly.manager.touches.length + 1)));
  }

  private substep(tau: number, locates: boolean): number {
    const { scene } = this.assembly;
    this.trial.begin();
    const { taken, met } = findStep(this.trial, scene.state, tau, locates);
    if (!isBounded(this.trial.next)) {
      this.giveUp();
      return tau;
    }
    // Where slides were not followed to their end, what has turned round has stopped.
    this.commit(taken, locates ? met : [...met, ...this.trial.passedSlips()]);
    return Math.max(taken, 1e-15 * tau);
  }

  private commit(taken: number, met: Passage[]): void {
    const { scene, manager } = this.assembly;
    this.book(taken / 2);
    scene.time += taken;
    copyState(this.trial.next, scene.state);
    this.motion.state = scene.state;
    this.log.moved();
    this.arrive();
    this.shock.remember();
    manager.settleAll();
    this.settleStops();
    this.sliding.stop(met);
    this.sliding.notice(this.log);
    this.passStations(met);
    this.noticePartings();
    noticeTurnedSprings(this.assembly, this.log);
    noticeGivingWay(this.assembly, this.solver.rigid.live, this.log);
    this.sliding.renewFresh();
    const soft = this.shock.softStrikes(scene.state);
    if (soft.length > 0) this.log.struck(soft, this.log.record());
    this.strike(true);
    this.watch.settle(this.motion);
    this.release();
    this.log.reach(this.watch.reach(({ when }) => isDue(when, this.log.time), this.log.time));
    this.noticeRest();
    this.checkEnd();
  }

  private book(half: number): void {
    const { scene, elements } = this.assembly;
    const { mean, middle } = this.trial;
    setVelocities(scene, mean.vx, mean.vy, mean.w);
    scene.bodies.forEach(({ c_position }, i) => {
      c_position.c.x = middle.x[i];
      c_position.c.y = middle.y[i];
      c_position.a = middle.a[i];
    });
    this.projection.resetReadings();
    this.bookWeights(2 * half);
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
      manager.reevaluate();
      for (const element of elements) element.project?.();
      this.solver.soft.project();
    }
  }

  /** Work of the weights over a step, from the same mean velocities that changed the speeds: no height is rounded. */
  private bookWeights(tau: number): void {
    const { gravity, scene } = this.assembly;
    const { vx, vy } = this.trial.mean;
    gravity.forEach((booked, i) => {
      booked.work(0, tau * scene.mass[i] * (scene.gravity.x * vx[i] + scene.gravity.y * vy[i]));
    });
  }

  /** Gravity's account counts every change of height; a projected one did no work on the speed. */
  private bookMove(body: number, dx: number, dy: number): void {
    const { scene, gravity } = this.assembly;
    const work = scene.mass[body] * (scene.gravity.x * dx + scene.gravity.y * dy);
    if (work === 0) return;
    gravity[body].work(0, work);
    scene.numerical.add('position-projection', body, -work);
  }

  private settleStops(): void {
    for (const { stops } of this.assembly.joints) {
      for (const stop of stops) {
        stop.gapAtStart = stop.gap();
        stop.isClosed = stop.gapAtStart <= SKIN;
      }
    }
  }

  private passStations(met: readonly Passage[]): void {
    for (const passage of met) {
      if (passage.kind !== 'station') continue;
      const id = this.watch.passed(passage.source, this.motion, this.log.time);
      if (id !== null) this.log.reach([id]);
    }
  }

  /** Impacts and corrections due now. `counts`: touches are events of the run (not those at its start). */
  private strike(counts: boolean): void {
    const { scene, manager } = this.assembly;
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      const before = this.stationValues();
      let rowBefore = -1;
      const strikes = this.shock.resolve(scene.state, (struck) => {
        rowBefore = this.log.record();
        if (counts) this.log.struck(struck, rowBefore);
      });
      if (this.shock.hasChanged) this.log.moved();
      if (strikes.length === 0) return;
      this.reportCut(strikes);
      this.turnStations(before, rowBefore);
      this.log.record();
      this.shock.remember();
      manager.settleAll();
      this.sliding.renew();
      this.sliding.notice(this.log);
    }
  }

  private stationValues(): Map<number, number> {
    return new Map(this.watch.smooth().map((index) => [index, this.watch.signedValue(index, this.motion)]));
  }

  /** A velocity that an impact turned round reaches its station just before it. */
  private turnStations(before: ReadonlyMap<number, number>, row: number): void {
    for (const [index, value] of before) {
      if (!(value > 0) || this.watch.signedValue(index, this.motion) > -this.watch.blurOf(index)) continue;
      const id = this.watch.passed(index, this.motion, this.log.time);
      if (id !== null) this.log.station(id, row, this.log.time);
    }
  }

  /** A pair that carried force over the last step and carries none now has parted. */
  private noticePartings(): void {
    for (const pair of this.assembly.manager.met) {
      const carries = pair.reading.normal > 0;
      if (pair.isLasting && !carries) this.log.pair('parts', pair);
      pair.isLasting = carries;
    }
  }

  private release(): void {
    const { joints, scene } = this.assembly;
    for (const { id, joint: of, releasesAt } of this.mechanism.latches) {
      const joint = joints.find((candidate) => candidate.id === of);
      if (!joint || this.released.has(id)) continue;
      const lets =
        'force' in releasesAt
          ? joint.reactionForce() * scene.scale.force >= releasesAt.force
          : hasCome(releasesAt, this.log.time, (station) => this.watch.timeOf(station));
      if (!lets) continue;
      this.released.add(id);
      this.log.release(id);
      joint.release();
    }
  }

  private noticeRest(): void {
    if (this.watch.resting().length === 0) return;
    const { scene } = this.assembly;
    this.rests.look(scene.state, scene.time, () => this.log.record());
    for (const of of this.watch.resting()) {
      const since = this.rests.restingSince(of, scene.time);
      if (since === null) continue;
      const time = since.time * scene.scale.time;
      const ids = this.watch.reach(({ when }) => when.kind === 'rests' && when.of === of, time);
      for (const id of ids) this.log.station(id, since.row, time);
    }
  }

  private checkEnd(): void {
    const { until, atMost } = this.mechanism.run;
    const time = this.log.time * (1 + 1e-12);
    const isDone = 'station' in until ? this.watch.isReached(until.station) : time >= until.time;
    if (isDone || time >= atMost) this.finish('reachedEnd');
  }

  /** Ends the run and records its last state. */
  finish(end: RunEnd): void {
    if (this.end !== null) return;
    this.end = end;
    this.log.reach(this.watch.reach(({ when }) => when.kind === 'end', this.log.time));
    this.log.record();
    this.recorder.writer.finish(end, {
      steps: this.steps,
      trials: this.trial.count,
      sweeps: this.solver.sweeps + this.solver.acceleration.sweeps,
      unconvergedSolves: this.solver.unconverged,
    });
  }

  /** The step in hand grew beyond all bounds: the last good state is the last one recorded. */
  private giveUp(): void {
    const { scene, manager } = this.assembly;
    poseBodies(scene, scene.state.x, scene.state.y, scene.state.a);
    manager.refresh();
    this.motion.state = scene.state;
    const text = `The motion grew beyond all bounds, as it does when the step (${this.options.step} s) is too long for what is stiff or fast. Take a smaller step.`;
    this.log.warn('not-finite', text, [], 'error');
    this.finish('nonFinite');
  }

  private reportCrowd(events: number): void {
    const text =
      events > 0
        ? `More than ${events} events fell within one step; further touches there were taken at its end, and what their overlap costs is booked as numerical.`
        : "There are too many contacts to find each touch within a step; touches were taken at the steps' ends, and what their overlap costs is booked as numerical.";
    this.log.warn('events-accumulate', text, []);
  }

  private reportCut(strikes: readonly Strike[]): void {
    const cut = this.shock.restitutionCut;
    if (cut >= 1) return;
    const text = `An impact would have added energy with the restitution given; it was reduced to ${(100 * cut).toFixed(1)} % of it there.`;
    const of = strikes.flatMap(({ pair, stop }) => pair?.between ?? stop?.joint ?? []);
    this.log.warn('restitution-reduced', text, of);
  }
}

const isDue = (when: { kind: string; time?: number }, time: number): boolean =>
  when.kind === 'time' && when.time !== undefined && time >= when.time * (1 - 1e-13);

function momentsOf({ tracks, loads, drives, latches, run }: Mechanism, watch: StationWatch): number[] {
  const of = (moment: Moment | undefined): number[] => (moment && 'time' in moment ? [moment.time] : []);
  return [
    ...watch.times(),
    ...[...loads, ...drives].flatMap(({ from, until }) => [...of(from), ...of(until)]),
    ...latches.flatMap(({ releasesAt }) => ('time' in releasesAt ? [releasesAt.time] : [])),
    // A belt that starts to brake within a step would drag along what should slip.
    ...tracks.flatMap(({ surfaceSpeed }) =>
      typeof surfaceSpeed === 'number' ? [] : surfaceSpeed.map(([time]) => time),
    ),
    ...('time' in run.until ? [run.until.time] : []),
  ];
}
