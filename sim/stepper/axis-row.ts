import type { BodyInternals } from './planck-internals.js';

/** A row that brings a rate to its target in a correction. */
export interface HeldRow {
  a: number;
  b: number;
  row: AxisRow;
  target: number;
  least: number;
}

/**
 * One scalar constraint or bounded force along an axis between two parts: rate u = n·(v_B + ω_B×r_B − v_A − ω_A×r_A), or
 * u = ω_B − ω_A for a turning one. Solved by projected Gauss–Seidel beside planck's own constraints, on the same
 * velocities (Catto, *Iterative dynamics with temporal coherence*, GDC 2005).
 */
export class AxisRow {
  nx = 0;
  ny = 0;
  /** r × n of each part, or 1 for a turning row. */
  leverA = 0;
  leverB = 0;
  /** 1 / (J M⁻¹ Jᵀ). */
  mass = 0;
  /** Impulse so far in this solve, on B along the axis; A gets its opposite. */
  impulse = 0;

  constructor(
    readonly a: BodyInternals,
    readonly b: BodyInternals,
  ) {}

  /** A row along (nx, ny) through a point of the sheet. */
  aim(nx: number, ny: number, x: number, y: number): void {
    const { a, b } = this;
    this.nx = nx;
    this.ny = ny;
    this.leverA = (x - a.c_position.c.x) * ny - (y - a.c_position.c.y) * nx;
    this.leverB = (x - b.c_position.c.x) * ny - (y - b.c_position.c.y) * nx;
    this.weigh();
  }

  /** A row along the line between a point of each part. */
  aimBetween(nx: number, ny: number, ax: number, ay: number, bx: number, by: number): void {
    const { a, b } = this;
    this.nx = nx;
    this.ny = ny;
    this.leverA = (ax - a.c_position.c.x) * ny - (ay - a.c_position.c.y) * nx;
    this.leverB = (bx - b.c_position.c.x) * ny - (by - b.c_position.c.y) * nx;
    this.weigh();
  }

  turn(): void {
    this.nx = 0;
    this.ny = 0;
    this.leverA = 1;
    this.leverB = 1;
    this.weigh();
  }

  private weigh(): void {
    const { a, b } = this;
    const linear = this.nx * this.nx + this.ny * this.ny;
    const k =
      (a.m_invMass + b.m_invMass) * linear +
      a.m_invI * this.leverA * this.leverA +
      b.m_invI * this.leverB * this.leverB;
    this.mass = k > 0 ? 1 / k : 0;
  }

  /** Rate of the axis now. */
  rate(): number {
    return this.rateB() - this.rateA();
  }

  rateA(): number {
    const { v, w } = this.a.c_velocity;
    return this.nx * v.x + this.ny * v.y + this.leverA * w;
  }

  rateB(): number {
    const { v, w } = this.b.c_velocity;
    return this.nx * v.x + this.ny * v.y + this.leverB * w;
  }

  /** Applies a further impulse. */
  apply(impulse: number): void {
    const { a, b } = this;
    a.c_velocity.v.x -= a.m_invMass * impulse * this.nx;
    a.c_velocity.v.y -= a.m_invMass * impulse * this.ny;
    a.c_velocity.w -= a.m_invI * impulse * this.leverA;
    b.c_velocity.v.x += b.m_invMass * impulse * this.nx;
    b.c_velocity.v.y += b.m_invMass * impulse * this.ny;
    b.c_velocity.w += b.m_invI * impulse * this.leverB;
  }

  /** Starts a solve with an impulse (warm start). */
  start(impulse: number): void {
    this.impulse = impulse;
    if (impulse !== 0) this.apply(impulse);
  }

  /** Moves the impulse so that the rate meets `target`, held between bounds. */
  solve(target: number, least: number, most: number): void {
    const wanted = this.impulse + this.mass * (target - this.rate());
    const next = wanted < least ? least : wanted > most ? most : wanted;
    this.apply(next - this.impulse);
    this.impulse = next;
  }
}
