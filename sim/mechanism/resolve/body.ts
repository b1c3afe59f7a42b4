import type { Place } from '../../core/problem.js';
import type { Vec } from '../../core/vec.js';
import { counterClockwise, massProperties, type TrackPath } from '../../geometry/index.js';
import type { Element } from '../fields/spec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Body, BodyDocument, Shape } from '../kinds/body.js';
import { resolveCam } from './cam.js';
import { outlineOf, type Outline } from './outline.js';
import { restPose, type Pose } from './rest.js';
import { formatQuantity } from '../units/format.js';

/** A body as far as it is known where its mass may not be: enough to see what it overlaps. */
export interface PlacedBody extends Pose {
  id: string;
  shape: Shape;
  outline: Outline;
  place: Place;
}

export interface ResolvedBody {
  placed: PlacedBody | undefined;
  body: Body | undefined;
}

/** Places a body, laying it on its track where it says `rest`, and works out its mass, centre and inertia. */
export function resolveBody(
  { draft, value, place }: Element<BodyDocument>,
  paths: ReadonlyMap<string, TrackPath>,
  reading: Reading,
): ResolvedBody {
  const drawn = draft.shape;
  const placing = drawn && poseOf(draft, drawn, paths, place, reading);
  if (!drawn || !placing || draft.id === undefined) return { placed: undefined, body: undefined };
  const shape = resolveShape(drawn, placing, inside(place, 'shape'), reading);
  if (!shape) return { placed: undefined, body: undefined };
  const placed = { id: draft.id, shape, outline: outlineOf(shape), place, ...placing };
  return { placed, body: value && completed(value, shape, placing, place, reading) };
}

type DrawnShape = BodyDocument['shape'];

function resolveShape(shape: DrawnShape, pose: Pose, place: Place, reading: Reading): Shape | undefined {
  if (shape.kind === 'polygon') return { kind: 'polygon', points: counterClockwise(shape.points) };
  return shape.kind === 'cam' ? resolveCam(shape, pose, place, reading) : shape;
}

function poseOf(
  draft: Partial<BodyDocument>,
  shape: DrawnShape,
  paths: ReadonlyMap<string, TrackPath>,
  place: Place,
  reading: Reading,
): Pose | undefined {
  const { at, angle, rest } = draft;
  if (at) {
    if (angle === undefined) reading.applied(`${place.pointer}/angle`, 0, 'drawn upright');
    return { at, angle: angle ?? 0 };
  }
  const path = rest && paths.get(rest.on);
  if (!rest || !path) return undefined;
  if (shape.kind === 'cam') {
    reading.report('cam-at-rest', inside(place, 'rest'), { found: 'a cam laid on a track', accepted: 'at and angle' });
    return undefined;
  }
  if (rest.at <= path.length) return restPose(shape, path, rest.at);
  const accepted = `at most its length, ${formatQuantity(path.length, 'length')}`;
  const found = `a place ${formatQuantity(rest.at, 'length')} along "${rest.on}"`;
  reading.report('beyond-track', inside(inside(place, 'rest'), 'at'), { found, accepted });
  return undefined;
}

function completed(given: BodyDocument, shape: Shape, pose: Pose, place: Place, reading: Reading): Body | undefined {
  const mass = massOf(given, shape, place, reading);
  if (mass === undefined) return undefined;
  const inertia = inertiaOf(given, shape, mass, place, reading);
  if (inertia === undefined) return undefined;
  if (shape.kind === 'particle') checkParticle(given, place, reading);
  return {
    id: given.id,
    name: given.name ?? given.id,
    shape,
    mass,
    inertia,
    centerOfMass: centerOf(given, shape, place, reading),
    ...pose,
    velocity: given.velocity,
    spin: shape.kind === 'particle' ? 0 : given.spin,
    ...(given.material !== undefined && { material: given.material }),
    ...(given.rest && { rest: given.rest }),
  };
}

const hasArea = (shape: Shape): boolean => shape.kind !== 'particle' && shape.kind !== 'none';

function massOf(given: BodyDocument, shape: Shape, place: Place, reading: Reading): number | undefined {
  const { mass, density, thickness } = given;
  if (mass !== undefined) return mass;
  if (density === undefined || thickness === undefined) return undefined;
  if (hasArea(shape)) return massProperties(shape, { arealDensity: density * thickness }).mass;
  const found = `a density for a shape of no area (${shape.kind})`;
  reading.report('no-area', inside(place, 'density'), { found, accepted: 'mass' });
  return undefined;
}

function inertiaOf(
  given: BodyDocument,
  shape: Shape,
  mass: number,
  place: Place,
  reading: Reading,
): number | undefined {
  if (shape.kind === 'particle') return 0;
  if (given.inertia !== undefined) return given.inertia;
  if (shape.kind === 'none') {
    const values = {
      key: 'inertia',
      of: 'a body without a shape',
      accepted: 'a moment of inertia, such as "0.02 kg m^2"',
    };
    reading.report('missing-key', inside(place, 'inertia'), values);
    return undefined;
  }
  const { inertia } = massProperties(shape, { mass });
  const why = `${shape.kind} of uniform density with this mass, about its centroid`;
  reading.applied(`${place.pointer}/inertia`, formatQuantity(inertia, 'inertia'), why);
  return inertia;
}

function centerOf(given: BodyDocument, shape: Shape, place: Place, reading: Reading): Vec {
  if (given.centerOfMass && shape.kind !== 'particle') return given.centerOfMass;
  const { centroid } = massProperties(shape, { mass: 1 });
  const value = `[${centroid.map((part) => formatQuantity(part, 'length')).join(', ')}]`;
  if (shape.kind !== 'particle') reading.applied(`${place.pointer}/centerOfMass`, value, 'centroid of the shape');
  return centroid;
}

/** A particle has a mass and a place, and nothing else. */
function checkParticle(given: BodyDocument, place: Place, reading: Reading): void {
  const meaningless = {
    inertia: given.inertia !== undefined,
    centerOfMass: given.centerOfMass !== undefined,
    spin: given.spin !== 0,
  };
  for (const [key, isGiven] of Object.entries(meaningless)) {
    if (!isGiven) continue;
    const values = { found: key, accepted: 'mass and velocity; a particle does not turn' };
    reading.report('particle-turns', inside(place, key), values);
  }
}
