/**
 * Round numbers to whole units so that the rounded ones add up to a given whole number, each at the floor or the
 * ceiling of its own: the largest remainder method (Hamilton's apportionment). Where the floors and ceilings cannot
 * reach the total, what is left over is given back, to be printed as a rounding line of its own.
 *
 * @param values finite numbers, in units of the last printed digit
 * @param total the whole number they are to add up to
 */
export function apportion(values: readonly number[], total: number): { parts: number[]; left: number } {
  const parts = values.map((value) => Math.floor(settle(value)));
  const remainders = values.map((value, i) => ({ i, remainder: settle(value) - parts[i] }));
  const raisable = remainders
    .filter(({ remainder }) => remainder > 0)
    .sort((a, b) => b.remainder - a.remainder || a.i - b.i);
  let left = total - parts.reduce((sum, part) => sum + part, 0);
  for (const { i } of raisable.slice(0, Math.max(0, left))) {
    parts[i] += 1;
    left -= 1;
  }
  return { parts, left };
}

/** How near counts as equal when rounding: far above the rounding of a double, far below a printed digit. */
const NEAR = 1e-6;

/**
 * Round to the nearest whole number, halves up, so that adding a whole number before or after makes no difference; a
 * value within `NEAR` below a half counts as the half, so that the last bit of a double makes none either.
 */
export function roundHalfUp(value: number): number {
  return Math.floor(value + 0.5 + NEAR);
}

/** A value within `NEAR` of a whole number is that number: 2.9999999999 units are 3, and 1e-13 of one is none. */
function settle(value: number): number {
  const nearest = Math.round(value);
  return Math.abs(value - nearest) < NEAR ? nearest : value;
}
