import { describe, expect, it } from 'vitest';
import { add, rotate } from '../../../sim/core/vec.js';
import { buildTrack, trackGap } from '../../../sim/geometry/index.js';
import type { Body, Shape } from '../../../sim/mechanism/kinds/body.js';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import { altered, changed, mechanismOf, ramp } from './samples.js';

const shapes: Record<string, JsonObject> = {
  disc: { kind: 'disc', radius: '20 mm' },
  box: { kind: 'box', width: '60 mm', height: '40 mm' },
  bar: { kind: 'bar', length: '60 mm', width: '20 mm' },
  polygon: {
    kind: 'polygon',
    points: [
      ['-10 mm', '-5 mm'],
      ['30 mm', '-10 mm'],
      ['20 mm', '40 mm'],
    ],
  },
  particle: { kind: 'particle' },
};

const tracks: Record<string, JsonObject> = {
  'a ramp': { from: [0, '300 mm'], to: [{ to: ['400 mm', 0] }] },
  'the right side of a ramp': { from: ['400 mm', 0], to: [{ to: [0, '300 mm'] }], side: 'right' },
  'a hollow arc': { from: ['-200 mm', 0], to: [{ to: ['200 mm', 0], bulge: 0.4 }] },
  'a hump': { from: ['-200 mm', 0], to: [{ to: ['200 mm', 0], bulge: -0.4 }] },
  'a wave': {
    from: [0, 0],
    to: [
      {
        through: [
          ['100 mm', '30 mm'],
          ['200 mm', 0],
          ['300 mm', '30 mm'],
        ],
      },
    ],
  },
};

interface Laid {
  body: Body;
  /** Not below zero where the body goes nowhere in. */
  gap: number;
  /** The same after lowering the body by a thousandth of a millimetre, along its own y axis. */
  lowered: number;
}

function laid(shape: JsonObject, track: JsonObject, at: string): Laid {
  const document = changed(ramp(), 'bodies', 0, { shape, rest: { on: 'ramp', at } });
  const { bodies, tracks: made } = mechanismOf(altered(document, { tracks: [{ id: 'ramp', ...track }] }));
  const [body] = bodies;
  const path = buildTrack(made[0]);
  const down = rotate([0, -1e-6], body.angle);
  return { body, gap: trackGap(body, path).gap, lowered: trackGap({ ...body, at: add(body.at, down) }, path).gap };
}

describe('A body laid on a track', () => {
  for (const [where, track] of Object.entries(tracks)) {
    for (const [what, shape] of Object.entries(shapes)) {
      it(`touches it and goes nowhere in: a ${what} on ${where}`, () => {
        for (const at of ['90 mm', '140 mm', '200 mm']) {
          const { gap, lowered } = laid(shape, track, at);
          expect(gap).toBeGreaterThan(-1e-12);
          expect(lowered).toBeLessThan(-2e-7);
        }
      });
    }
  }

  it('lies square to a straight track, its origin over the place', () => {
    const { body } = laid(shapes.box, tracks['a ramp'], '100 mm');
    // Slope 3:4; the place is (80, 240) mm, the normal (0.6, 0.8), half the height 20 mm.
    expect(body.at[0]).toBeCloseTo(0.092, 15);
    expect(body.at[1]).toBeCloseTo(0.256, 15);
    expect(body.angle).toBeCloseTo(-Math.atan2(3, 4), 15);
  });

  it('is turned over on the right side of a track', () => {
    const { body } = laid(shapes.box, tracks['the right side of a ramp'], '400 mm');
    expect(body.at[0]).toBeCloseTo(0.092, 15);
    expect(body.at[1]).toBeCloseTo(0.256, 15);
    expect(body.angle).toBeCloseTo(-Math.atan2(3, 4), 15);
  });

  it('stands with both corners in a hollow, so that its middle is above it', () => {
    const arc = { from: ['-100 mm', 0], to: [{ to: ['100 mm', 0], bulge: 1 }] };
    const { body } = laid(shapes.box, arc, `${50 * Math.PI} mm`);
    // Half circle of 100 mm: the lower corners, 30 mm from the middle, are at depth √(100² − 30²).
    expect(body.at[1]).toBeCloseTo(-Math.sqrt(0.1 ** 2 - 0.03 ** 2) + 0.02, 12);
  });

  it('at a corner lies on the segment that begins there', () => {
    const document = changed(ramp(), 'bodies', 0, { shape: shapes.particle, rest: { on: 'ramp', at: '500 mm' } });
    expect(mechanismOf(document).bodies[0]).toMatchObject({ at: [0.4, 0], angle: 0 });
  });

  it('finds its place on a closed track whose first corner is not its first point', () => {
    const square = {
      from: ['50 mm', 0],
      to: [{ to: ['100 mm', 0] }, { to: ['100 mm', '100 mm'] }, { to: [0, '100 mm'] }, { to: [0, 0] }],
      closed: true,
    };
    const { body } = laid(shapes.particle, square, '20 mm');
    expect(body.at[0]).toBeCloseTo(0.07, 15);
    expect(body.at[1]).toBe(0);
    expect(laid(shapes.particle, square, '390 mm').body.at[0]).toBeCloseTo(0.04, 15);
  });

  it('of no outline has its origin on the track', () => {
    const shape: JsonObject = { kind: 'none' } satisfies Shape;
    const document = changed(ramp(), 'bodies', 0, { shape, inertia: 1, rest: { on: 'ramp', at: '500 mm' } });
    expect(mechanismOf(altered(document, { contacts: [] })).bodies[0].at).toEqual([0.4, 0]);
  });
});
