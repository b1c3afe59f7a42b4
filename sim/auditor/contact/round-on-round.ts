import { newPlaced, placeMark, type Mark } from '../system.js';
import { ContactPoint } from '../unilateral.js';
import type { Pair } from './pair.js';

/** Two rounds: with d between the centres, g = |d| − radii, g̈ = n·d̈ + (t·ḋ)²/|d|. */
export class RoundOnRound extends ContactPoint {
  readonly bodyA: number;
  readonly bodyB: number;
  private readonly a = newPlaced();
  private readonly b = newPlaced();

  constructor(
    readonly pair: Pair,
    private readonly markA: Mark,
    private readonly radiusA: number,
    private readonly markB: Mark,
    private readonly radiusB: number,
  ) {
    super();
    this.bodyA = markA.body;
    this.bodyB = markB.body;
  }

  locate(q: Float64Array): void {
    placeMark(this.markA, q, null, this.a);
    placeMark(this.markB, q, null, this.b);
    this.gap = Math.hypot(this.b.x - this.a.x, this.b.y - this.a.y) - this.radiusA - this.radiusB;
  }

  aim(q: Float64Array, v: Float64Array): void {
    const { bodyA, bodyB } = this;
    const a = placeMark(this.markA, q, v, this.a);
    const b = placeMark(this.markB, q, v, this.b);
    const away = Math.hypot(b.x - a.x, b.y - a.y);
    const nx = (b.x - a.x) / away;
    const ny = (b.y - a.y) / away;
    const [ux, uy] = [b.vx - a.vx, b.vy - a.vy];
    const turn = (nx * uy - ny * ux) / away;
    this.normal.clear().addPoint(bodyB, nx, ny, b.rx, b.ry, 1);
    this.normal.addPoint(bodyA, nx, ny, a.rx, a.ry, -1);
    this.normal.gamma = nx * (b.cx - a.cx) + ny * (b.cy - a.cy) + turn * turn * away;
    this.nx = nx;
    this.ny = ny;
    this.x = a.x + this.radiusA * nx;
    this.y = a.y + this.radiusA * ny;
    this.aimTangent(v, turn);
  }

  private aimTangent(v: Float64Array, turn: number): void {
    const { a, b, bodyA, bodyB, radiusA, radiusB, nx, ny } = this;
    const [tx, ty] = [ny, -nx];
    const wa = bodyA < 0 ? 0 : v[3 * bodyA + 2];
    const wb = bodyB < 0 ? 0 : v[3 * bodyB + 2];
    this.tangent.clear().addPoint(bodyB, tx, ty, b.rx - radiusB * nx, b.ry - radiusB * ny, 1);
    this.tangent.addPoint(bodyA, tx, ty, a.rx + radiusA * nx, a.ry + radiusA * ny, -1);
    // ṫ = turn × t, and the rims turn with ṅ = turn × n, which has no part along t in their accelerations.
    const relX = b.vx - a.vx + (radiusB * wb + radiusA * wa) * ny;
    const relY = b.vy - a.vy - (radiusB * wb + radiusA * wa) * nx;
    this.tangent.gamma = tx * (b.cx - a.cx) + ty * (b.cy - a.cy) + turn * (-ty * relX + tx * relY);
  }

  mark(_q: Float64Array, _v: Float64Array): void {
    // One law holds all round.
  }

  seam(): number {
    return Infinity;
  }
}
