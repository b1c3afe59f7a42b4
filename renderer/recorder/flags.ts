/** Which way the pennants fly, so that those close together don't cover each other: +1 right, −1 left. */
export function flagSides(xs: readonly number[]): (1 | -1)[] {
  const room = 22;
  const sides: (1 | -1)[] = [];
  xs.forEach((x, i) => {
    const next = xs[i + 1] ?? Infinity;
    const before = i === 0 ? -Infinity : xs[i - 1] + (sides[i - 1] === 1 ? room : 0);
    sides.push(next - x < 2 * room && x - before >= room ? -1 : 1);
  });
  return sides;
}
