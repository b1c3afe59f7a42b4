/**
 * Uniform random numbers from a seed: the same sequence on every machine. Two 32-bit words of xoshiro128** (Blackman and
 * Vigna, 2018, public domain) make one number; the state is filled from the seed by splitmix32.
 */
export class Random {
  private readonly state = new Uint32Array(4);

  /** @param seed any number; its 32-bit integer part is used */
  constructor(seed: number) {
    let word = seed | 0;
    for (let i = 0; i < 4; i += 1) {
      word = (word + 0x9e3779b9) | 0;
      let mixed = Math.imul(word ^ (word >>> 16), 0x21f0aaad);
      mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
      this.state[i] = mixed ^ (mixed >>> 15);
    }
  }

  /** Uniform in [0, 1), a multiple of 2⁻⁵³. */
  next(): number {
    const high = this.word() >>> 5;
    const low = this.word() >>> 6;
    return (high * 0x4000000 + low) / 0x20000000000000;
  }

  /** Uniform between `from` and `to`. */
  between(from: number, to: number): number {
    return from + (to - from) * this.next();
  }

  /** Standard normal, by Box and Muller (1958); the second of each pair is not kept, so that draws do not depend on history. */
  normal(): number {
    const radius = Math.sqrt(-2 * Math.log(1 - this.next()));
    return radius * Math.cos(2 * Math.PI * this.next());
  }

  private word(): number {
    const s = this.state;
    const result = Math.imul(rotate(Math.imul(s[1], 5), 7), 9);
    const shifted = s[1] << 9;
    s[2] ^= s[0];
    s[3] ^= s[1];
    s[1] ^= s[2];
    s[0] ^= s[3];
    s[2] ^= shifted;
    s[3] = rotate(s[3], 11);
    return result >>> 0;
  }
}

const rotate = (value: number, by: number): number => (value << by) | (value >>> (32 - by));
