import type { Damper } from '../../mechanism/kinds/damper.js';
import { AxisRow } from '../axis-row.js';
import { PairAccount } from '../books.js';
import type { Element } from '../element.js';
import { anchorAt, anchorOf, partIndex, partInner, type Anchor, type Scene } from '../scene.js';
import type { LinkReading } from './spring.js';

/**
 * A damper as a row that meets its law at the mean velocity: implicit, so that a stiff damper cannot overshoot, and
 * second order. Its work is −J·v̄, all of it heat.
 */
export class DamperElement implements Element {
  private readonly row: AxisRow;
  private readonly account: PairAccount;
  private readonly coefficient: number;
  private readonly ends: [Anchor, Anchor] | null;
  private readonly pointA = { x: 0, y: 0 };
  private readonly pointB = { x: 0, y: 0 };
  private readonly drawnLength: number;
  private half = 0;
  private lastForce = 0;

  constructor(
    private readonly scene: Scene,
    private readonly damper: Damper,
  ) {
    const parts = damper.kind === 'linear' ? damper.between.map((end) => end.of) : [...damper.between].reverse();
    const [a, b] = parts.map((id) => partIndex(scene, id)) as [number, number];
    this.row = new AxisRow(partInner(scene, a), partInner(scene, b));
    const { force, speed, energy, time } = scene.scale;
    const unit = damper.kind === 'linear' ? force / speed ** damper.exponent : energy * time ** damper.exponent;
    this.coefficient = damper.coefficient / unit;
    this.ends =
      damper.kind === 'linear' ? [anchorOf(scene, damper.between[0]), anchorOf(scene, damper.between[1])] : null;
    const booked = scene.books.open('damper', damper.id, PairAccount.bodies(scene.ids, a, b), { heat: true });
    this.account = new PairAccount(booked, a, b);
    this.row.turn();
    this.drawnLength = this.ends ? this.lengthOf(this.ends) : 0;
  }

  private lengthOf([from, to]: [Anchor, Anchor]): number {
    anchorAt(this.scene, from, this.pointA);
    anchorAt(this.scene, to, this.pointB);
    return Math.hypot(this.pointB.x - this.pointA.x, this.pointB.y - this.pointA.y);
  }

  prepare(half: number, ratio: number): void {
    this.half = half;
    if (this.ends) {
      const length = this.lengthOf(this.ends);
      const scale = length > 0 ? 1 / length : 0;
      const { pointA: p, pointB: q } = this;
      this.row.aimBetween((q.x - p.x) * scale, (q.y - p.y) * scale, p.x, p.y, q.x, q.y);
    }
    this.row.start(this.row.impulse * ratio);
  }

  solve(): void {
    const { row, half, coefficient } = this;
    if (row.mass === 0) return;
    const free = row.rate() - row.impulse / row.mass;
    const next = this.isIdle(free)
      ? 0
      : -half * coefficient * lawRate(free, half * coefficient, row.mass, this.damper.exponent);
    row.apply(next - row.impulse);
    row.impulse = next;
  }

  private isIdle(rate: number): boolean {
    const { acts } = this.damper;
    return (acts === 'compression' && rate > 0) || (acts === 'extension' && rate < 0);
  }

  book(half: number): void {
    const impulse = 2 * this.row.impulse;
    const onA = -impulse * this.row.rateA();
    const onB = impulse * this.row.rateB();
    this.account.add(onA, onB);
    this.account.heat(-(onA + onB));
    this.lastForce = half > 0 ? -this.row.impulse / half : 0;
  }

  reading(): LinkReading {
    const { length, force, energy } = this.scene.scale;
    if (!this.ends) return { deflection: 0, force: this.lastForce * energy };
    return { deflection: (this.lengthOf(this.ends) - this.drawnLength) * length, force: this.lastForce * force };
  }
}

/** |u|ᵖ sgn u at the rate u that solves u + (c/m)·|u|ᵖ sgn u = u_free. */
function lawRate(free: number, strength: number, mass: number, exponent: number): number {
  const size = Math.abs(free);
  const c = strength / mass;
  let u = size / (1 + c);
  if (exponent === 2) u = (2 * size) / (1 + Math.sqrt(1 + 4 * c * size));
  else if (exponent !== 1) u = newton(size, c, exponent);
  return Math.sign(free) * u ** exponent;
}

/** Root of u + c uᵖ = size in [0, size], by Newton's method held in its bracket. */
function newton(size: number, c: number, p: number): number {
  let [low, high] = [0, size];
  let u = size / (1 + c);
  for (let i = 0; i < 60; i += 1) {
    const f = u + c * u ** p - size;
    if (f > 0) high = u;
    else low = u;
    const next = u - f / (1 + c * p * u ** (p - 1));
    const held = next > low && next < high ? next : (low + high) / 2;
    if (Math.abs(held - u) <= 1e-16 * size) return held;
    u = held;
  }
  return u;
}
