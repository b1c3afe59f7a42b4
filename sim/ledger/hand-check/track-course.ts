import { dot, left, scale, type Vec } from '../../core/vec.js';
import { nearestOnRun, newFoot, pointAt, type SmoothRun } from '../../geometry/index.js';
import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Pose } from '../../recording/index.js';
import type { Course, Rub } from './course.js';
import { otherOf } from './group.js';
import type { Leg } from './happenings.js';
import { beltSense, list, refuseSoft, slopeOf } from './line-course.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';

/** A place on a run, and which way it is gone along. */
interface Place {
  run: SmoothRun;
  s: number;
}
/** A stretch of a run, gone from `a` to `b`. */
interface Stretch {
  run: SmoothRun;
  a: number;
  b: number;
}

/** How far a centre may lie off its track: of the extent. */
const OFF = 1e-4;

/**
 * The courses of a particle or disc along the tracks it touches, one for each piece of line, arc or spline; q is the arc
 * length of the track.
 */
export function trackCourses(scene: Scene, body: string, leg: Leg): Course[] {
  const pairs = touchedTracks(scene, body, leg);
  const [start, end] = [scene.pose(body, leg.from), scene.pose(body, leg.to)];
  const rolls = rollsOn(scene, body, leg, pairs);
  const places = (pose: Pose): Place[] => placesAt(scene, body, pose);
  const stretches = shortest(places(start), places(end), scene.mechanism.extent * OFF);
  if (!stretches) refuse(`The way of ${body} passes a corner or an end of its track.`);
  return stretches.flatMap((stretch) => byPieces(stretch)).map((stretch) => courseOf(scene, body, leg, stretch, rolls));
}

/** Contacts with tracks; where rough ones are closed at once, nobody can say by hand which carries what. */
function touchedTracks(scene: Scene, body: string, { rows }: Leg): ContactPair[] {
  const pairs = scene.pairsOf(body).filter((pair) => rows.some((row) => scene.touches(pair, row)));
  for (const pair of pairs) refuseSoft(pair);
  const rough = pairs.filter(({ staticFriction, kineticFriction }) => staticFriction > 0 || kineticFriction > 0);
  const shared = rows.filter((row) => rough.filter((pair) => scene.touches(pair, row)).length > 1);
  const others = list(pairs.map((pair) => otherOf(pair, body)));
  if (shared.length > 1) refuse(`${others} share the load of ${body}.`);
  const moving = rough.filter((pair) => scene.isBody(otherOf(pair, body)));
  if (moving.length > 0) refuse(`${body} rubs on ${otherOf(moving[0], body)} while it goes along its track.`);
  return pairs.filter((pair) => !scene.isBody(otherOf(pair, body)));
}

/** True where a disc rolls without slip all along; a disc that neither rolls nor slips all along is no hand sum. */
function rollsOn(scene: Scene, body: string, { rows }: Leg, pairs: ContactPair[]): boolean {
  const { shape } = scene.body(body);
  if (
    shape.kind !== 'disc' ||
    pairs.every(({ kineticFriction, staticFriction }) => kineticFriction + staticFriction === 0)
  ) {
    return false;
  }
  const motions = rows.map((row) => scene.heading(body, row));
  const speeds = motions.map(({ vx, vy }) => Math.hypot(vx, vy));
  const greatest = Math.max(...speeds);
  const slips = motions.filter(({ spin }, i) => Math.abs(Math.abs(spin) * shape.radius - speeds[i]) > 2e-3 * greatest);
  if (slips.length > 1 && slips.length < motions.length - 1) refuse(`${body} partly rolls and partly slips.`);
  return slips.length <= 1;
}

const radiusOf = (scene: Scene, body: string): number => {
  const { shape, centerOfMass } = scene.body(body);
  if (Math.hypot(...centerOfMass) > 1e-9 * scene.mechanism.extent) refuse(`${body} is out of balance.`);
  return shape.kind === 'disc' ? shape.radius : 0;
};

function placesAt(scene: Scene, body: string, { x, y }: Pose): Place[] {
  const radius = radiusOf(scene, body);
  const tracks = new Set(scene.pairsOf(body).map((pair) => otherOf(pair, body)));
  const runs = scene.tracks.filter(({ id }) => tracks.has(id)).flatMap((path) => path.runs);
  return runs.flatMap((run) => {
    const foot = nearestOnRun(run, x, y, newFoot());
    return Math.abs(Math.abs(foot.distance) - radius) <= OFF * scene.mechanism.extent ? [{ run, s: foot.s }] : [];
  });
}

/** The shortest way along joined runs from any of some places to any of others. */
function shortest(starts: Place[], ends: Place[], slack: number): Stretch[] | undefined {
  const ways = starts.flatMap((start) => [1, -1].map((way) => walk(start, way as 1 | -1, ends, slack)));
  const length = (way: Stretch[]): number => way.reduce((sum, { a, b }) => sum + Math.abs(b - a), 0);
  return ways.filter((way) => way !== undefined).sort((a, b) => length(a) - length(b))[0];
}

function walk(start: Place, way: 1 | -1, ends: Place[], slack: number): Stretch[] | undefined {
  const done: Stretch[] = [];
  let [run, s, sense] = [start.run, start.s, way];
  for (let k = 0; k < 20; k += 1) {
    const end = ends.find((place) => place.run === run && (place.s - s) * sense >= -slack * (k === 0 ? 0 : 1));
    if (end) return [...done, { run, a: s, b: end.s }];
    const edge = sense > 0 ? run.length : 0;
    done.push({ run, a: s, b: edge });
    const link = run.closed
      ? { run, at: sense > 0 ? ('start' as const) : ('end' as const) }
      : sense > 0
        ? run.next
        : run.previous;
    if (!link) return undefined;
    [run, sense] = [link.run, link.at === 'start' ? 1 : -1];
    s = link.at === 'start' ? 0 : run.length;
  }
  return undefined;
}

function byPieces({ run, a, b }: Stretch): Stretch[] {
  const inner = run.pieces
    .map(({ from }) => from)
    .filter((from) => from > Math.min(a, b) && from < Math.max(a, b))
    .sort((p, q) => (a < b ? p - q : q - p));
  const marks = [a, ...inner, b];
  return marks.slice(1).map((mark, i) => ({ run, a: marks[i], b: mark }));
}

function courseOf(scene: Scene, body: string, leg: Leg, { run, a, b }: Stretch, rolls: boolean): Course {
  const { mass, inertia, shape } = scene.body(body);
  const [start, end] = [scene.pose(body, leg.from), scene.pose(body, leg.to)];
  const way = b < a ? -1 : 1;
  const middle = pointAt(run, (a + b) / 2);
  const radius = shape.kind === 'disc' ? shape.radius : 0;
  const foot = newFoot();
  const at = (q: number) => pointAt(run, a + way * q, foot);
  // On which side the centre is: of a disc by where it starts.
  const side = Math.sign(nearestOnRun(run, start.x, start.y, newFoot()).distance) || 1;
  const d = side * radius;
  const pair = pairOn(scene, body, run.track);
  const along = scale([middle.tx, middle.ty], way);
  const piece = run.pieces[middle.piece];
  const rollingMass = rolls ? inertia / radius ** 2 : 0;
  const rub: Rub = {
    of: [...pair.between],
    coefficient: pair.kineticFriction,
    on: piece.name ?? run.track,
    carried: [body],
    sense: slipSense(scene, body, leg, d, rolls) ?? beltSense(scene, run.track, leg, along, body),
    normal: (q) => {
      const { tx, ty } = at(q);
      return left([tx, ty]);
    },
    ...(rolls ? { rolling: { radius, lever: pair.rollingResistance } } : {}),
  };
  return {
    kind: 'track',
    members: [body],
    length: Math.abs(b - a),
    measure: mass + rollingMass,
    rollingMass,
    pose: (id, q) => {
      if (id !== body) return scene.pose(id, leg.from);
      const { x, y, tx, ty } = at(q);
      return { x: x - d * ty, y: y + d * tx, angle: start.angle + ((end.angle - start.angle) * q) / Math.abs(b - a) };
    },
    rate: (q) => {
      const { tx, ty, curvature } = at(q);
      const stretch = 1 - curvature * d;
      const turn = rolls ? (-Math.sign(d) * way * stretch) / radius : 0;
      return { tangent: scale([tx, ty], way * stretch), bend: scale(left([tx, ty]), curvature / stretch), turn };
    },
    sense: 1,
    rubs: pair.kineticFriction > 0 || pair.staticFriction > 0 || rolls ? [rub] : [],
    joints: [],
    ...(piece.kind === 'line' ? { slope: slopeOf(scene, along) } : {}),
  };
}

function pairOn(scene: Scene, body: string, track: string): ContactPair {
  const pair = scene.pairsOf(body).find(({ between }) => between.includes(track));
  return pair ?? refuse(`${body} goes along ${track}, which it has no contact with.`);
}

/** Of a disc that slips as it turns: −1 where its contact point slides ahead, +1 where it slides back. */
function slipSense(scene: Scene, body: string, { rows }: Leg, d: number, rolls: boolean): 1 | -1 | undefined {
  if (d === 0 || rolls) return undefined;
  const pair = scene.pairsOf(body).find((each) => rows.some((row) => scene.touches(each, row)));
  const row = rows[Math.floor(rows.length / 2)];
  if (!pair) return undefined;
  const { vx, vy, spin } = scene.heading(body, row);
  const [nx, ny]: Vec = scene.normal(pair, row);
  const out: Vec = pair.between[0] === body ? [nx, ny] : [-nx, -ny];
  // Velocity of the contact point, at −r out of the centre: v + ω k × (−r out).
  const slip: Vec = [vx + spin * Math.abs(d) * out[1], vy - spin * Math.abs(d) * out[0]];
  return dot(slip, [vx, vy]) < 0 ? 1 : -1;
}
