import { gaussLegendre } from '../core/quadrature.js';
import { cross, dot, subtract, type Vec } from '../core/vec.js';
import type { CamShape, Shape } from '../mechanism/kinds/body.js';
import { camPoint } from './cam-profile.js';
import { signedArea } from './polygon.js';

/** Section of a shape, in body coordinates: what its mass is spread over. */
export interface Section {
  /** [m²] */
  area: number;
  centroid: Vec;
  /** Polar second moment of area about the centroid [m⁴]. */
  polarMoment: number;
}

/** Mass [kg], centroid in body coordinates [m], moment of inertia about it [kg m²]. */
export interface MassProperties {
  mass: number;
  centroid: Vec;
  inertia: number;
}

/** The area, centroid and polar second moment of a shape; all zero, at its origin, for one without extent. */
export function sectionOf(shape: Shape): Section {
  switch (shape.kind) {
    case 'particle':
    case 'none':
      return { area: 0, centroid: [0, 0], polarMoment: 0 };
    case 'disc':
      return { area: Math.PI * shape.radius ** 2, centroid: [0, 0], polarMoment: (Math.PI * shape.radius ** 4) / 2 };
    case 'box':
      return rectangle(shape.width, shape.height);
    case 'bar':
      return stadium(shape.length, shape.width);
    case 'polygon':
      return polygonSection(shape.points);
    case 'cam':
      return camSection(shape);
  }
}

/**
 * Mass and inertia of a shape of uniform density: by its mass, or by its mass per area (density × thickness).
 * A shape without area has the mass given and no inertia.
 */
export function massProperties(shape: Shape, given: { mass: number } | { arealDensity: number }): MassProperties {
  const section = sectionOf(shape);
  const mass = 'mass' in given ? given.mass : given.arealDensity * section.area;
  const inertia = section.area === 0 ? 0 : (mass * section.polarMoment) / section.area;
  return { mass, centroid: section.centroid, inertia };
}

function rectangle(width: number, height: number): Section {
  const area = width * height;
  return { area, centroid: [0, 0], polarMoment: (area * (width ** 2 + height ** 2)) / 12 };
}

/**
 * A rectangle `length` × `width` between two half-discs of radius r = width/2:
 * J = A_rect (L² + w²)/12 + π r² L²/4 + 4 L r³/3 + π r⁴/2.
 */
function stadium(length: number, width: number): Section {
  const r = width / 2;
  const middle = rectangle(length, width);
  const ends = (Math.PI * r ** 2 * length ** 2) / 4 + (4 * length * r ** 3) / 3 + (Math.PI * r ** 4) / 2;
  return { area: middle.area + Math.PI * r ** 2, centroid: [0, 0], polarMoment: middle.polarMoment + ends };
}

/**
 * A simple polygon, either sense, by Green's theorem: A = ½ Σ p×q, c = Σ (p + q) p×q / 6A,
 * J = Σ (p·p + p·q + q·q) p×q / 12, the moments about the centroid itself so that nothing cancels.
 */
export function polygonSection(points: readonly Vec[]): Section {
  const area = signedArea(points);
  const [origin] = points;
  let mx = 0;
  let my = 0;
  overEdges(points, origin, (p, q, twice) => {
    mx += (p[0] + q[0]) * twice;
    my += (p[1] + q[1]) * twice;
  });
  const centroid: Vec = [origin[0] + mx / (6 * area), origin[1] + my / (6 * area)];
  let moment = 0;
  overEdges(points, centroid, (p, q, twice) => {
    moment += (dot(p, p) + dot(p, q) + dot(q, q)) * twice;
  });
  return { area: Math.abs(area), centroid, polarMoment: Math.abs(moment) / 12 };
}

function overEdges(points: readonly Vec[], origin: Vec, visit: (p: Vec, q: Vec, twice: number) => void): void {
  points.forEach((point, i) => {
    const p = subtract(point, origin);
    const q = subtract(points[(i + 1) % points.length], origin);
    visit(p, q, cross(p, q));
  });
}

/** Panels a segment of a cam is integrated over; the closed laws have their kinks on eighths. */
const PANELS = 16;

/**
 * The section inside a cam's profile x(θ), by Green's theorem: A = ½ ∮ x×x′, c = ∮ x (x×x′) / 3A, J = ¼ ∮ |x|² (x×x′) − A |c|².
 * Exact to rounding for the closed laws. Where an undercut profile crosses itself, the loops count with their sign.
 */
export function camSection(cam: CamShape): Section {
  const over = (f: (at: Vec) => number): number => {
    let from = 0;
    let sum = 0;
    for (const segment of cam.segments) {
      for (let k = 0; k < PANELS; k += 1) {
        const a = from + (segment.over * k) / PANELS;
        sum += gaussLegendre(
          (turn) => {
            const { at, slope } = camPoint(cam, turn);
            return f(at) * cross(at, slope);
          },
          a,
          a + segment.over / PANELS,
        );
      }
      from += segment.over;
    }
    return sum;
  };
  const area = over(() => 0.5);
  const centroid: Vec = [over((at) => at[0]) / (3 * area), over((at) => at[1]) / (3 * area)];
  const moment = over((at) => dot(at, at) / 4) - area * dot(centroid, centroid);
  return { area: Math.abs(area), centroid, polarMoment: Math.abs(moment) };
}
