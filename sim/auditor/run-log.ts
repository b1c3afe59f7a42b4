import type { Vec } from '../core/vec.js';
import type { StationWatch } from '../recording/station-watch.js';
import type { Assembly } from './assembly.js';
import type { Pair } from './contact/pair.js';
import type { SoftPoint } from './contact/soft-point.js';
import { effectiveMass, type ImpactOutcome, type Strike } from './impacts.js';
import { ContactProblem } from './contact-problem.js';
import { JointStop } from './kinds/joint.js';
import type { Recorder } from './recorder.js';
import { ContactPoint } from './unilateral.js';
import { speedUnit } from './units.js';

type Row = () => number;

/** How a pair stands: apart, sticking, sliding. */
type Standing = 'apart' | 'sticks' | 'slides';

/** Writes down what happens in a run: events, the stations they reach, findings (each kind once). */
export class RunLog {
  private rowNow = -1;
  private readonly standing = new Map<Pair, { how: Standing; since: number }>();
  private readonly reported = new Set<string>();

  constructor(
    private readonly assembly: Assembly,
    private readonly recorder: Recorder,
    private readonly stations: StationWatch,
  ) {}

  /** The state has changed since the last row. */
  moved(): void {
    this.rowNow = -1;
  }

  record(write: Row): number {
    if (this.rowNow < 0) this.rowNow = write();
    return this.rowNow;
  }

  reach(ids: readonly string[], time: number, row: Row): void {
    for (const id of ids) this.station(id, row(), time);
  }

  station(station: string, row: number, time: number, touch?: { approachSpeed: number; effectiveMass: number }): void {
    this.recorder.writer.event({ kind: 'station', time, row, station, ...(touch ? { touch } : {}) });
  }

  private at(point: ContactPoint): Vec {
    const { length } = this.assembly.system.units;
    return [point.x * length, point.y * length];
  }

  struck(strikes: readonly Strike[], row: number, time: number): void {
    const { units } = this.assembly.system;
    for (const { what, approachSpeed, effectiveMass: mass } of strikes) {
      if (what instanceof ContactPoint) {
        const touch = { approachSpeed: approachSpeed * speedUnit(units), effectiveMass: mass * units.mass };
        this.touch(what, touch, row, time);
      } else if (what instanceof JointStop) {
        const isSlide = what.joint.kind === 'slide';
        this.recorder.writer.event({
          kind: 'limit',
          time,
          row,
          joint: what.joint.id,
          approachSpeed: approachSpeed * (isSlide ? speedUnit(units) : 1 / units.time),
          effectiveMass: mass * units.mass * (isSlide ? 1 : units.length ** 2),
        });
      }
    }
  }

  private touch(
    point: ContactPoint,
    touch: { approachSpeed: number; effectiveMass: number },
    row: number,
    time: number,
  ): void {
    const pair = point.pair.between;
    this.recorder.writer.event({ kind: 'touch', time, row, pair, at: this.at(point), ...touch });
    for (const id of this.stations.happened('touch', pair, time)) this.station(id, row, time, touch);
  }

  /** A compliant point begins to press: a touch of its pair, without any impact. */
  press(soft: SoftPoint, q: Float64Array, v: Float64Array, works: Float64Array, time: number, row: Row): void {
    const { point } = soft;
    const { system, dynamics } = this.assembly;
    point.locate(q);
    point.aim(q, v, 0);
    const wasLettingGo = soft.hasLetGo;
    soft.isPressed = true;
    soft.hasLetGo = false;
    if (wasLettingGo) {
      this.transfer(soft, soft.energy(), works);
      return;
    }
    const rate = point.rate(v);
    if (rate > -1e-9) return;
    const mass = effectiveMass(new ContactProblem(system, dynamics.parts.joints), [point.normal], [rate]);
    const touch = { approachSpeed: -rate * speedUnit(system.units), effectiveMass: mass * system.units.mass };
    this.touch(point, touch, row(), time);
  }

  /** A compliant point lets go: what its spring still holds is lost to its damper. */
  letGo(soft: SoftPoint, works: Float64Array): void {
    this.transfer(soft, -soft.energy(), works);
    soft.hasLetGo = soft.point.gap < 0;
    soft.isPressed = false;
    soft.normal = 0;
    soft.friction = 0;
  }

  /** Energy into the spring of a pair out of its damper (negative: the other way); the bodies feel neither. */
  private transfer({ point }: SoftPoint, energy: number, works: Float64Array): void {
    const { spring, damper } = point.pair;
    const bodies = [point.bodyA, point.bodyB].filter((body) => body >= 0);
    for (const body of bodies) {
      spring?.add(works, body, -energy / bodies.length);
      damper?.add(works, body, energy / bodies.length);
    }
    damper?.heat(works, -energy);
  }

  /** Tells of pairs that parted, stuck or broke loose in the mode just settled. */
  modes(time: number, row: Row): void {
    for (const pair of this.assembly.pairs) {
      const how = this.standingOf(pair);
      const before = this.standing.get(pair) ?? { how: 'apart', since: time };
      if (how === before.how) continue;
      this.standing.set(pair, { how, since: before.how === 'apart' ? time : before.since });
      const isLasting = time > before.since;
      if (before.how === 'apart' || !isLasting) continue;
      const kind = how === 'apart' ? 'parts' : how === 'sticks' ? 'sticks' : 'slips';
      if (kind !== 'parts' && !pair.friction) continue;
      this.pair(kind, pair, time, row());
    }
  }

  private standingOf(pair: Pair): Standing {
    const { dynamics, soft } = this.assembly;
    const groups = dynamics.groups.filter((group) => group.pair === pair);
    const pressed = soft.filter(({ isPressed, point }) => isPressed && point.pair === pair);
    const all = [...groups, ...pressed];
    if (all.length === 0) return 'apart';
    return all.some(({ sliding }) => sliding !== 0) ? 'slides' : 'sticks';
  }

  private pair(kind: 'parts' | 'sticks' | 'slips', pair: Pair, time: number, row: number): void {
    const point = this.assembly.points.find((candidate) => candidate.pair === pair);
    const at: Vec = point ? this.at(point) : [0, 0];
    this.recorder.writer.event({ kind, time, row, pair: pair.between, at });
    for (const id of this.stations.happened(kind, pair.between, time)) this.station(id, row, time);
  }

  release(latch: string, time: number, row: number): void {
    this.recorder.writer.event({ kind: 'release', time, row, latch });
  }

  noSolution(time: number): void {
    const text =
      'No accelerations are consistent with rigid contact and Coulomb friction here (Painlevé): the run stops. A compliant contact would carry on.';
    this.warn('no-solution', 'error', text, [], time);
  }

  restitutionCut({ cut, strikes }: ImpactOutcome, time: number): void {
    const of = strikes.flatMap(({ what }) => (what instanceof ContactPoint ? what.pair.between : []));
    const text = `An impact would have added energy with the restitution given; it was reduced to ${(100 * cut).toFixed(1)} % of it there.`;
    this.warn('restitution-reduced', 'warning', text, of, time);
  }

  private warn(code: string, severity: 'warning' | 'error', text: string, of: string[], at: number): void {
    if (this.reported.has(code)) return;
    this.reported.add(code);
    this.recorder.writer.finding({ severity, code, text, of, at });
  }
}
