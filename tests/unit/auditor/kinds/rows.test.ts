import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Row } from '../../../../sim/auditor/row.js';
import { disc, particle } from '../../../support/parts.js';
import type { Parts } from '../../../support/run.js';
import { assembled, bend, coursesNear, expectNear, positionAt, slope, velocityAt } from '../motions.js';

/** What differences may be off by: they have nine digits of a rate, six of an acceleration. */
const [RATE, BEND] = [1e-8, 1e-5];

/** Two bodies whose parts reach everywhere. */
const body = (id: string, at: [number, number], angle: number, mass: number): Parts => ({
  id,
  shape: { kind: 'none' },
  mass,
  inertia: 0.1 * mass,
  at,
  angle,
});
const pair = [body('a', [0.2, 0.1], 0.3, 2), body('b', [0.9, 0.3], -0.5, 3)];
const on = (of: string, x: number, y: number): Parts => ({ of, at: [x, y] });

const joints: [string, Parts[], Parts][] = [
  ['a pin of two bodies', pair, { id: 'j', kind: 'pin', between: ['a', 'b'], at: [0.5, 0.2] }],
  ['a pin on the ground', pair, { id: 'j', kind: 'pin', between: ['ground', 'a'], at: [0, 0] }],
  ['a slide of two bodies', pair, { id: 'j', kind: 'slide', between: ['a', 'b'], at: [0.5, 0.2], axis: [0.8, 0.6] }],
  ['a slide on the ground', pair, { id: 'j', kind: 'slide', between: ['b', 'ground'], at: [0.5, 0.2], axis: [0, 1] }],
  ['a weld', pair, { id: 'j', kind: 'weld', between: ['b', 'a'] }],
  [
    'a massless link of a particle to a body',
    [particle('p', [1, 1], 1), ...pair],
    { id: 'j', kind: 'pin', between: ['p', 'a'], at: [0.2, 0.3] },
  ],
  [
    'a massless link of a particle, named second',
    [particle('p', [1, 1], 1), ...pair],
    { id: 'j', kind: 'pin', between: ['ground', 'p'], at: [0.2, 0.3] },
  ],
];

describe.each(joints)('the rows of %s', (_, bodies, joint) => {
  const assembly = assembled({ bodies, joints: [joint] });
  const [parts] = assembly.joints;

  it('give rate and acceleration of its errors along any motion', () => {
    fc.assert(
      fc.property(coursesNear(assembly), (course) => {
        const errorAt = (k: number, t: number): number => {
          parts.update(positionAt(course, t), velocityAt(course, t));
          return parts.errors[k];
        };
        parts.update(course.q, course.v);
        const found = parts.rows.map((row) => [row.rate(course.v), row.rate(course.a) + row.gamma]);
        found.forEach(([rate, acceleration], k) => {
          expectNear(
            rate,
            slope((t) => errorAt(k, t)),
            RATE,
          );
          expectNear(
            acceleration,
            bend((t) => errorAt(k, t)),
            BEND,
          );
        });
      }),
      { numRuns: 60 },
    );
  });

  it('have no error where it is drawn', () => {
    const q = assembly.system.startPositions;
    parts.update(q, new Float64Array(q.length));
    for (const error of parts.errors) expect(Math.abs(error)).toBeLessThan(1e-15);
  });
});

describe.each(joints.filter(([, , { kind }]) => kind !== 'weld').slice(0, 4))(
  'the free motion of %s',
  (_, bodies, joint) => {
    const limits = { from: -0.3, to: 0.4, restitution: 0.5 };
    const assembly = assembled({ bodies, joints: [{ ...joint, limits }] });
    const [parts] = assembly.joints;

    it('has the rate and acceleration of its position', () => {
      const row = new Row();
      fc.assert(
        fc.property(coursesNear(assembly), (course) => {
          parts.aimFreedom(row, course.q, course.v);
          const [rate, acceleration] = [row.rate(course.v), row.rate(course.a) + row.gamma];
          const at = (t: number): number => parts.position(positionAt(course, t));
          expectNear(rate, slope(at), RATE);
          expectNear(acceleration, bend(at), BEND);
        }),
        { numRuns: 60 },
      );
    });

    it('is held between its stops: their gaps and rows are those of the distance to them', () => {
      fc.assert(
        fc.property(coursesNear(assembly), (course) => {
          const [low, high] = parts.stops;
          for (const stop of [low, high]) {
            const at = (t: number): number => {
              stop.locate(positionAt(course, t));
              return stop.gap;
            };
            const [rate, acceleration] = [slope(at), bend(at)];
            stop.locate(course.q);
            stop.aim(course.q, course.v, 0);
            expectNear(stop.rate(course.v), rate, RATE);
            expectNear(stop.normal.rate(course.a) + stop.normal.gamma, acceleration, BEND);
          }
          const { length } = assembly.system.units;
          const span = 0.7 / (parts.kind === 'slide' ? length : 1);
          expect(low.gap + high.gap).toBeCloseTo(span, 12);
        }),
        { numRuns: 60 },
      );
    });
  },
);

describe('the row of a rope', () => {
  const assembly = assembled({
    bodies: [...pair, disc('c', [2, 0], 0.1, 1)],
    joints: [
      {
        id: 'rope',
        kind: 'rope',
        through: [on('a', 0.2, 0.2), on('ground', 0.5, 1.5), on('b', 0.9, 0.4), on('ground', 1.5, 1), on('c', 2, 0.1)],
      },
    ],
  });
  const [rope] = assembly.dynamics.parts.unilaterals;

  it('gives rate and acceleration of what is left of its length, over pulleys on the ground and on a body', () => {
    fc.assert(
      fc.property(coursesNear(assembly), (course) => {
        const at = (t: number): number => {
          rope.locate(positionAt(course, t));
          return rope.gap;
        };
        const [rate, acceleration] = [slope(at), bend(at)];
        rope.locate(course.q);
        rope.aim(course.q, course.v, 0);
        expectNear(rope.rate(course.v), rate, RATE);
        expectNear(rope.normal.rate(course.a) + rope.normal.gamma, acceleration, BEND);
      }),
      { numRuns: 60 },
    );
  });

  it('is taut as drawn', () => {
    rope.locate(assembly.system.startPositions);
    expect(Math.abs(rope.gap)).toBeLessThan(1e-15);
  });
});
