import { distance, dot, left, norm, rotate, subtract, unit, type Vec } from '../../core/vec.js';
import { nearestOnRun, newFoot, placedParts } from '../../geometry/index.js';
import type { ContactPair } from '../../mechanism/kinds/contact.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';

/** Nearer than this to an edge's end, of its length, a touch is at a corner. */
const CORNER = 1e-3;
/** A touch is on an edge within this share of the extent, beside the radius of a rounded bar. */
const TOUCH = 1e-3;

/** Where a pair touched in a blow [m], as the events tell it. */
export function placesOf({ recording }: Scene, { between }: ContactPair, row: number): Vec[] {
  return recording.events.flatMap((event) =>
    event.kind === 'touch' && event.row === row && event.pair.every((id) => between.includes(id)) ? [event.at] : [],
  );
}

/** Unit normal of a touch, in either direction: of the track, from a disc's centre, or of the face that is struck. */
export function strikeNormal(scene: Scene, pair: ContactPair, row: number): Vec {
  const places = placesOf(scene, pair, row);
  for (const at of places) {
    const normal = trackNormal(scene, pair, at) ?? discNormal(scene, pair, row, at) ?? faceNormal(scene, pair, row, at);
    if (normal) return normal;
  }
  return refuse(`${pair.between.join(' and ')} strike corner on corner.`);
}

function trackNormal(scene: Scene, { between }: ContactPair, at: Vec): Vec | undefined {
  const feet = scene.tracks
    .filter(({ id }) => between.includes(id))
    .flatMap(({ runs }) => runs.map((run) => nearestOnRun(run, at[0], at[1], newFoot())))
    .sort((a, b) => Math.abs(a.distance) - Math.abs(b.distance));
  return feet.length > 0 ? left([feet[0].tx, feet[0].ty]) : undefined;
}

function discNormal(scene: Scene, { between }: ContactPair, row: number, at: Vec): Vec | undefined {
  const disc = between.find((id) => scene.isBody(id) && scene.body(id).shape.kind === 'disc');
  if (disc === undefined) return undefined;
  const { x, y } = scene.poseAtRow(disc, row);
  return unit(subtract(at, [x, y]));
}

/** The outward normal of the face that is struck inside its edge, or of two faces that lie on each other. */
function faceNormal(scene: Scene, { between }: ContactPair, row: number, at: Vec): Vec | undefined {
  const slack = TOUCH * scene.mechanism.extent;
  const [first, second] = between.map((id) => facesAt(edgesOf(scene, id, row), at, slack));
  const inner = [...first, ...second].find(({ isInner }) => isInner);
  if (inner) return inner.normal;
  return first.find(({ normal }) => second.some((face) => dot(normal, face.normal) < -1 + CORNER * CORNER))?.normal;
}

interface Face {
  normal: Vec;
  /** The touch is not at its end. */
  isInner: boolean;
}

/** The edges that a touch lies on, the nearest first. */
function facesAt(edges: [Vec, Vec][], at: Vec, slack: number): Face[] {
  return edges
    .map(([a, b]) => {
      const edge = subtract(b, a);
      const along = dot(subtract(at, a), edge) / dot(edge, edge);
      const normal = left(unit(subtract(a, b)));
      const isInner = along > CORNER && along < 1 - CORNER;
      return {
        normal,
        isInner,
        off: Math.abs(dot(subtract(at, a), normal)),
        isOn: along > -CORNER && along < 1 + CORNER,
      };
    })
    .filter(({ off, isOn }) => isOn && off <= slack)
    .sort((p, q) => p.off - q.off);
}

function edgesOf(scene: Scene, id: string, row: number): [Vec, Vec][] {
  const { shape, centerOfMass } = scene.body(id);
  const { x, y, angle } = scene.poseAtRow(id, row);
  const at = subtract([x, y], rotate(centerOfMass, angle));
  return placedParts({ shape, at, angle }).flatMap(({ points }) =>
    points
      .map((point, i): [Vec, Vec] => [point, points[(i + 1) % points.length]])
      .filter(([a, b]) => distance(a, b) > 0),
  );
}

/** Lever of a blow about a pin [m]: approach speed = ω × lever. */
export function leverAbout(pin: Vec, places: readonly Vec[], normal: Vec): number {
  return Math.max(0, ...places.map((at) => Math.abs(dot(left(subtract(at, pin)), normal) / (norm(normal) || 1))));
}
