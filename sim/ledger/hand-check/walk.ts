import { aboutPin, pinArm } from './pin-course.js';
import { jointLossTerm, lossTerm, reboundLine } from './blow-terms.js';
import { restitutionAt, requireFree, squareShare, staysWith, strikeOn, type Strike } from './blow.js';
import { causesOf } from './causes/index.js';
import { gravityTerm, gravityWork } from './causes/gravity.js';
import type { Course, Passage } from './course.js';
import { quantity } from './figures.js';
import { groupOf } from './group.js';
import { happenings, limitTo, type Blow, type Happening, type Leg } from './happenings.js';
import { worksOver } from './integrate.js';
import { isHeld, passageOf } from './passage.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';
import { leverAbout, placesOf } from './strike-normal.js';
import { endRate, leftOf, sameMover, type Mover, type Stage } from './stage.js';
import { operator, symbol, words, type Expression } from './tokens.js';

/** Marks of the speeds within a span. */
const PRIMES = ['′', '″', '‴', '⁗'];

/** Speed of the centre of mass [m/s] and spin [rad/s], without sign. */
export interface Speeds {
  speed: number;
  spin: number;
}

/** A span that a body is followed over. */
export interface Route {
  body: string;
  fromRow: number;
  toRow: number;
  /** Labels of its ends. */
  from: string;
  to: string;
  /** Why the body is at rest at its end, by the station's own meaning. */
  restsAt?: (mover: Mover, tangent: readonly [number, number] | undefined) => string | undefined;
}

/** Follows a body over a span, from the speeds it starts with: the work–energy equations, one after the other. */
export class Walk {
  readonly stages: Stage[] = [];
  /** What a belt does, in place of an equation. */
  readonly remarks: Expression[] = [];
  private open: Stage | undefined;
  private pending: Expression[] = [];
  private mover: Mover;
  private marks = 0;
  private wasHeld: boolean;
  private tangent: readonly [number, number] | undefined;

  constructor(
    private readonly scene: Scene,
    private readonly route: Route,
    private speeds: Speeds,
    private readonly speedOf: (body: string, row: number) => number,
  ) {
    this.mover = this.alone(route.body);
    this.wasHeld = false;
  }

  /** @returns the speeds at the end */
  run(): Speeds {
    const { scene, route } = this;
    limitTo(scene.blowsOf(route.body, route.fromRow, route.toRow), route.body, 'is struck');
    const list = happenings(scene, route.body, route.fromRow, route.toRow);
    limitTo(turnsIn(list), route.body, 'turns back');
    list.forEach((happening, i) => {
      if (happening.kind === 'leg') this.pass(happening.leg);
      else this.strike(happening.blow, nextLeg(list, i));
    });
    if (this.open) this.finish(route.to, route.restsAt?.(this.mover, this.tangent));
    const last = this.stages.at(-1);
    if (last && this.remarks.length === 0) last.to = route.to;
    this.remarks.push(...this.pending);
    return this.speeds;
  }

  private pass(leg: Leg): void {
    const { scene, route } = this;
    const passage = passageOf(scene, route.body, leg, this.rateNow());
    if (passage.kind === 'none') return;
    const held = isHeld(scene, route.body, leg);
    if (passage.kind !== 'still' && this.wasHeld && !held) refuse(`${route.body} leaves what it was on.`);
    this.wasHeld = held;
    if (passage.kind === 'still') this.stand();
    else if (passage.kind === 'carried') this.carry(passage);
    else if (passage.kind === 'flight') this.fly(passage, leg);
    else for (const course of passage.courses) this.follow(course, leg);
  }

  private stand(): void {
    if (this.open) this.finish('′', `${this.route.body} comes to rest`);
    this.speeds = { speed: 0, spin: 0 };
  }

  private carry({ speed, on }: Passage & { kind: 'carried' }): void {
    if (this.open) this.finish('′');
    this.speeds = { speed, spin: 0 };
    this.remarks.push([
      symbol('v', { sub: this.route.to }),
      operator('='),
      quantity(speed, 'speed'),
      operator(','),
      words(`the belt ${on} carries ${this.route.body}`),
    ]);
  }

  private fly({ from, to }: Passage & { kind: 'flight' }, leg: Leg): void {
    const { scene, route } = this;
    const { springs, loads, dampers } = scene.mechanism;
    const pulled = [...springs, ...dampers].find(({ between }) =>
      between.some((end) => (typeof end === 'string' ? end : end.of) === route.body),
    );
    const pushed = loads.find((load) => (load.kind === 'force' ? load.on.of : load.on) === route.body);
    const other = pulled ?? pushed;
    if (other) refuse(`${other.id} acts on ${route.body} in flight, from ${leg.from.toPrecision(3)} s.`);
    const stage = this.stageFor(this.alone(route.body));
    stage.terms.push(gravityTerm(scene, [route.body], gravityWork(scene, route.body, from, to)));
    this.tangent = undefined;
  }

  private follow(course: Course, leg: Leg): void {
    const mover = this.moverOf(course);
    const stage = this.stageFor(mover);
    const causes = causesOf({ scene: this.scene, course, leg });
    const works = worksOver(course, causes, leftOf(stage));
    stage.terms.push(...causes.map((cause, i) => cause.term(works[i])));
    this.tangent = course.rate(course.length).tangent;
  }

  private moverOf({ kind, members, measure, rollingMass, joints }: Course): Mover {
    const { scene } = this;
    const body = members[0];
    const masses = members.map((id) => scene.body(id).mass);
    if (kind === 'pin') {
      const pin = joints[0];
      if (pin.kind === 'pin')
        return { kind: 'pin', members, masses, measure, pin: { id: pin.id, arm: pinArm(scene, body, pin) } };
    }
    if (rollingMass > 0) {
      const { inertia } = scene.body(body);
      return { kind: 'roll', members, masses, measure, rolling: { inertia, radius: Math.sqrt(inertia / rollingMass) } };
    }
    return { kind: 'mass', members, masses, measure };
  }

  /** What a body is before anything is known of its way: on its pin, or a mass. */
  private alone(body: string): Mover {
    const { scene } = this;
    const pin = scene
      .jointsOf(body, this.route.fromRow)
      .find((joint) => joint.kind === 'pin' && joint.between.includes('ground'));
    if (pin?.kind === 'pin') {
      const arm = pinArm(scene, body, pin);
      return {
        kind: 'pin',
        members: [body],
        masses: [scene.body(body).mass],
        measure: aboutPin(scene, body, pin),
        pin: { id: pin.id, arm },
      };
    }
    const { mass } = scene.body(body);
    return { kind: 'mass', members: [body], masses: [mass], measure: mass };
  }

  /** The open stage, or a new one where what moves is no longer the same. */
  private stageFor(mover: Mover): Stage {
    if (this.open && !sameMover(this.open.end, mover)) this.finish(this.nextMark());
    this.mover = mover;
    this.open ??= {
      from: this.stages.length === 0 && this.marks === 0 ? this.route.from : this.mark(),
      to: '',
      start: mover,
      end: mover,
      rate: mover.kind === 'pin' ? this.speeds.spin : this.speeds.speed,
      terms: [],
      before: this.pending.splice(0),
    };
    return this.open;
  }

  private mark(): string {
    return PRIMES[Math.min(Math.max(1, this.marks), PRIMES.length) - 1];
  }

  private nextMark(): string {
    this.marks += 1;
    return this.mark();
  }

  private finish(to: string, rests?: string): void {
    if (!this.open) return;
    const stage: Stage = { ...this.open, to, ...(rests === undefined ? {} : { rests }) };
    this.open = undefined;
    const rate = endRate(stage);
    this.stages.push(stage);
    this.take(stage.end, rate);
  }

  private take({ kind, pin, rolling }: Mover, rate: number): void {
    if (kind === 'pin') this.speeds = { speed: rate * (pin?.arm ?? 0), spin: rate };
    else this.speeds = { speed: rate, spin: rolling ? rate / rolling.radius : this.speeds.spin };
  }

  /** Speed of the body, or its spin about its pin, as the sum stands. */
  private rateNow(): number {
    if (!this.open) return this.mover.kind === 'pin' ? this.speeds.spin : this.speeds.speed;
    return Math.sqrt(Math.max(0, (2 * leftOf(this.open)) / this.open.end.measure));
  }

  private strike(blow: Blow, next: Leg | undefined): void {
    const { scene, route } = this;
    const strike = strikeOn(scene, blow, this.mover.members);
    if (!strike) return;
    this.wasHeld = false;
    const { members } = this.mover;
    const after = next ? groupOf(scene, route.body, next) : members;
    if (strike.body !== route.body) {
      if (strike.kind === 'bodies' && strike.other === route.body)
        refuse(`${route.body} is struck within its own group.`);
      if (staysWith(scene, route.body, strike.body, blow.row + 1))
        refuse(`${strike.body} is struck while ${route.body} moves with it.`);
      return;
    }
    if (members.length > 1) this.detach();
    if (strike.kind === 'bodies') this.strikeBody(strike, blow, after);
    else this.strikeFixed(strike, blow);
  }

  /** From here on the body alone: what rides on it is not struck. */
  private detach(): void {
    const rate = this.rateNow();
    if (this.open) this.finish(this.nextMark());
    this.mover = this.alone(this.route.body);
    this.speeds = { ...this.speeds, speed: rate };
  }

  private strikeFixed(strike: Exclude<Strike, { kind: 'bodies' }>, blow: Blow): void {
    const { scene } = this;
    const rate = this.rateNow();
    const isPin = this.mover.kind === 'pin';
    if (this.mover.kind === 'roll') refuse(`${strike.body} is struck as it rolls.`);
    const share = strike.kind === 'limit' || isPin ? 1 : squareShare(scene, strike, blow);
    const e =
      strike.kind === 'limit'
        ? strike.restitution
        : restitutionAt(strike.pair, rate * this.leverOf(strike, share, blow));
    const of = strike.kind === 'limit' ? [strike.joint] : [...strike.pair.between];
    const stage = this.stageFor(this.mover);
    stage.terms.push(lossTerm(scene, of, this.mover, rate * share, e, blow));
  }

  /** Approach speed over the body's speed, or over its spin. */
  private leverOf({ pair, normal }: Exclude<Strike, { kind: 'limit' }>, share: number, { row }: Blow): number {
    const { scene, mover } = this;
    const pin = scene.mechanism.joints.find(({ id }) => id === mover.pin?.id);
    return pin?.kind === 'pin' ? leverAbout(pin.at, placesOf(scene, pair, row), normal) : share;
  }

  private strikeBody(strike: Strike & { kind: 'bodies' }, blow: Blow, after: readonly string[]): void {
    const { scene, route } = this;
    const { pair, other, normal } = strike;
    if (this.mover.kind !== 'mass')
      refuse(`${route.body} strikes ${other} as it ${this.mover.kind === 'pin' ? 'turns' : 'rolls'}.`);
    const heading = scene.heading(route.body, blow.row);
    const along = (vx: number, vy: number): number => vx * normal[0] + vy * normal[1];
    const mine = Math.sign(along(heading.vx, heading.vy)) * this.rateNow();
    if (this.rateNow() > 0 && Math.abs(mine) > 0 && squareShare(scene, strike, blow) !== 1)
      refuse(`${route.body} strikes ${other} aslant.`);
    for (const [body, by] of [
      [route.body, other],
      [other, route.body],
    ])
      requireFree(scene, body, by, normal, blow.row);
    const theirs = scene.heading(other, blow.row);
    const otherSpeed = this.speedOf(other, blow.row);
    const yours = Math.sign(along(theirs.vx, theirs.vy)) * otherSpeed;
    const e = restitutionAt(pair, Math.abs(mine - yours));
    const [m, n] = [scene.body(route.body).mass, scene.body(other).mass];
    if (e === 0 && otherSpeed === 0 && after.includes(other)) {
      const stage = this.stageFor(this.mover);
      const loss = 0.5 * ((m * n) / (m + n)) * mine ** 2;
      stage.terms.push(jointLossTerm(scene, [route.body, other], [...pair.between], Math.abs(mine), loss, blow));
      const masses = after.map((id) => scene.body(id).mass);
      stage.end = { kind: 'mass', members: [...after], masses, measure: masses.reduce((sum, mass) => sum + mass, 0) };
      this.mover = stage.end;
      return;
    }
    const rebound = (m * mine + n * yours - n * e * (mine - yours)) / (m + n);
    if (this.open) this.finish(this.nextMark());
    else this.marks += 1;
    this.speeds = { speed: Math.abs(rebound), spin: 0 };
    this.mover = this.alone(route.body);
    this.pending.push(reboundLine(this.mark(), m, n, mine, yours, e, rebound));
  }
}

const turnsIn = (list: readonly Happening[]): number =>
  list.filter((each) => each.kind === 'leg' && each.leg.turns).length;

function nextLeg(list: readonly Happening[], i: number): Leg | undefined {
  const next = list.slice(i + 1).find((happening) => happening.kind === 'leg');
  return next?.kind === 'leg' ? next.leg : undefined;
}
