import type { Body } from '../../mechanism/kinds/body.js';
import type { Track } from '../../mechanism/kinds/track.js';
import type { BodyInternals, ContactInternals, FixtureInternals } from '../planck-internals.js';
import { bodyInternals, fixtureInternals } from '../planck-internals.js';
import type { Scene } from '../scene.js';
import type { State } from '../state.js';
import { buildChains, type Chain } from './chain.js';
import { coreAgainstCore } from './core-core.js';
import { coreAgainstCorners } from './corners.js';
import { coresOf, cornersOf } from './outline.js';
import { Pair } from './pair.js';
import { CORE, CoreShape, CornersShape, SURFACE, SurfaceShape } from './shapes.js';
import { spareCorners } from './shared-corners.js';
import { coreAgainstSurface, type PairOf } from './surface.js';
import { fillManifold, leastOpenGap, newTouch, NO_KEY, type Touch } from './touch.js';

/** A point nearer than this is closed [engine length]; touches are found to a quarter of it. */
export const SKIN = 1e-7;
/** A point deeper than this is not a contact but another side of the body. */
const DEEPEST = 1e-2;
/** Looks at a touch between a step's ends, at the most. */
const MOST_LOOKS = 1000;
/** A body this deep at first sight is behind the surface, not on it. */
const BEHIND = 1e-5;
/** So few pairs are all recorded from the start; of more, each from its first touch on. */
const OPEN_AT_ONCE = 100;

/** Fixtures, contact pairs and the present contact geometry of a scene. */
export class ContactManager {
  readonly pairs: Pair[];
  /** Pairs that have met, or may: those that have columns in the recording. */
  readonly met: Pair[] = [];
  readonly touches: Touch[] = [];
  /** Counts the configurations and sets of closed points that there have been. */
  version = 0;
  readonly pairOf: PairOf;
  private readonly tracks: Track[];
  private readonly bodyPairs = new Map<number, number>();
  private readonly trackPairs = new Map<number, number>();
  private readonly owner = new Map<unknown, number>();
  private readonly known = new Map<ContactInternals, Touch>();
  private seen = 0;
  /** Travel bound of the step being tried, per body. */
  private readonly travel: Float64Array;

  constructor(private readonly scene: Scene) {
    const { mechanism, scale } = scene;
    this.tracks = mechanism.tracks.map((track) => scaleTrack(track, scale.length));
    this.travel = new Float64Array(scene.ids.length);
    this.pairs = mechanism.contacts.map((pair, index) => new Pair(scene, pair, index));
    if (this.pairs.length <= OPEN_AT_ONCE) for (const pair of this.pairs) this.meet(pair);
    this.indexPairs();
    this.pairOf = (bodyA, bodyB, track) =>
      bodyB < 0
        ? (this.trackPairs.get(bodyA * this.tracks.length + track) ?? -1)
        : (this.bodyPairs.get(bodyA * scene.ids.length + bodyB) ?? -1);
    const chains = buildChains(this.tracks, mechanism.extent / scale.length);
    this.owner.set(bodyInternals(scene.ground), -1);
    scene.bodies.forEach((body, i) => this.owner.set(body, i));
    this.addChains(chains);
    mechanism.bodies.forEach((body, i) => this.addBody(body, i, chains));
  }

  private indexPairs(): void {
    const { ids } = this.scene;
    for (const pair of this.pairs) {
      if (pair.first >= 0 && pair.second >= 0) {
        this.bodyPairs.set(pair.first * ids.length + pair.second, pair.index);
        this.bodyPairs.set(pair.second * ids.length + pair.first, pair.index);
        continue;
      }
      const body = Math.max(pair.first, pair.second);
      const trackId = pair.between[pair.first < 0 ? 0 : 1];
      const track = this.tracks.findIndex((candidate) => candidate.id === trackId);
      if (track >= 0 && body >= 0) this.trackPairs.set(body * this.tracks.length + track, pair.index);
    }
  }

  private addChains(chains: Chain[]): void {
    for (const chain of chains) {
      this.filtered(this.scene.ground.createFixture(new SurfaceShape(chain), 0));
      this.filtered(this.scene.ground.createFixture(new CornersShape(chain), 0));
    }
  }

  private addBody(body: Body, index: number, chains: Chain[]): void {
    const planckBody = this.scene.planckBodies[index];
    const { length } = this.scene.scale;
    for (const { vertices, radius } of coresOf(body, length)) {
      this.filtered(planckBody.createFixture(new CoreShape(vertices, radius), 0));
    }
    const meetsCurves = chains.some((chain) => !chain.straight && this.meets(index, chain));
    if (!meetsCurves) return;
    for (const { vertices, radius } of cornersOf(body, length)) {
      const corner = new CoreShape(vertices, radius);
      corner.isCorner = true;
      this.filtered(planckBody.createFixture(corner, 0));
    }
  }

  private meets(body: number, chain: Chain): boolean {
    return chain.links.some((link) => this.pairOf(body, -1, link.track) >= 0);
  }

  /** Only listed pairs collide, and each outline only with the ones it is for. */
  private filtered(fixture: Parameters<typeof fixtureInternals>[0]): void {
    const inner = fixtureInternals(fixture);
    inner.shouldCollide = (that) => this.canMeet(inner, that);
    this.scene.planckBodies.forEach((body) => body.setSleepingAllowed(false));
  }

  private canMeet(one: FixtureInternals, other: FixtureInternals): boolean {
    const a = this.owner.get(one.m_body) ?? -1;
    const b = this.owner.get(other.m_body) ?? -1;
    if (a < 0) return this.canMeet(other, one);
    const core = one.m_shape as CoreShape;
    if (b >= 0) return !core.isCorner && !(other.m_shape as CoreShape).isCorner && this.pairOf(a, b, -1) >= 0;
    const shape = other.m_shape as SurfaceShape | CornersShape;
    if (!this.meets(a, shape.chain)) return false;
    if (shape.kind !== SURFACE) return core.vertices.length > 1;
    return core.vertices.length === 1 || shape.chain.straight ? !(core.isCorner && shape.chain.straight) : false;
  }

  /** Takes the bodies' present transforms and sweeps to the broad phase and works out every candidate point anew. */
  refresh(): void {
    const { inner, bodies } = this.scene;
    for (const body of bodies) body.synchronizeFixtures();
    inner.findNewContacts();
    this.touches.length = 0;
    this.version += 1;
    let next = inner.m_contactList;
    while (next) {
      const contact = next;
      next = contact.m_next;
      let touch = this.known.get(contact);
      if (!this.overlaps(contact)) {
        // planck pools its contacts, so what is known of one must go with it.
        this.known.delete(contact);
        inner.destroyContact(contact);
        continue;
      }
      touch ??= this.firstSight(contact);
      this.touches.push(touch);
      this.evaluate(touch);
    }
  }

  private overlaps(contact: ContactInternals): boolean {
    const a = contact.m_fixtureA.m_proxies[0].proxyId;
    const b = contact.m_fixtureB.m_proxies[0].proxyId;
    return this.scene.inner.m_broadPhase.testOverlap(a, b);
  }

  private firstSight(contact: ContactInternals): Touch {
    const bodyA = this.owner.get(contact.m_fixtureA.m_body) ?? -1;
    const bodyB = this.owner.get(contact.m_fixtureB.m_body) ?? -1;
    this.seen += 1;
    const touch = newTouch(this.seen, contact, bodyA, bodyB);
    if (bodyA >= 0) touch.pair = this.pairOf(bodyA, bodyB, -1);
    contact.m_manifold.pointCount = 0;
    this.known.set(contact, touch);
    touch.curved = touch.shapeA.kind !== CORE && !touch.shapeA.chain.straight;
    this.lookBack(touch);
    return touch;
  }

  /** Takes the side that a body is on from where the step began: at its end the body may be through already. */
  private lookBack(touch: Touch): void {
    const bodies = [touch.bodyA, touch.bodyB].filter((body) => body >= 0).map((body) => this.scene.bodies[body]);
    const ends = bodies.map(({ m_sweep: { c, a } }) => ({ x: c.x, y: c.y, a }));
    bodies.forEach((body) => {
      const { c0, a0 } = body.m_sweep;
      placeAt(body, c0.x, c0.y, a0);
    });
    this.evaluate(touch);
    touch.armed = lowestGap(touch) >= -this.deepestAtSight(touch);
    bodies.forEach((body, i) => {
      const { x, y, a } = ends[i];
      placeAt(body, x, y, a);
    });
  }

  /** How deep a body may be at first sight and be on the surface all the same: a compliant pair may start compressed. */
  private deepestAtSight({ pair, bodyA, shapeB }: Touch): number {
    if (pair < 0 || !this.pairs[pair].isSoft) return BEHIND;
    return bodyA < 0 ? Math.max(DEEPEST, shapeB.thickness / 2) : Infinity;
  }

  /** Works out the candidates anew where bodies have moved by next to nothing since `refresh`. */
  reevaluate(): void {
    this.version += 1;
    for (const touch of this.touches) this.evaluate(touch);
  }

  /** Works out the candidate points of a touch at the bodies' present transforms. */
  evaluate(touch: Touch): void {
    const { m_fixtureA, m_fixtureB } = touch.contact;
    const { shapeA } = touch;
    if (shapeA.kind === CORE) {
      coreAgainstCore(touch, m_fixtureA.m_body.m_xf, m_fixtureB.m_body.m_xf);
    } else if (shapeA.kind === SURFACE) coreAgainstSurface(touch, m_fixtureB.m_body.m_xf, this.pairOf);
    else coreAgainstCorners(touch, m_fixtureB.m_body.m_xf, this.pairOf);
  }

  /** Sets how far each body may move in a step with these mean velocities. */
  setTravel({ vx, vy, w }: State, tau: number): void {
    const { travel, scene } = this;
    for (let i = 0; i < travel.length; i += 1) {
      travel[i] = tau * (Math.sqrt(vx[i] * vx[i] + vy[i] * vy[i]) + Math.abs(w[i]) * scene.reach[i]);
    }
  }

  private travelOf(touch: Touch): number {
    return (touch.bodyA < 0 ? 0 : this.travel[touch.bodyA]) + (touch.bodyB < 0 ? 0 : this.travel[touch.bodyB]);
  }

  /**
   * The gap of the nearest point of a touch that is not closed, as an event function: it turns negative when the point
   * goes through the surface within the step, and stays infinite where the body merely came round an end.
   */
  openGapNow(touch: Touch): number {
    return leastOpenGap(touch, 3 * this.travelOf(touch) + 10 * SKIN);
  }

  /**
   * How often to look at a touch between a step's ends: bodies that travel farther than they are thick could pass through
   * each other unseen.
   */
  looksBetween(touch: Touch): number {
    if (touch.shapeA.kind !== CORE || this.isActive(touch)) return 0;
    const thickness = touch.shapeA.thickness + touch.shapeB.thickness;
    const travel = this.travelOf(touch);
    return travel <= thickness || thickness === 0 ? 0 : Math.min(MOST_LOOKS, Math.ceil((2 * travel) / thickness));
  }

  /**
   * How far a closed point is from where another contact pair takes over (the next track of a chain), negative beyond:
   * friction changes there at once, not at the next step.
   */
  seamNow(touch: Touch): number {
    if (touch.shapeA.kind !== SURFACE || touch.shapeA.chain.links.length < 2 || !this.isActive(touch)) return Infinity;
    const { chain } = touch.shapeA;
    const { foot, link } = touch.foot;
    const pairAt = (index: number): number => this.pairOf(touch.bodyB, -1, chain.links[index].track);
    const fromEntry = (index: number, s: number): number =>
      chain.links[index].along === 1 ? s : chain.links[index].run.length - s;
    const count = chain.links.length;
    const { startLink } = touch;
    const [before, after] = chain.closed
      ? [(startLink + count - 1) % count, (startLink + 1) % count]
      : [startLink - 1, startLink + 1];
    const differs = (index: number): boolean => index >= 0 && index < count && pairAt(index) !== pairAt(startLink);
    const done = fromEntry(link, foot.s);
    const left = chain.links[link].run.length - done;
    if (link === startLink) return Math.min(differs(before) ? done : Infinity, differs(after) ? left : Infinity);
    if (link === after && differs(after)) return -done;
    return link === before && differs(before) ? -left : Infinity;
  }

  /** Takes the present candidates as the state at the start of the next step. */
  settleAll(): void {
    for (const touch of this.touches) this.settle(touch);
    if (spareCorners(this.touches, this.isActive)) this.version += 1;
  }

  private settle(touch: Touch): void {
    if (!touch.armed && lowestGap(touch) >= 0) touch.armed = true;
    const wasActive = this.isActive(touch);
    const [first, second] = touch.closed;
    touch.closed[0] = NO_KEY;
    touch.closed[1] = NO_KEY;
    if (touch.armed && touch.pair >= 0) {
      let slot: 0 | 1 = 0;
      for (let i = 0; i < touch.count; i += 1) {
        const { gap, key } = touch.candidates[i as 0 | 1];
        if (gap > SKIN || gap < -this.deepest(touch)) continue;
        touch.closed[slot] = key;
        slot = 1;
      }
    }
    if (touch.closed[0] !== first || touch.closed[1] !== second) this.version += 1;
    if (this.isActive(touch)) this.meet(this.pairs[touch.pair]);
    touch.openGap = leastOpenGap(touch, DEEPEST);
    touch.isFresh = this.isActive(touch) && (!wasActive || touch.pair !== touch.startPair);
    touch.startPair = touch.pair;
    touch.startLink = touch.foot.link;
    touch.startSeam = this.seamNow(touch);
    // Trials of the next step all start from here, whatever the ones before them found at their ends.
    fillManifold(touch);
  }

  private meet(pair: Pair): void {
    if (pair.isMet) return;
    pair.isMet = true;
    this.met.push(pair);
  }

  /** A compliant pair may overlap as far as its force allows. */
  private deepest(touch: Touch): number {
    return this.pairs[touch.pair].isSoft ? Infinity : DEEPEST;
  }

  readonly isActive = (touch: Touch): boolean => touch.closed[0] !== NO_KEY;

  /** Speed of a track's surface along its path at a time [engine speed]. */
  surfaceSpeed(track: number, time: number): number {
    const { surfaceSpeed } = this.tracks[track];
    const { speed, time: unit } = this.scene.scale;
    if (typeof surfaceSpeed === 'number') return surfaceSpeed / speed;
    return curveAt(surfaceSpeed, time * unit) / speed;
  }
}

function placeAt(body: BodyInternals, x: number, y: number, angle: number): void {
  const { m_sweep } = body;
  m_sweep.c.x = x;
  m_sweep.c.y = y;
  m_sweep.a = angle;
  body.synchronizeTransform();
}

function lowestGap(touch: Touch): number {
  let lowest = Infinity;
  for (let i = 0; i < touch.count; i += 1) lowest = Math.min(lowest, touch.candidates[i as 0 | 1].gap);
  return lowest;
}

function curveAt(points: readonly (readonly [number, number])[], x: number): number {
  const last = points[points.length - 1];
  if (x <= points[0][0]) return points[0][1];
  if (x >= last[0]) return last[1];
  const i = points.findIndex(([px]) => px > x);
  const [x0, y0] = points[i - 1];
  const [x1, y1] = points[i];
  return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0);
}

function scaleTrack(track: Track, length: number): Track {
  const point = ([x, y]: readonly [number, number]): [number, number] => [x / length, y / length];
  return {
    ...track,
    from: point(track.from),
    segments: track.segments.map((segment) =>
      segment.kind === 'spline'
        ? { ...segment, through: segment.through.map(point) }
        : { ...segment, to: point(segment.to) },
    ),
  };
}
