import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Assembly } from '../../../../sim/auditor/assembly.js';
import type { ContactPoint } from '../../../../sim/auditor/unilateral.js';
import { box, disc, particle } from '../../../support/parts.js';
import type { Parts } from '../../../support/run.js';
import { assembled, bend, coursesNear, expectNear, positionAt, slope, velocityAt, type Course } from '../motions.js';

/** What differences may be off by: they have eight digits of a rate, six of an acceleration. */
const [RATE, BEND] = [1e-7, 1e-5];

const wildcard = { contacts: [{ between: ['*', '*'], friction: 0.3 }] };
const arc = (bulge: number): Parts => ({ id: 'arc', from: [-1, 0], to: [{ to: [1, 0], bulge }], side: 'both' });
const spline: Parts = {
  id: 'spline',
  from: [-1, 0.3],
  to: [
    {
      through: [
        [-0.4, 0.05],
        [0, 0],
        [0.5, 0.12],
        [1, 0.4],
      ],
    },
  ],
  side: 'both',
};
const line: Parts = { id: 'line', from: [-2, -0.3], to: [{ to: [2, 0.5] }], side: 'both' };
const bar = (id: string, at: [number, number], more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'bar', length: 0.6, width: 0.1 },
  mass: 1,
  at,
  ...more,
});

/** Documents in which a point of the kind under test is near to touching, and which points those are. */
const cases: [string, Parts, (point: ContactPoint) => boolean][] = [
  [
    'a disc on a line',
    { bodies: [disc('body', [0.2, 0.35], 0.2, 1, { angle: 0.4 })], tracks: [line] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a particle on an arc, from within',
    { bodies: [particle('body', [0.3, -0.9], 1)], tracks: [arc(1)] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a disc on an arc, from outside',
    { bodies: [disc('body', [0.4, 1.05], 0.1, 1)], tracks: [arc(-1)] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a disc on a spline',
    { bodies: [disc('body', [0.25, 0.15], 0.1, 1, { centerOfMass: [0.03, 0.02] })], tracks: [spline] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a disc past the end of a line',
    { bodies: [disc('body', [2.1, 0.6], 0.1, 1)], tracks: [line] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a corner of a box on a line',
    { bodies: [box('body', [0, 0.38], [0.5, 0.3], 1, { angle: 0.7 })], tracks: [line] },
    (point) => point.constructor.name === 'RoundOnTrack',
  ],
  [
    'a disc on a face of a box',
    { bodies: [box('box', [0, 0], [1, 0.4], 2, { angle: 0.2 }), disc('body', [0.1, 0.45], 0.2, 1)] },
    (point) => point.constructor.name === 'RoundOnFace',
  ],
  [
    'a disc about a corner of a box',
    { bodies: [box('box', [0, 0], [1, 0.4], 2), disc('body', [0.65, 0.35], 0.2, 1)] },
    (point) => point.constructor.name === 'RoundOnFace',
  ],
  [
    'the round end of a bar on the side of another',
    { bodies: [bar('low', [0, 0]), bar('high', [0.05, 0.42], { angle: 1.4 })] },
    (point) => point.constructor.name === 'RoundOnFace',
  ],
  [
    'a corner of a box on a face of another',
    { bodies: [box('low', [0, 0], [1, 0.4], 2), box('high', [0.1, 0.5], [0.4, 0.4], 1, { angle: 0.75 })] },
    (point) => point.constructor.name === 'RoundOnFace',
  ],
  [
    'a corner of a track on a face',
    {
      bodies: [box('body', [0.05, 0.25], [1, 0.4], 2, { angle: 0.1 })],
      tracks: [{ id: 'edge', from: [0, -1], to: [{ to: [0, 0] }], side: 'left' }],
    },
    (point) => point.constructor.name === 'RoundOnFace' && point.bodyB === -1,
  ],
  [
    'two discs',
    { bodies: [disc('one', [0, 0], 0.2, 1, { centerOfMass: [0.05, 0] }), disc('other', [0.3, 0.35], 0.25, 2)] },
    (point) => point.constructor.name === 'RoundOnRound',
  ],
  [
    'a face on a bulge of an arc',
    { bodies: [box('body', [0.1, 1.2], [1, 0.4], 2, { angle: -0.1 })], tracks: [{ ...arc(-1), side: 'left' }] },
    (point) => point.constructor.name === 'FaceOnBulge',
  ],
];

/** The point of a case that is nearest to touching where it is drawn. */
function nearest(assembly: Assembly, isMeant: (point: ContactPoint) => boolean): ContactPoint {
  const q = assembly.system.startPositions;
  const points = assembly.points.filter((point) => {
    point.locate(q);
    return isMeant(point) && Number.isFinite(point.gap);
  });
  const [first] = points.sort((a, b) => Math.abs(a.gap) - Math.abs(b.gap));
  if (!first) throw new Error('no such point');
  return first;
}

describe.each(cases)('the rows of %s', (_, parts, isMeant) => {
  const assembly = assembled({ ...wildcard, ...parts });
  const point = nearest(assembly, isMeant);
  const gapAt = (course: Course, t: number): number => {
    point.locate(positionAt(course, t));
    return point.gap;
  };
  const aimAt = (course: Course, t: number): void => {
    const q = positionAt(course, t);
    point.locate(q);
    point.aim(q, velocityAt(course, t), 0);
  };

  it('are near to touching where it is drawn', () => {
    point.locate(assembly.system.startPositions);
    expect(Math.abs(point.gap)).toBeLessThan(0.2);
  });

  it('give the rate and the acceleration of the gap along any motion', () => {
    fc.assert(
      fc.property(coursesNear(assembly), (course) => {
        aimAt(course, 0);
        const [rate, acceleration] = [point.normal.rate(course.v), point.normal.rate(course.a) + point.normal.gamma];
        expectNear(
          rate,
          slope((t) => gapAt(course, t)),
          RATE,
        );
        expectNear(
          acceleration,
          bend((t) => gapAt(course, t)),
          BEND,
        );
      }),
      { numRuns: 60 },
    );
  });

  it('give the acceleration of the slip along any motion', () => {
    const slipAt = (course: Course, t: number): number => {
      aimAt(course, t);
      return point.slip(velocityAt(course, t));
    };
    fc.assert(
      fc.property(coursesNear(assembly), (course) => {
        aimAt(course, 0);
        expectNear(
          point.tangent.rate(course.a) + point.tangent.gamma,
          slope((t) => slipAt(course, t)),
          BEND,
        );
      }),
      { numRuns: 60 },
    );
  });

  it('give as slip the velocity of B’s matter at the point over that of A, along the tangent', () => {
    fc.assert(
      fc.property(coursesNear(assembly), (course) => {
        aimAt(course, 0);
        const matter = (body: number): [number, number] => {
          if (body < 0) return [0, 0];
          const [rx, ry] = [point.x - course.q[3 * body], point.y - course.q[3 * body + 1]];
          const w = course.v[3 * body + 2];
          return [course.v[3 * body] - w * ry, course.v[3 * body + 1] + w * rx];
        };
        // The point is known on one of the two surfaces, so that they must touch for this.
        const shift = -point.gap;
        const [ax, ay] = matter(point.bodyA);
        const [bx, by] = matter(point.bodyB);
        const spin = (body: number): number => (body < 0 ? 0 : Math.abs(course.v[3 * body + 2]));
        const slip = point.ny * (bx - ax) - point.nx * (by - ay);
        const slack = Math.abs(shift) * (spin(point.bodyA) + spin(point.bodyB)) + 1e-12;
        expect(Math.abs(point.slip(course.v) - slip)).toBeLessThanOrEqual(slack);
      }),
      { numRuns: 60 },
    );
  });
});
