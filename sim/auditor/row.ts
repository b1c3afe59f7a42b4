/**
 * One scalar constraint or line of force in the coordinates (x, y, θ of every body): its rate is J·v and its acceleration
 * J·a + γ. A force λ along it acts on the bodies with Jᵀλ.
 */
export class Row {
  readonly index: number[] = [];
  readonly value: number[] = [];
  /** The part of the acceleration that velocities alone make. */
  gamma = 0;

  clear(): this {
    this.index.length = 0;
    this.value.length = 0;
    this.gamma = 0;
    return this;
  }

  add(index: number, value: number): void {
    this.index.push(index);
    this.value.push(value);
  }

  /**
   * Adds the motion along (nx, ny) of a point at (rx, ry) from the mass centre of a body, times `sign`. The ground (−1)
   * adds nothing.
   */
  addPoint(body: number, nx: number, ny: number, rx: number, ry: number, sign: number): void {
    if (body < 0) return;
    this.add(3 * body, sign * nx);
    this.add(3 * body + 1, sign * ny);
    this.add(3 * body + 2, sign * (rx * ny - ry * nx));
  }

  /** Adds the turn of a body. */
  addTurn(body: number, sign: number): void {
    if (body >= 0) this.add(3 * body + 2, sign);
  }

  rate(v: Float64Array): number {
    let sum = 0;
    for (let k = 0; k < this.index.length; k += 1) sum += this.value[k] * v[this.index[k]];
    return sum;
  }

  /** J·M⁻¹·Dᵀ with another row. */
  coupling(other: Row, inverseMass: Float64Array): number {
    let sum = 0;
    for (let k = 0; k < this.index.length; k += 1) {
      const i = this.index[k];
      for (let j = 0; j < other.index.length; j += 1) {
        if (other.index[j] === i) sum += this.value[k] * other.value[j] * inverseMass[i];
      }
    }
    return sum;
  }

  /** Adds Jᵀ·λ·scale to a vector of generalised forces. */
  addForce(force: Float64Array, lambda: number): void {
    for (let k = 0; k < this.index.length; k += 1) force[this.index[k]] += this.value[k] * lambda;
  }

  /** Adds M⁻¹·Jᵀ·λ to a vector of velocities or accelerations. */
  addImpulse(v: Float64Array, lambda: number, inverseMass: Float64Array): void {
    for (let k = 0; k < this.index.length; k += 1) {
      const i = this.index[k];
      v[i] += this.value[k] * lambda * inverseMass[i];
    }
  }
}
