import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { box, disc, floor } from '../../../support/parts.js';
import type { Parts } from '../../../support/run.js';
import { assembled, coursesNear } from '../motions.js';

const pair = [
  box('a', [0.2, 0.1], [0.4, 0.2], 2, { angle: 0.3 }),
  box('b', [0.9, 0.3], [0.3, 0.3], 3, { angle: -0.5 }),
];
const between = [
  { of: 'a', at: [0.25, 0.15] },
  { of: 'b', at: [0.8, 0.35] },
];
const linear = (more: Parts): Parts => ({ id: 's', kind: 'linear', between, rate: 40, ...more });

const springs: [string, Parts][] = [
  ['a linear spring', linear({ freeLength: 0.4 })],
  ['one that acts in compression, pressed', linear({ freeLength: 0.9, acts: 'compression' })],
  ['one that acts in compression, free', linear({ freeLength: 0.3, acts: 'compression' })],
  ['one that acts in extension, pulled', linear({ freeLength: 0.3, acts: 'extension' })],
  [
    'a curve, above its free length',
    {
      id: 's',
      kind: 'linear',
      between,
      freeLength: 0.3,
      curve: [
        [-0.5, -90],
        [0, 0],
        [0.2, 20],
        [0.5, 110],
      ],
    },
  ],
  [
    'a curve that does not pass through nil, below its free length',
    {
      id: 's',
      kind: 'linear',
      between,
      freeLength: 0.9,
      curve: [
        [-0.8, -70],
        [-0.1, 5],
        [0.3, 8],
      ],
    },
  ],
  ['a torsion spring', { id: 's', kind: 'torsion', between: ['a', 'b'], rate: 7, freeAngle: 0.4 }],
  ['a torsion spring on the ground', { id: 's', kind: 'torsion', between: ['ground', 'b'], rate: 7, freeAngle: -0.4 }],
];

const H = 1e-5;

/** −∂V/∂q by central differences. */
function gradient(energy: (q: Float64Array) => number, q: Float64Array): number[] {
  return Array.from(q, (_, i) => {
    const moved = (by: number): Float64Array => q.map((x, k) => (k === i ? x + by : x));
    return -(energy(moved(H)) - energy(moved(-H))) / (2 * H);
  });
}

describe.each(springs)('the force of %s', (_, spring) => {
  const assembly = assembled({ bodies: pair, springs: [spring] });
  const [parts] = assembly.springs;

  it('is −∂V/∂q of its stored energy', () => {
    fc.assert(
      fc.property(coursesNear(assembly), ({ q, v }) => {
        const expected = gradient((at) => parts.energy(at), q);
        const force = new Float64Array(q.length);
        parts.force.update(q, v, 0);
        parts.force.row.addForce(force, parts.force.size);
        expected.forEach((value, i) => expect(force[i]).toBeCloseTo(value, 6));
      }),
      { numRuns: 60 },
    );
  });
});

describe('the force of a pressed compliant point without damping', () => {
  const assembly = assembled({
    bodies: [disc('ball', [0.1, 0.09], 0.1, 2)],
    tracks: [floor],
    contacts: [{ between: ['ball', 'floor'], stiffness: 500 }],
  });
  const [soft] = assembly.soft;

  it('is −∂V/∂q of what its spring holds', () => {
    soft.isPressed = true;
    fc.assert(
      fc.property(coursesNear(assembly, 1e-5), ({ q, v }) => {
        const energy = (at: Float64Array): number => {
          soft.point.locate(at);
          return soft.energy();
        };
        const expected = gradient(energy, q);
        soft.update(q, v, 0);
        const force = new Float64Array(q.length);
        soft.addForce(force);
        expected.forEach((value, i) => expect(force[i]).toBeCloseTo(value, 6));
      }),
      { numRuns: 60 },
    );
  });
});

describe('the weight of bodies', () => {
  it('is −∂V/∂q of what gravity has stored', () => {
    const assembly = assembled({ gravity: [1, -9.81], bodies: pair });
    const { dynamics, gravity, system } = assembly;
    const q = system.startPositions;
    const energy = (at: Float64Array): number =>
      -gravity.reduce((sum, _, i) => {
        const [gx, gy] = system.mechanism.gravity;
        return sum + system.mass[3 * i] * (gx * at[3 * i] + gy * at[3 * i + 1]);
      }, 0);
    dynamics.accelerate(0, q, new Float64Array(q.length));
    gradient(energy, q).forEach((value, i) => {
      expect(dynamics.acceleration[i] * system.mass[i]).toBeCloseTo(value, 6);
    });
  });
});

describe('dampers', () => {
  it.each([
    ['along a line', { id: 'd', between, coefficient: 3 }],
    ['along a line, of exponent 2', { id: 'd', between, coefficient: 3, exponent: 2 }],
    ['about a turn', { id: 'd', between: ['a', 'b'], coefficient: 3 }],
  ])('%s take power at any velocity, c |u|ᵖ⁺¹, and put none in', (_, damper) => {
    const assembly = assembled({ bodies: pair, dampers: [damper] });
    const [parts] = assembly.dampers;
    fc.assert(
      fc.property(coursesNear(assembly), ({ q, v }) => {
        parts.force.update(q, v, 0);
        const u = parts.force.row.rate(v);
        expect(parts.force.size * u).toBeLessThanOrEqual(0);
        const once = parts.force.size;
        parts.force.update(
          q,
          v.map((x) => 2 * x),
          0,
        );
        // Twice the rate, 2ᵖ times the force.
        const exponent = 'exponent' in damper ? damper.exponent : 1;
        expect(parts.force.size).toBeCloseTo(once * 2 ** (exponent ?? 1), 10);
      }),
      { numRuns: 60 },
    );
  });
});
