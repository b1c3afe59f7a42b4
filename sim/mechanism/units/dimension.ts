/** Exponents of length, mass, time and plane angle. Angle is kept apart so that a length is no angle and a torque no rate. */
export type Dimension = readonly [length: number, mass: number, time: number, angle: number];

export const dimensionless: Dimension = [0, 0, 0, 0];

export const multiplyDimensions = (a: Dimension, b: Dimension, power = 1): Dimension => [
  a[0] + power * b[0],
  a[1] + power * b[1],
  a[2] + power * b[2],
  a[3] + power * b[3],
];

export const sameDimension = (a: Dimension, b: Dimension): boolean => a.every((exponent, i) => exponent === b[i]);

/**
 * True where a unit of dimension `given` may stand for a quantity of dimension `wanted`: the same, or the same but for
 * a radian left out of a compound unit (N m for N m/rad, 1/s for rad/s), which the SI allows.
 */
export function fits(given: Dimension, wanted: Dimension): boolean {
  if (sameDimension(given, wanted)) return true;
  const isCompound = wanted[0] !== 0 || wanted[1] !== 0 || wanted[2] !== 0;
  return isCompound && given[3] === 0 && sameDimension(given, [wanted[0], wanted[1], wanted[2], 0]);
}

/** What a quantity is, in words, with the units it is shown in: SI first, then those of the shop floor. */
export interface QuantityKind {
  dimension: Dimension;
  /** "a length" */
  says: string;
  si: string;
  /** Display units in rising order of size. */
  display: readonly string[];
  example: string;
}

const kind = (
  dimension: Dimension,
  says: string,
  si: string,
  display: readonly string[],
  example: string,
): QuantityKind => ({ dimension, says, si, display, example });

export const quantityKinds = {
  number: kind(dimensionless, 'a number', '', [''], '0.3'),
  length: kind([1, 0, 0, 0], 'a length', 'm', ['um', 'mm', 'm'], '25 mm'),
  angle: kind([0, 0, 0, 1], 'an angle', 'rad', ['deg'], '30 deg'),
  time: kind([0, 0, 1, 0], 'a time', 's', ['us', 'ms', 's'], '0.2 s'),
  mass: kind([0, 1, 0, 0], 'a mass', 'kg', ['g', 'kg', 't'], '2.5 kg'),
  inertia: kind([2, 1, 0, 0], 'a moment of inertia', 'kg m^2', ['kg mm^2', 'kg m^2'], '0.02 kg m^2'),
  density: kind([-3, 1, 0, 0], 'a density', 'kg/m^3', ['kg/m^3'], '7850 kg/m^3'),
  speed: kind([1, 0, -1, 0], 'a speed', 'm/s', ['mm/s', 'm/s'], '1.2 m/s'),
  spin: kind([0, 0, -1, 1], 'a speed of rotation', 'rad/s', ['rpm'], '30 rpm'),
  acceleration: kind([1, 0, -2, 0], 'an acceleration', 'm/s^2', ['m/s^2'], '9.80665 m/s^2'),
  force: kind([1, 1, -2, 0], 'a force', 'N', ['mN', 'N', 'kN', 'MN'], '40 N'),
  torque: kind([2, 1, -2, 0], 'a torque', 'N m', ['N mm', 'N m', 'kN m'], '2 N m'),
  energy: kind([2, 1, -2, 0], 'an energy', 'J', ['mJ', 'J', 'kJ', 'MJ'], '12 J'),
  power: kind([2, 1, -3, 0], 'a power', 'W', ['mW', 'W', 'kW', 'MW'], '250 W'),
  rate: kind([0, 1, -2, 0], 'a spring rate', 'N/m', ['N/m', 'N/mm', 'kN/mm'], '12.5 N/mm'),
  torsionRate: kind([2, 1, -2, -1], 'a torsional rate', 'N m/rad', ['N mm/rad', 'N m/rad'], '2 N m/rad'),
  damping: kind([0, 1, -1, 0], 'a damping coefficient', 'N s/m', ['N s/m', 'N s/mm'], '40 N s/m'),
  torsionDamping: kind(
    [2, 1, -1, -1],
    'a rotary damping coefficient',
    'N m s/rad',
    ['N mm s/rad', 'N m s/rad'],
    '0.5 N m s/rad',
  ),
  stress: kind([-1, 1, -2, 0], 'a stress or modulus', 'Pa', ['Pa', 'kPa', 'MPa', 'GPa'], '81.5 GPa'),
} as const satisfies Record<string, QuantityKind>;

export type QuantityName = keyof typeof quantityKinds;

/** The dimension as a product of base units, for messages: "kg m^2/s^2". */
export function dimensionText(dimension: Dimension): string {
  const names = ['m', 'kg', 's', 'rad'] as const;
  const order = [1, 0, 2, 3] as const;
  const part = (sign: 1 | -1): string[] =>
    order.filter((i) => sign * dimension[i] > 0).map((i) => powered(names[i], Math.abs(dimension[i])));
  const above = part(1);
  const below = part(-1);
  if (below.length === 0) return above.join(' ') || 'no unit';
  const divisor = below.length > 1 ? `(${below.join(' ')})` : below[0];
  return `${above.join(' ') || '1'}/${divisor}`;
}

const powered = (name: string, power: number): string => (power === 1 ? name : `${name}^${power}`);
