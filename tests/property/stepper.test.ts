import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { startRun } from '../../sim/stepper/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import { Run, type Parts } from '../support/run.js';

/** Wall clock within which a short run of a few bodies must be over [ms]. */
const PATIENCE = 20_000;
const num = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true });

const shape = fc.oneof(
  num(0.05, 0.15).map((radius) => ({ kind: 'disc', radius })),
  fc.tuple(num(0.06, 0.3), num(0.06, 0.3)).map(([width, height]) => ({ kind: 'box', width, height })),
  fc.tuple(num(0.1, 0.3), num(0.04, 0.1)).map(([length, width]) => ({ kind: 'bar', length, width })),
  fc.constant({ kind: 'particle' }),
);
const body = fc.record({
  shape,
  mass: num(0.1, 10),
  angle: num(-3, 3),
  velocity: fc.tuple(num(-3, 3), num(-3, 3)),
  spin: num(-10, 10),
});
const pair = fc.record({ friction: num(0, 0.8), restitution: num(0, 1) });
const bin = { id: 'bin', from: [-1, 3], to: [{ to: [-1, 0] }, { to: [1, 0] }, { to: [1, 3] }] };

/** Up to six bodies, apart from each other, in an open bin. */
const heap = fc.tuple(fc.array(body, { minLength: 1, maxLength: 6 }), pair).map(([bodies, contact]): Parts => ({
  bodies: bodies.map((each, i) => ({
    ...each,
    id: `b${i}`,
    at: [-0.5 + 0.5 * (i % 3), 0.4 + 0.5 * Math.floor(i / 3)],
  })),
  tracks: [bin],
  contacts: [{ between: ['*', '*'], ...contact }],
  run: { until: 1 },
}));

/** Runs it, or gives nothing where the document is refused; a run that does not end fails. */
function ended(parts: Parts): Run | null {
  const { mechanism } = readMechanism(JSON.stringify({ format: 'joulewright/1', ...parts }));
  if (!mechanism) return null;
  const run = startRun(mechanism);
  const until = Date.now() + PATIENCE;
  while (!run.done && Date.now() < until) run.advance(50);
  expect(run.done, 'the run ends').toBe(true);
  return new Run(mechanism, run.recording());
}

describe('any heap of bodies in a bin', () => {
  it('ends in finite numbers, closes to 1e-12, gains no energy, and stays in the bin', { timeout: 240_000 }, () => {
    fc.assert(
      fc.property(heap, (parts) => {
        const ran = ended(parts);
        if (!ran) return;
        const { rows, rowCount, layout } = ran.recording;
        expect(rows.subarray(0, rowCount * layout.width).every(Number.isFinite)).toBe(true);
        expect(ran.openShare()).toBeLessThanOrEqual(1e-12);
        expect(ran.numericalShare()).toBeLessThan(5e-3);
        for (const { account, work } of ran.ledger().entries) {
          if (account === 'friction' || account === 'impact')
            expect(work).toBeLessThanOrEqual(1e-9 * ran.ledger().turnover);
        }
        for (const { id } of layout.bodies) {
          const { x, y } = ran.motion(id);
          expect(Math.abs(x)).toBeLessThanOrEqual(1 + 1e-6);
          expect(y).toBeGreaterThanOrEqual(-1e-6);
        }
      }),
      { numRuns: 40 },
    );
  });
});

/** A chain of links from a pin on the ground, with springs and dampers to the ground. */
const chain = fc
  .tuple(
    fc.array(fc.tuple(num(0.2, 1), num(0.2, 5), num(-3, 3)), { minLength: 1, maxLength: 4 }),
    num(0, 200),
    num(0, 5),
  )
  .map(([links, rate, coefficient]): Parts => {
    const ends: [number, number][] = [[0, 0]];
    for (const [length, , angle] of links) {
      const [x, y] = ends[ends.length - 1];
      ends.push([x + length * Math.cos(angle), y + length * Math.sin(angle)]);
    }
    const last = ends[ends.length - 1];
    const to = [
      { of: 'ground', at: [3, 2] },
      { of: `l${links.length - 1}`, at: last },
    ];
    return {
      bodies: links.map(([length, mass, angle], i) => ({
        id: `l${i}`,
        shape: { kind: 'bar', length, width: 0.05 },
        mass,
        angle,
        at: [(ends[i][0] + ends[i + 1][0]) / 2, (ends[i][1] + ends[i + 1][1]) / 2],
      })),
      joints: links.map((_, i) => ({
        id: `p${i}`,
        kind: 'pin',
        between: [`l${i}`, i === 0 ? 'ground' : `l${i - 1}`],
        at: ends[i],
        friction: { coefficient: 0.05, radius: 0.02 },
      })),
      springs: rate > 1 ? [{ id: 'spring', kind: 'linear', between: to, rate }] : [],
      dampers: coefficient > 0.01 ? [{ id: 'damper', between: to, coefficient }] : [],
      run: { until: 1 },
    };
  });

describe('any chain of pinned links', () => {
  it(
    'ends, closes to 1e-12, holds together, and its method makes less than half a percent',
    { timeout: 240_000 },
    () => {
      fc.assert(
        fc.property(chain, (parts) => {
          const ran = ended(parts);
          if (!ran) return;
          expect(ran.openShare()).toBeLessThanOrEqual(1e-12);
          expect(ran.numericalShare()).toBeLessThan(5e-3);
          const first = (parts.bodies as { shape: { length: number } }[])[0].shape.length / 2;
          const { x, y } = ran.motion('l0');
          expect(Math.abs(Math.hypot(x, y) - first)).toBeLessThan(1e-6);
        }),
        { numRuns: 40 },
      );
    },
  );
});
