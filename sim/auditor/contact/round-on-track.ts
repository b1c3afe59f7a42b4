import { footOnPiece, newFoot } from '../../geometry/index.js';
import { newPlaced, placeMark, type Mark } from '../system.js';
import { ContactPoint } from '../unilateral.js';
import { footOn, type Course, type CourseFoot } from './course.js';
import type { Pair } from './pair.js';

/** A foot this near to the end of a piece is at it [auditor length]. */
const AT_END = 1e-9;

/** What a contact point needs to know of the tracks of its course. */
export interface Surfaces {
  /** The pair of a body with a track, or null where they are not listed to touch. */
  pairOf(body: number, track: number): Pair | null;
  /** Speed of a track's surface along its path, and its rate of change. */
  speedOf(track: number, t: number): { speed: number; change: number };
}

/**
 * A round (disc, bar end) or a bare point (particle, corner) of a body on a course of tracks.
 *
 * With the centre at c, its foot on the curve with unit tangent t, left normal n and curvature κ, and d the signed
 * distance: ḋ = n·ċ, d̈ = n·c̈ − κ (t·ċ)²/(1 − κ d); the foot runs at ṡ = (t·ċ)/(1 − κ d). Past an open end a round meets
 * the end point.
 */
export class RoundOnTrack extends ContactPoint {
  pair: Pair;
  readonly bodyA = -1;
  readonly bodyB: number;
  private readonly at: CourseFoot = { foot: newFoot(), stretch: 0, isPastEnd: false };
  private readonly centre = newPlaced();
  private side: 1 | -1 = 1;
  /** It keeps to its piece of track, continued beyond the piece's ends. */
  private held = false;
  private isNew = true;

  constructor(
    private readonly course: Course,
    private readonly centreMark: Mark,
    private readonly radius: number,
    private readonly surfaces: Surfaces,
    anyPair: Pair,
    /** Of a bare corner: the ways its own outline goes from it, in its body's frame. None may lead into the track. */
    private readonly ways: readonly { x: number; y: number }[],
  ) {
    super();
    this.bodyB = centreMark.body;
    this.pair = anyPair;
  }

  locate(q: Float64Array): void {
    placeMark(this.centreMark, q, null, this.centre);
    const { x, y } = this.centre;
    if (this.isClosed && this.held) {
      footOnPiece(this.course[this.at.stretch].run.pieces[this.at.foot.piece], x, y, this.at.foot);
      this.gap = this.freeSide() * this.at.foot.distance - this.radius;
      return;
    }
    footOn(this.course, x, y, this.at);
    this.look();
    if (this.ways.length > 0 && this.gap < 1e-6) this.isValid &&= this.liesOn(q[3 * this.bodyB + 2]);
  }

  /** Gap, pair and validity at the foot now in `at`. */
  private look(): void {
    const { foot, stretch, isPastEnd } = this.at;
    const pair = this.surfaces.pairOf(this.bodyB, this.course[stretch].track);
    if (pair) this.pair = pair;
    this.segment = foot.segment;
    if (isPastEnd) {
      this.isValid = pair !== null && this.radius > 0;
      this.gap = Math.hypot(this.centre.x - foot.x, this.centre.y - foot.y) - this.radius;
      return;
    }
    this.isValid = pair !== null;
    if (this.isNew) this.side = this.sideHere();
    this.gap = this.freeSide() * foot.distance - this.radius;
  }

  private liesOn(angle: number): boolean {
    const { tx, ty } = this.at.foot;
    const side = this.freeSide();
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    return this.ways.every(({ x, y }) => side * (-ty * (c * x - s * y) + tx * (s * x + c * y)) >= -1e-3);
  }

  /** Side of the course the body is on, in the course's own sense. */
  private sideHere(): 1 | -1 {
    return this.at.foot.distance * this.course[this.at.stretch].sense >= 0 ? 1 : -1;
  }

  private freeSide(): 1 | -1 {
    const { free, sense } = this.course[this.at.stretch];
    return free !== 0 ? free : this.side === sense ? 1 : -1;
  }

  aim(q: Float64Array, v: Float64Array, t: number): void {
    placeMark(this.centreMark, q, v, this.centre);
    const { foot, stretch, isPastEnd } = this.at;
    if (isPastEnd) this.aimAtEnd();
    else this.aimOnCurve();
    const { track } = this.course[stretch];
    const { speed, change } = this.surfaces.speedOf(track, t);
    const along = Math.sign(this.ny * foot.tx - this.nx * foot.ty) || 1;
    this.surfaceSpeed = along * speed;
    this.surfaceChange = along * change;
  }

  private aimOnCurve(): void {
    const { foot } = this.at;
    const { rx, ry, vx, vy, cx, cy } = this.centre;
    const side = this.freeSide();
    const { tx, ty, curvature: k } = foot;
    this.nx = -ty * side;
    this.ny = tx * side;
    const along = tx * vx + ty * vy;
    const run = along / (1 - k * foot.distance);
    this.normal.clear().addPoint(this.bodyB, this.nx, this.ny, rx, ry, 1);
    this.normal.gamma = this.nx * cx + this.ny * cy - side * k * run * along;
    // The tangent is (ny, −nx): along the path when its left is free.
    this.aimTangent(k * run, rx, ry, vx, vy, cx, cy);
    this.x = foot.x;
    this.y = foot.y;
  }

  /** `turning`: rate at which the normal turns, clockwise positive (ṅ = −turning × tangent). */
  private aimTangent(turning: number, rx: number, ry: number, vx: number, vy: number, cx: number, cy: number): void {
    const { nx, ny, radius, bodyB } = this;
    const [tx, ty] = [ny, -nx];
    const px = rx - radius * nx;
    const py = ry - radius * ny;
    this.tangent.clear().addPoint(bodyB, tx, ty, px, py, 1);
    this.tangent.gamma = tx * cx + ty * cy + turning * (nx * vx + ny * vy);
  }

  private aimAtEnd(): void {
    const { foot } = this.at;
    const { x, y, rx, ry, vx, vy, cx, cy } = this.centre;
    const away = Math.hypot(x - foot.x, y - foot.y);
    this.nx = (x - foot.x) / away;
    this.ny = (y - foot.y) / away;
    const across = this.ny * vx - this.nx * vy;
    this.normal.clear().addPoint(this.bodyB, this.nx, this.ny, rx, ry, 1);
    this.normal.gamma = this.nx * cx + this.ny * cy + (across * across) / away;
    this.aimTangent(-across / away, rx, ry, vx, vy, cx, cy);
    this.x = foot.x;
    this.y = foot.y;
  }

  /**
   * A closed point is held to the piece it is on; where it stands at the piece's end, to the one it runs onto. Past an end
   * that nothing continues only a round goes on, about the end point.
   */
  mark(q: Float64Array, v: Float64Array): void {
    placeMark(this.centreMark, q, v, this.centre);
    this.held = false;
    footOn(this.course, this.centre.x, this.centre.y, this.at);
    if (this.isClosed) this.runOn();
    this.look();
    this.held = this.isClosed && !this.at.isPastEnd;
    this.isNew = false;
    if (!this.isClosed) this.side = this.sideHere();
  }

  /** At the end of a piece: on to the next, by the way the body moves. */
  private runOn(): void {
    const { foot, stretch } = this.at;
    const { run } = this.course[stretch];
    const piece = run.pieces[foot.piece];
    const along = foot.tx * this.centre.vx + foot.ty * this.centre.vy;
    const forward = along > 0 && piece.from + piece.length - foot.s <= AT_END;
    const backward = along < 0 && foot.s - piece.from <= AT_END;
    if (!forward && !backward) return;
    const next = foot.piece + (forward ? 1 : -1);
    if (next >= 0 && next < run.pieces.length) foot.piece = next;
    else if (run.closed) foot.piece = forward ? 0 : run.pieces.length - 1;
    else if (!this.changeRun(forward)) {
      this.at.isPastEnd = true;
      return;
    }
    this.at.isPastEnd = false;
    const onto = this.course[this.at.stretch].run.pieces[this.at.foot.piece];
    foot.s =
      Math.abs(foot.s - onto.from) < Math.abs(foot.s - onto.from - onto.length) ? onto.from : onto.from + onto.length;
    footOnPiece(onto, this.centre.x, this.centre.y, foot);
  }

  private changeRun(forward: boolean): boolean {
    const { foot, stretch } = this.at;
    const { run } = this.course[stretch];
    const link = forward ? run.next : run.previous;
    const onto = link ? this.course.findIndex((candidate) => candidate.run === link.run) : -1;
    if (!link || onto < 0) return false;
    this.at.stretch = onto;
    foot.piece = link.at === 'start' ? 0 : link.run.pieces.length - 1;
    foot.s = link.at === 'start' ? 0 : link.run.length;
    return true;
  }

  seam(): number {
    const { foot, stretch, isPastEnd } = this.at;
    if (isPastEnd) return Math.abs(foot.tx * (this.centre.x - foot.x) + foot.ty * (this.centre.y - foot.y));
    const piece = this.course[stretch].run.pieces[foot.piece];
    return Math.min(foot.s - piece.from, piece.from + piece.length - foot.s);
  }
}
