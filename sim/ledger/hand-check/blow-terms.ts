import type { Term } from './cause.js';
import { massFactors, massShape } from './causes/gravity.js';
import { quantity } from './figures.js';
import type { Blow } from './happenings.js';
import type { Scene } from './scene.js';
import { kinetic, type Mover } from './stage.js';
import { fraction, joined, number, operator, symbol, words, type Expression, type Token } from './tokens.js';

const half = (): Token => fraction([number('1')], [number('2')]);

/** ½ m u² (1 − e²), or ½ I_O u² (1 − e²) about a pin: what a blow on something fixed takes. */
export function lossTerm(scene: Scene, of: string[], mover: Mover, u: number, e: number, { row }: Blow): Term {
  const isPin = mover.kind === 'pin';
  const name = isPin ? 'ω.u' : 'u';
  const measure = isPin
    ? [{ name: 'I_O', value: mover.measure, kind: 'inertia' as const, joins: 'last' as const, of: mover.members }]
    : massFactors(scene, mover.members);
  return {
    key: `blow ${row}`,
    family: 'blow',
    value: -kinetic(mover, u) * (1 - e * e),
    factors: [
      ...measure,
      { name, value: u, kind: isPin ? 'spin' : 'speed', joins: 'last' },
      ...(e === 0 ? [] : [{ name: 'e', value: e, kind: 'ratio' as const, joins: 'last' as const, of }]),
    ],
    shape: (factor) => [
      half(),
      ...(isPin ? [factor('I_O')] : massShape(mover.members, factor)),
      squared(factor(name)),
      ...(e === 0 ? [] : [operator('('), number('1'), operator('−'), squared(factor('e')), operator(')')]),
    ],
  };
}

/** ½ m₁ m₂ / (m₁ + m₂) u²: what two bodies lose that go on as one. */
export function jointLossTerm(
  scene: Scene,
  bodies: [string, string],
  of: string[],
  u: number,
  loss: number,
  { row }: Blow,
): Term {
  return {
    key: `blow ${row}`,
    family: 'blow',
    value: -loss,
    factors: [...massFactors(scene, bodies), { name: 'u', value: u, kind: 'speed', joins: 'last', of }],
    shape: (factor) => [
      half(),
      fraction(
        bodies.flatMap((id) => [factor(`m:${id}`)]),
        massShape(bodies, factor).slice(1, -1),
      ),
      squared(factor('u')),
    ],
  };
}

const squared = (token: Token): Token => (token.kind === 'symbol' ? { ...token, power: 2 } : token);

/** v′ = (m₁ u₁ + m₂ u₂ − m₂ e (u₁ − u₂)) / (m₁ + m₂), of two bodies that strike each other square. */
export function reboundLine(
  mark: string,
  m: number,
  n: number,
  mine: number,
  yours: number,
  e: number,
  rebound: number,
): Expression {
  const sign = Math.sign(mine || yours) || 1;
  const [u1, u2] = [symbol('u', { sub: '1' }), symbol('u', { sub: '2' })];
  const [m1, m2] = [symbol('m', { sub: '1' }), symbol('m', { sub: '2' })];
  const bounce = [operator('−'), m2, symbol('e'), operator('('), u1, operator('−'), u2, operator(')')];
  const over = [m1, u1, operator('+'), m2, u2, ...(e > 0 ? bounce : [])];
  const values: [Token, Token][] = [
    [m1, quantity(m, 'mass')],
    [m2, quantity(n, 'mass')],
    [u1, quantity(sign * mine, 'speed')],
    [u2, quantity(sign * yours, 'speed')],
    ...(e > 0 ? [[symbol('e'), quantity(e, 'ratio')] as [Token, Token]] : []),
  ];
  return [
    symbol('v', { sub: mark }),
    operator('='),
    fraction(over, [m1, operator('+'), m2]),
    operator('='),
    quantity(sign * rebound, 'speed'),
    words('with'),
    ...joined(
      values.map(([name, value]) => [name, operator('='), value]),
      operator(','),
    ),
  ];
}
