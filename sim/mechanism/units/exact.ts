/** An exact number n/d · π^pi. Quantities are converted in it, so that "35 mm" is the double nearest to 0.035. */
export interface Exact {
  n: bigint;
  d: bigint;
  pi: number;
}

export const one: Exact = { n: 1n, d: 1n, pi: 0 };

export const times = (a: Exact, b: Exact): Exact => ({ n: a.n * b.n, d: a.d * b.d, pi: a.pi + b.pi });

export const over = (a: Exact, b: Exact): Exact =>
  times(a, b.n < 0n ? { n: -b.d, d: -b.n, pi: -b.pi } : { n: b.d, d: b.n, pi: -b.pi });

export function power(a: Exact, exponent: number): Exact {
  const base = exponent < 0 ? over(one, a) : a;
  const e = BigInt(Math.abs(exponent));
  return { n: base.n ** e, d: base.d ** e, pi: base.pi * Math.abs(exponent) };
}

/** Sum of two with the same power of π. */
export const plus = (a: Exact, b: Exact): Exact => ({ n: a.n * b.d + b.n * a.d, d: a.d * b.d, pi: a.pi });

/** The value of decimal digits such as "-12.5e-3"; the exponent must be within ±9999. */
export function decimal(text: string): Exact {
  const [mantissa, exponent = '0'] = text.toLowerCase().split('e');
  const [whole, fraction = ''] = mantissa.split('.');
  const n = BigInt(whole.replace('+', '') + fraction || '0');
  const shift = Number(exponent) - fraction.length;
  const signed = mantissa.startsWith('-') && n > 0n ? -n : n;
  return shift >= 0
    ? { n: signed * 10n ** BigInt(shift), d: 1n, pi: 0 }
    : { n: signed, d: 10n ** BigInt(-shift), pi: 0 };
}

/** π to 60 digits, as numerator over 10^59 (any table of constants). */
const PI_DIGITS = 314159265358979323846264338327950288419716939937510582097494n;
const pi: Exact = { n: PI_DIGITS, d: 10n ** 59n, pi: 0 };

/** The nearest double, rounded once, half to even (π taken to 60 digits); ±Infinity beyond the range of doubles. */
export function toDouble(value: Exact): number {
  const { n, d } = value.pi === 0 ? value : times({ ...value, pi: 0 }, power(pi, value.pi));
  if (n === 0n) return 0;
  const size = n < 0n ? -n : n;
  const shift = 66 - (bitLength(size) - bitLength(d));
  const top = shift > 0 ? size << BigInt(shift) : size;
  const bottom = shift > 0 ? d : d << BigInt(-shift);
  // 66 or 67 bits of quotient, and one more that says whether anything was left over: enough to round once and rightly.
  const quotient = ((top / bottom) << 1n) | (top % bottom === 0n ? 0n : 1n);
  const double = scaleByPowerOfTwo(Number(quotient), -shift - 1);
  return n < 0n ? -double : double;
}

function bitLength(value: bigint): number {
  return value.toString(2).length;
}

/** x · 2^k in steps that neither overflow nor vanish on the way. */
function scaleByPowerOfTwo(x: number, k: number): number {
  let scaled = x;
  let left = k;
  while (left < -1000) {
    scaled *= 2 ** -1000;
    left += 1000;
  }
  while (left > 1000) {
    scaled *= 2 ** 1000;
    left -= 1000;
  }
  return scaled * 2 ** left;
}
