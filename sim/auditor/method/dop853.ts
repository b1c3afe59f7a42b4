import { DENSE, ERROR_5, NODES, STAGES, THIRD_ORDER } from './coefficients.js';

/** Writes the derivative of y at t into dy. */
export type Derivative = (t: number, y: Float64Array, dy: Float64Array) => void;

const STAGE_COUNT = 16;
const SOLUTION = 12;

/**
 * One-step machinery of DOP853 (see coefficients.ts): a trial step with its error, and the continuous extension of the last
 * one. Step control is the caller's. Order 8; the interpolant is of order 7.
 */
export class Dop853 {
  /** End of the last trial step. */
  readonly end: Float64Array;
  /** Derivative at its start and (after `finish`) at its end. */
  readonly k: Float64Array[];
  evaluations = 0;
  private readonly stage: Float64Array;
  private readonly dense: Float64Array[];
  private start: Float64Array;
  private t = 0;
  private h = 0;
  private hasDense = false;

  constructor(
    private readonly derivative: Derivative,
    readonly size: number,
  ) {
    const column = (): Float64Array => new Float64Array(size);
    this.end = column();
    this.stage = column();
    this.start = column();
    this.k = Array.from({ length: STAGE_COUNT }, column);
    this.dense = Array.from({ length: 7 }, column);
  }

  private evaluate(t: number, y: Float64Array, into: Float64Array): void {
    this.evaluations += 1;
    this.derivative(t, y, into);
  }

  /** Takes a new state as the start of the next step. */
  restart(t: number, y: Float64Array): void {
    this.t = t;
    this.start.set(y);
    this.evaluate(t, this.start, this.k[0]);
  }

  /**
   * Tries a step of h from the start; its end is in `end`.
   * @param scale what one unit of error is worth in each component
   * @returns the error in units of `scale` (accept below 1); NaN where the state ran out of numbers
   */
  try(h: number, scale: Float64Array): number {
    this.h = h;
    this.hasDense = false;
    const { k, stage, end, start } = this;
    for (let s = 1; s < SOLUTION; s += 1) {
      this.combine(STAGES[s], h, stage);
      this.evaluate(this.t + NODES[s] * h, stage, k[s]);
    }
    this.combine(STAGES[SOLUTION], h, end);
    let fifth = 0;
    let third = 0;
    for (let i = 0; i < this.size; i += 1) {
      let e5 = 0;
      for (const [s, c] of ERROR_5) e5 += c * k[s][i];
      let e3 = (end[i] - start[i]) / h;
      for (const [s, c] of THIRD_ORDER) e3 -= c * k[s][i];
      fifth += (e5 / scale[i]) ** 2;
      third += (e3 / scale[i]) ** 2;
    }
    if (fifth === 0 && third === 0) return 0;
    return (Math.abs(h) * fifth) / Math.sqrt((fifth + 0.01 * third) * this.size);
  }

  private combine(row: readonly (readonly [number, number])[], h: number, out: Float64Array): void {
    const { k, start, size } = this;
    out.set(start);
    for (const [s, c] of row) {
      const hc = h * c;
      const column = k[s];
      for (let i = 0; i < size; i += 1) out[i] += hc * column[i];
    }
  }

  /** Evaluates the derivative at the end of the accepted trial, which the interpolant needs. */
  finish(): void {
    this.evaluate(this.t + this.h, this.end, this.k[SOLUTION]);
  }

  /** Readies the interpolant of the last step (three more stages). */
  private prepareDense(): void {
    const { k, h, start, end, dense, size } = this;
    for (let s = 13; s < STAGE_COUNT; s += 1) {
      this.combine(STAGES[s], h, this.stage);
      this.evaluate(this.t + NODES[s] * h, this.stage, k[s]);
    }
    for (let i = 0; i < size; i += 1) {
      const difference = end[i] - start[i];
      dense[0][i] = difference;
      dense[1][i] = h * k[0][i] - difference;
      dense[2][i] = 2 * difference - h * (k[SOLUTION][i] + k[0][i]);
      for (let row = 0; row < 4; row += 1) {
        let sum = 0;
        for (const [s, c] of DENSE[row]) sum += c * k[s][i];
        dense[3 + row][i] = h * sum;
      }
    }
    this.hasDense = true;
  }

  /** State at a share θ of the last finished step, 0 to 1. */
  interpolate(theta: number, out: Float64Array): Float64Array {
    if (!this.hasDense) this.prepareDense();
    const { dense, start, size } = this;
    const rest = 1 - theta;
    for (let i = 0; i < size; i += 1) {
      let value = 0;
      for (let j = 6; j >= 0; j -= 1) value = (value + dense[j][i]) * (j % 2 === 0 ? theta : rest);
      out[i] = start[i] + value;
    }
    return out;
  }
}
