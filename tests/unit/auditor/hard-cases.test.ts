import { describe, expect, it } from 'vitest';
import { auditWithin, isFinite } from '../../support/audit.js';
import { box, degrees, disc, floor, track } from '../../support/parts.js';
import type { Parts, Run } from '../../support/run.js';

/** Wall clock within which each of these must be over [s]. */
const PATIENCE = 20;

/** Runs it: it must end by itself, in finite numbers, with an account that closes. */
function ended(parts: Parts): Run {
  const audited = auditWithin(PATIENCE, parts);
  if (!audited) throw new Error('the document was refused');
  const { ran, isDone } = audited;
  expect(isDone, 'the run ends').toBe(true);
  expect(isFinite(ran)).toBe(true);
  // At rest nothing is turned over that a share could be of.
  expect(ran.openShare() * ran.ledger().turnover).toBeLessThanOrEqual(1e-9 * ran.ledger().turnover + 1e-15);
  return ran;
}

type Point = [number, number];
const pin = (id: string, first: string, second: string, at: Point): Parts => ({
  id,
  kind: 'pin',
  between: [first, second],
  at,
});
const slide = (id: string, at: Point, axis: Point, more: Parts = {}): Parts => ({
  id,
  kind: 'slide',
  between: ['carriage', 'ground'],
  at,
  axis,
  ...more,
});
const link = (id: string, from: Point, to: Point, mass: number, more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'bar', length: Math.hypot(to[0] - from[0], to[1] - from[1]), width: 0.02 },
  mass,
  at: [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2],
  angle: Math.atan2(to[1] - from[1], to[0] - from[0]),
  ...more,
});
const wildcard = (pair: Parts = {}): Parts => ({ contacts: [{ between: ['*', '*'], friction: 0.3, ...pair }] });
const spring: Parts = {
  id: 'spring',
  kind: 'linear',
  between: [
    { of: 'ground', at: [-1, 0] },
    { of: 'carriage', at: [0, 0] },
  ],
  rate: 50,
  freeLength: 0.7,
};

describe('a locked mechanism', () => {
  it('of three links on two pins of the ground stays where it is, to the last digits', () => {
    const [a, b, c]: Point[] = [
      [0, 0],
      [1, 0],
      [0.5, 0.8],
    ];
    const ran = ended({
      bodies: [link('one', a, b, 1), link('two', b, c, 1), link('three', c, a, 1)],
      joints: [
        pin('p1', 'one', 'ground', a),
        pin('p2', 'one', 'two', b),
        pin('p3', 'two', 'three', c),
        pin('p4', 'three', 'one', a),
        pin('p5', 'two', 'ground', b),
      ],
      run: { until: 1 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(Math.abs(ran.motion('two').y - 0.4)).toBeLessThan(1e-14);
  });

  it('of a carriage on two crossed guides stays where it is', () => {
    const ran = ended({
      bodies: [box('carriage', [0, 0], [0.4, 0.2], 3)],
      joints: [slide('g1', [0, 0.1], [1, 0]), slide('g2', [0, -0.1], [0, 1])],
      run: { until: 1 },
    });
    expect(ran.motion('carriage').speed).toBe(0);
  });
});

describe('an over-constrained loop', () => {
  it('of a carriage on two parallel guides moves as on one', () => {
    const on = (joints: Parts[]): Run =>
      ended({ bodies: [box('carriage', [0, 0], [0.4, 0.2], 3)], joints, springs: [spring], run: { until: 2 } });
    const [two, one] = [
      on([slide('g1', [0, 0.1], [1, 0]), slide('g2', [0, -0.1], [1, 0])]),
      on([slide('g1', [0, 0], [1, 0])]),
    ];
    expect(two.motion('carriage').x).toBeCloseTo(one.motion('carriage').x, 11);
  });

  it.each([
    ['two cranks', [0, 2]],
    ['three cranks', [0, 1, 2]],
  ])('of a parallelogram of %s turns evenly, through its flat positions', (_, places) => {
    const spin = 8;
    const ran = ended({
      gravity: [0, 0],
      bodies: [
        ...places.map((x) => link(`k${x}`, [x, 0], [x, 0.5], 1, { spin, velocity: [-spin * 0.25, 0] })),
        link('rod', [0, 0.5], [2, 0.5], 2, { velocity: [-spin * 0.5, 0] }),
      ],
      joints: places.flatMap((x) => [pin(`f${x}`, `k${x}`, 'ground', [x, 0]), pin(`c${x}`, `k${x}`, 'rod', [x, 0.5])]),
      run: { until: 1 },
    });
    expect(ran.motion('k0').spin).toBeCloseTo(spin, 7);
    expect(ran.motion('k2').angle).toBeCloseTo(Math.PI / 2 + spin, 7);
    expect(ran.motion('rod').angle).toBeCloseTo(0, 7);
  });
});

describe('very unlike masses', () => {
  it.each([
    ['light before heavy', 1e-3, 1e3],
    ['heavy before light', 1e3, 1e-3],
  ])('of a double pendulum, %s (1 to 1e6), keep their energy and joints', (_, first, second) => {
    const ran = ended({
      bodies: [link('a', [0, 0], [1, 0], first), link('b', [1, 0], [2, 0], second)],
      joints: [pin('p', 'a', 'ground', [0, 0]), pin('q', 'a', 'b', [1, 0])],
      run: { until: 2 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(ran.recording.counters.drift).toBeLessThan(1e-10);
  });

  it('of two balls meet as momentum and restitution say', () => {
    const ran = ended({
      gravity: [0, 0],
      bodies: [disc('a', [0, 0], 0.1, 1e-3, { velocity: [1, 0] }), disc('b', [1, 0], 0.1, 1e3)],
      ...wildcard({ restitution: 0.7 }),
      run: { until: 2 },
    });
    expect(ran.motion('b').vx).toBeCloseTo((1.7 * 1e-3) / (1e3 + 1e-3), 17);
    expect(ran.motion('a').vx).toBeCloseTo((1e-3 - 0.7 * 1e3) / (1e3 + 1e-3), 12);
  });
});

describe('contacts that are closed at time zero', () => {
  it('and approach strike at once, and are no touch', () => {
    const ran = ended({
      bodies: [box('a', [0, 0.1], [0.4, 0.2], 1, { velocity: [0, -2] })],
      tracks: [floor],
      ...wildcard({ restitution: 0.4 }),
      run: { until: 0.1 },
    });
    expect(ran.events('touch')).toEqual([]);
    expect(ran.entry('impact', 'a/floor').heat).toBeCloseTo(0.5 * 4 * (1 - 0.16), 12);
  });

  it('in a corner strike both walls at once', () => {
    const ran = ended({
      bodies: [disc('a', [0.1, 0.1], 0.1, 1, { velocity: [-1, -2], spin: 3 })],
      tracks: [track('corner', [0, 2], [0, 0], [3, 0])],
      ...wildcard({ restitution: 0.4, friction: 0 }),
      run: { until: 0.01 },
    });
    expect(ran.motion('a').vx).toBeCloseTo(0.4, 12);
  });
});

describe('coincident events', () => {
  it('of two balls on one floor are two touches at one time', () => {
    const ran = ended({
      bodies: [disc('a', [0, 1.1], 0.1, 1), disc('b', [1, 1.1], 0.1, 2)],
      tracks: [floor],
      ...wildcard({ restitution: 0.6 }),
      run: { until: 1 },
    });
    const [first, second] = ran.events('touch');
    expect(first.time).toBe(second.time);
    expect(ran.motion('a').y).toBeCloseTo(ran.motion('b').y, 13);
  });
});

describe('extremes', () => {
  it.each([
    ['undamped', {}],
    ['damped', { damping: 1e4 }],
  ])('a buffer of 1e8 N/m, %s, gives back or takes what it should', (_, more) => {
    const ran = ended({
      bodies: [box('a', [0, 1], [0.4, 0.2], 10)],
      tracks: [floor],
      ...wildcard({ stiffness: 1e8, ...more }),
      run: { until: 0.6 },
    });
    const heat = ran.total('damper', 'heat');
    if ('damping' in more) expect(heat).toBeGreaterThan(1);
    else expect(Math.abs(heat)).toBeLessThan(1e-8);
  });

  it('a ball of 10 mm at 300 m/s does not pass through a wall', () => {
    const ran = ended({
      bodies: [disc('a', [0, 1], 0.01, 0.01, { velocity: [300, 0] })],
      tracks: [track('wall', [20, -1], [20, 10])],
      ...wildcard({ restitution: 0.5, friction: 0 }),
      run: { until: 0.1 },
    });
    expect(ran.events('touch')).toHaveLength(1);
    expect(ran.motion('a').vx).toBeCloseTo(-150, 9);
  });

  it.each([1e-4, 1])('a box of 10 µm drops on a floor of %d m, upright and tilted', (half) => {
    for (const angle of [0, 0.3]) {
      const ran = ended({
        bodies: [box('a', [0, 2e-5], [1e-5, 1e-5], 1e-12, { angle })],
        tracks: [track('floor', [-half, 0], [half, 0])],
        ...wildcard({ restitution: 0.5 }),
        run: { until: 0.01 },
      });
      expect(ran.recording.end).toBe('reachedEnd');
      expect(Math.abs(ran.motion('a').y - 5e-6)).toBeLessThan(1e-9);
    }
  });
});

describe('statically indeterminate rest', () => {
  it.each([2, 5, 10])('of %d stacked boxes lasts', (count) => {
    const ran = ended({
      bodies: Array.from({ length: count }, (_, i) => box(`b${i}`, [0, 0.1 + 0.2 * i], [0.4, 0.2], 1)),
      tracks: [floor],
      ...wildcard(),
      run: { until: 1 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(ran.motion(`b${count - 1}`).y).toBeCloseTo(0.2 * count - 0.1, 9);
    expect(ran.motion(`b${count - 1}`).x).toBeCloseTo(0, 9);
  });

  it('of a disc in a groove, a beam on three supports, and three discs in a bin lasts', () => {
    const groove = ended({
      bodies: [disc('a', [0, 0.1 * Math.SQRT2], 0.1, 1)],
      tracks: [track('groove', [-1, 1], [0, 0], [1, 1])],
      ...wildcard({ friction: 0.5 }),
      run: { until: 1 },
    });
    expect(groove.motion('a').speed).toBeLessThan(1e-9);
    const beam = ended({
      bodies: [box('a', [0, 0.55], [2, 0.1], 4)],
      tracks: [-0.8, 0, 0.8].map((x, i) => track(`support-${i}`, [x - 0.1, 0.5], [x + 0.1, 0.5])),
      ...wildcard(),
      run: { until: 1 },
    });
    expect(beam.motion('a').speed).toBeLessThan(1e-9);
    const discs = ended({
      bodies: [
        disc('a', [0, 0.1], 0.1, 1),
        disc('b', [0.2, 0.1], 0.1, 1),
        disc('c', [0.1, 0.1 + 0.1 * Math.sqrt(3)], 0.1, 1),
      ],
      tracks: [track('bin', [-0.1, 1], [-0.1, 0], [0.3, 0], [0.3, 1])],
      ...wildcard(),
      run: { until: 1 },
    });
    expect(discs.motion('c').speed).toBeLessThan(1e-9);
  });
});

describe('a rod that slides on its end (Painlevé)', () => {
  const rod = (angle: number): Run =>
    ended({
      bodies: [
        {
          id: 'rod',
          shape: { kind: 'bar', length: 2, width: 0.02 },
          mass: 1,
          inertia: 1 / 3,
          at: [Math.cos(degrees(angle)), Math.sin(degrees(angle)) + 0.01],
          angle: degrees(angle),
          velocity: [5, 0],
        },
      ],
      tracks: [floor],
      ...wildcard({ friction: 2 }),
      run: { until: 1 },
    });

  it('either goes on or says why it cannot, whichever way it leans', () => {
    for (const angle of [60, 120]) {
      const { recording } = rod(angle);
      expect(['reachedEnd', 'noSolution']).toContain(recording.end);
      if (recording.end === 'noSolution') expect(recording.findings.map(({ code }) => code)).toContain('no-solution');
    }
  });
});

describe('many links', () => {
  it('a chain of 40 closes and holds together', { timeout: 60_000 }, () => {
    const ran = ended({
      bodies: Array.from({ length: 40 }, (_, i) => link(`l${i}`, [0.1 * i, 0], [0.1 * i + 0.1, 0], 0.1)),
      joints: Array.from({ length: 40 }, (_, i) =>
        pin(`p${i}`, `l${i}`, i === 0 ? 'ground' : `l${i - 1}`, [0.1 * i, 0]),
      ),
      run: { until: 0.3 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(ran.recording.counters.drift).toBeLessThan(1e-10);
  });
});
