import { newPlaced, placeMark, type Mark } from '../system.js';
import { ContactPoint } from '../unilateral.js';
import type { Pair } from './pair.js';

/** A convex outline with faces, in the frame of its body's mass centre; `radius` swells it (the sides of a bar). */
export interface Faces {
  body: number;
  points: readonly { x: number; y: number }[];
  radius: number;
}

/** Distances closer than this are a tie; ways that lead into a face by less than this lie on it. */
const TIE = 1e-9;
const INTO = 1e-6;
/** Slower than this along a face is no leaving of it. */
const STILL = 1e-9;

interface Edge {
  x: number;
  y: number;
  nx: number;
  ny: number;
  length: number;
}

export function edgesOf({ points }: Pick<Faces, 'points'>): Edge[] {
  return points.map((from, i) => {
    const to = points[(i + 1) % points.length];
    const length = Math.hypot(to.x - from.x, to.y - from.y);
    return { x: from.x, y: from.y, nx: (to.y - from.y) / length, ny: (from.x - to.x) / length, length };
  });
}

/**
 * A round or a point (of another body, or of the ground: a corner of a track) on an outline with faces: on a face, or
 * about one of its corners.
 *
 * On a face with normal N through it, the round's centre at c and V the face body's velocity at c: ġ = N·(ċ − V),
 * g̈ = N·(c̈ − dV/dt) + Ṅ·(ċ − V), Ṅ = ω × N. About a corner at e: with d = c − e, g̈ = n·d̈ + (t·ḋ)²/|d|.
 */
export class RoundOnFace extends ContactPoint {
  readonly bodyA: number;
  readonly bodyB: number;
  private readonly edges: Edge[];
  private readonly centre = newPlaced();
  private readonly corner = newPlaced();
  private readonly cornerMark: Mark;
  /** The face it is on, or −1 − index of the corner it is about. */
  private feature = 0;
  /** Along the face from its start; or, about a corner, how far beyond the face before it and the face after it. */
  private along = 0;
  private over: [number, number] = [0, 0];
  private inside = 0;
  private angle = 0;

  constructor(
    readonly pair: Pair,
    private readonly faces: Faces,
    private readonly roundMark: Mark,
    private readonly radius: number,
    /** Of a bare corner: the ways its own outline goes from it, in its body's frame. None may lead into the face. */
    private readonly ways: readonly { x: number; y: number }[],
  ) {
    super();
    this.bodyA = faces.body;
    this.bodyB = roundMark.body;
    this.edges = edgesOf(faces);
    this.cornerMark = { body: faces.body, x: 0, y: 0 };
  }

  private get radii(): number {
    return this.radius + this.faces.radius;
  }

  locate(q: Float64Array): void {
    const { body } = this.faces;
    placeMark(this.roundMark, q, null, this.centre);
    this.angle = q[3 * body + 2];
    const [c, s] = [Math.cos(this.angle), Math.sin(this.angle)];
    const dx = this.centre.x - q[3 * body];
    const dy = this.centre.y - q[3 * body + 1];
    const lx = c * dx + s * dy;
    const ly = -s * dx + c * dy;
    this.choose(lx, ly, (this.bodyB < 0 ? 0 : q[3 * this.bodyB + 2]) - this.angle);
  }

  /** `turn`: of the corner's body relative to the faces'. */
  private choose(lx: number, ly: number, turn: number): void {
    if (this.isClosed) {
      this.follow(lx, ly);
      return;
    }
    let out = -Infinity;
    let face = 0;
    let fits = false;
    this.edges.forEach((edge, i) => {
      const distance = edge.nx * (lx - edge.x) + edge.ny * (ly - edge.y);
      // At a corner of the faces two of them are as near: the one that the other outline can lie on counts.
      const isTie = Math.abs(distance - out) <= TIE;
      if (!isTie && distance < out) return;
      const lies = this.liesOn(edge, turn);
      if (isTie && (fits || !lies)) return;
      out = distance;
      face = i;
      fits = lies;
    });
    const along = alongEdge(this.edges[face], lx, ly);
    const isBeyond = (out > 0 || this.edges.length === 2) && (along < -TIE || along > this.edges[face].length + TIE);
    if (!isBeyond) {
      this.onFace(face, lx, ly);
      this.isValid = fits;
      return;
    }
    this.aboutCorner(along < 0 ? face : (face + 1) % this.edges.length, lx, ly);
    this.isValid = this.radii > 0;
  }

  /** A closed point keeps to its face or corner until it is marked anew. */
  private follow(lx: number, ly: number): void {
    if (this.feature >= 0) this.onFace(this.feature, lx, ly);
    else this.aboutCorner(-1 - this.feature, lx, ly);
  }

  private onFace(face: number, lx: number, ly: number): void {
    const edge = this.edges[face];
    this.feature = face;
    this.along = alongEdge(edge, lx, ly);
    this.inside = Math.min(this.along, edge.length - this.along);
    this.gap = edge.nx * (lx - edge.x) + edge.ny * (ly - edge.y) - this.radii;
  }

  /** `inside`: how far it is from lying over either of the corner's faces. */
  private aboutCorner(corner: number, lx: number, ly: number): void {
    const count = this.edges.length;
    const after = this.edges[corner];
    const before = this.edges[(corner + count - 1) % count];
    const point = this.faces.points[corner];
    this.feature = -1 - corner;
    this.over = [alongEdge(before, lx, ly) - before.length, -alongEdge(after, lx, ly)];
    this.inside = Math.min(...this.over);
    this.gap = Math.hypot(lx - point.x, ly - point.y) - this.radii;
  }

  private liesOn({ nx, ny }: Edge, turn: number): boolean {
    if (this.ways.length === 0) return true;
    const [c, s] = [Math.cos(turn), Math.sin(turn)];
    return this.ways.every(({ x, y }) => nx * (c * x - s * y) + ny * (s * x + c * y) >= -INTO);
  }

  aim(q: Float64Array, v: Float64Array): void {
    placeMark(this.roundMark, q, v, this.centre);
    if (this.feature >= 0) this.aimOnFace(q, v);
    else this.aimAtCorner(q, v);
  }

  private aimOnFace(q: Float64Array, v: Float64Array): void {
    const { bodyA: a, bodyB: b, centre, radius } = this;
    const edge = this.edges[this.feature];
    const [c, s] = [Math.cos(this.angle), Math.sin(this.angle)];
    const nx = c * edge.nx - s * edge.ny;
    const ny = s * edge.nx + c * edge.ny;
    const w = v[3 * a + 2];
    const [ax, ay] = [centre.x - q[3 * a], centre.y - q[3 * a + 1]];
    const [ux, uy] = [centre.vx - (v[3 * a] - w * ay), centre.vy - (v[3 * a + 1] + w * ax)];
    this.normal.clear().addPoint(b, nx, ny, centre.rx, centre.ry, 1);
    this.normal.addPoint(a, nx, ny, ax, ay, -1);
    // dV/dt beyond the accelerations: ω × (ċ − v_A).
    const [gx, gy] = [-w * (centre.vy - v[3 * a + 1]), w * (centre.vx - v[3 * a])];
    this.normal.gamma = nx * (centre.cx - gx) + ny * (centre.cy - gy) + w * (-ny * ux + nx * uy);
    this.nx = nx;
    this.ny = ny;
    this.x = centre.x - radius * nx;
    this.y = centre.y - radius * ny;
    this.aimTangent(q, v, w);
  }

  /** Tangent row of both bodies at the contact point; `turn`: rate at which the normal turns, counter-clockwise. */
  private aimTangent(q: Float64Array, v: Float64Array, turn: number): void {
    const { nx, ny, bodyA: a, bodyB: b, centre, radius } = this;
    const [tx, ty] = [ny, -nx];
    const wb = b < 0 ? 0 : v[3 * b + 2];
    const wa = v[3 * a + 2];
    const [bx, by] = [centre.rx - radius * nx, centre.ry - radius * ny];
    const [ax, ay] = [this.x - q[3 * a], this.y - q[3 * a + 1]];
    this.tangent.clear().addPoint(b, tx, ty, bx, by, 1);
    this.tangent.addPoint(a, tx, ty, ax, ay, -1);
    // The contact point travels at ṗ = ċ − R ṅ, ṅ = turn × n.
    const px = centre.vx + radius * turn * ny;
    const py = centre.vy - radius * turn * nx;
    const accelB = b < 0 ? [0, 0] : [centre.cx + radius * turn * wb * nx, centre.cy + radius * turn * wb * ny];
    const accelA = [-wa * (py - v[3 * a + 1]), wa * (px - v[3 * a])];
    const velB = b < 0 ? [0, 0] : [centre.vx + wb * radius * ny, centre.vy - wb * radius * nx];
    const velA = [v[3 * a] - wa * ay, v[3 * a + 1] + wa * ax];
    // ṫ = turn × t.
    const [dtx, dty] = [-turn * ty, turn * tx];
    this.tangent.gamma =
      tx * (accelB[0] - accelA[0]) +
      ty * (accelB[1] - accelA[1]) +
      dtx * (velB[0] - velA[0]) +
      dty * (velB[1] - velA[1]);
  }

  private aimAtCorner(q: Float64Array, v: Float64Array): void {
    const { bodyA: a, bodyB: b, centre, corner } = this;
    const point = this.faces.points[-1 - this.feature];
    this.cornerMark.x = point.x;
    this.cornerMark.y = point.y;
    placeMark(this.cornerMark, q, v, corner);
    const [dx, dy] = [centre.x - corner.x, centre.y - corner.y];
    const away = Math.hypot(dx, dy);
    const [nx, ny] = [dx / away, dy / away];
    const [ux, uy] = [centre.vx - corner.vx, centre.vy - corner.vy];
    const across = nx * uy - ny * ux;
    this.normal.clear().addPoint(b, nx, ny, centre.rx, centre.ry, 1);
    this.normal.addPoint(a, nx, ny, corner.rx, corner.ry, -1);
    this.normal.gamma = nx * (centre.cx - corner.cx) + ny * (centre.cy - corner.cy) + (across * across) / away;
    this.nx = nx;
    this.ny = ny;
    this.x = centre.x - this.radius * nx;
    this.y = centre.y - this.radius * ny;
    this.aimTangent(q, v, across / away);
  }

  mark(q: Float64Array, v: Float64Array): void {
    if (!this.isClosed || this.inside > TIE) return;
    const count = this.edges.length;
    if (this.feature >= 0) {
      const edge = this.edges[this.feature];
      const isStart = this.along < 0.5 * edge.length;
      const leaves = (isStart ? -1 : 1) * this.alongRate(edge, q, v) > STILL;
      if (!leaves) return;
      // Off the end of a face: about its corner, where a round goes on and a bare point does not.
      this.feature = -1 - (isStart ? this.feature : (this.feature + 1) % count);
      this.isValid = this.radii > 0;
      return;
    }
    const corner = -1 - this.feature;
    const before = (corner + count - 1) % count;
    if (this.over[0] <= TIE && this.alongRate(this.edges[before], q, v) < -STILL) this.feature = before;
    else if (this.over[1] <= TIE && this.alongRate(this.edges[corner], q, v) > STILL) this.feature = corner;
  }

  /** Rate at which the round moves along a face, seen from the faces' body. */
  private alongRate({ nx, ny }: Edge, q: Float64Array, v: Float64Array): number {
    const a = 3 * this.bodyA;
    placeMark(this.roundMark, q, v, this.centre);
    const [c, s] = [Math.cos(q[a + 2]), Math.sin(q[a + 2])];
    const [wx, wy] = [c * nx - s * ny, s * nx + c * ny];
    const ux = this.centre.vx - (v[a] - v[a + 2] * (this.centre.y - q[a + 1]));
    const uy = this.centre.vy - (v[a + 1] + v[a + 2] * (this.centre.x - q[a]));
    return -wy * ux + wx * uy;
  }

  seam(): number {
    return this.inside;
  }
}

function alongEdge({ x, y, nx, ny }: Edge, px: number, py: number): number {
  return nx * (py - y) - ny * (px - x);
}
