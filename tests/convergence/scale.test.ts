import { describe, expect, it } from 'vitest';
import { mechanismOf, run, type Parts, type Run } from '../support/run.js';
import { defaultStep } from '../../sim/stepper/index.js';

/**
 * One mechanism at a length of `size` [m]: a box slides down a slope with friction, off its end onto a floor, a disc rolls
 * against a spring-held flap on a pin, a damper holds it. Times go with √size, rates with mass/time² (here mass is kept).
 */
function feed(size: number): Parts {
  const time = Math.sqrt(size);
  const at = (x: number, y: number): [number, number] => [x * size, y * size];
  const rate = (k: number): number => k / (time * time);
  return {
    gravity: [0, -9.81],
    bodies: [
      {
        id: 'box',
        shape: { kind: 'box', width: 0.2 * size, height: 0.1 * size },
        mass: 2,
        rest: { on: 'slope', at: 0.3 * size },
      },
      {
        id: 'disc',
        shape: { kind: 'disc', radius: 0.1 * size },
        mass: 1,
        at: at(2.4, -0.9),
        velocity: [-0.4 * time, 0],
        spin: 4 / time,
      },
      {
        id: 'flap',
        shape: { kind: 'bar', length: 0.5 * size, width: 0.06 * size },
        mass: 0.5,
        at: at(3.2, -0.6),
        angle: 1.2,
      },
    ],
    tracks: [
      { id: 'slope', from: at(0, 0), to: [{ to: at(1.2, -0.7) }] },
      { id: 'floor', from: at(-1, -1), to: [{ to: at(5, -1) }] },
    ],
    contacts: [
      { between: ['box', 'slope'], friction: 0.2 },
      { between: ['box', 'floor'], friction: 0.3, restitution: 0.3 },
      { between: ['disc', 'floor'], friction: 0.4, restitution: 0.2, rollingResistance: 0.002 * size },
      { between: ['box', 'disc'], friction: 0.1, restitution: 0.5 },
    ],
    joints: [{ id: 'hinge', kind: 'pin', between: ['flap', 'ground'], at: at(3.2, -0.4) }],
    springs: [
      {
        id: 'spring',
        kind: 'linear',
        between: [
          { of: 'ground', at: at(4, -0.2) },
          { of: 'flap', at: at(3.25, -0.75) },
        ],
        rate: rate(60),
        freeLength: 0.8 * size,
      },
    ],
    dampers: [
      {
        id: 'damper',
        between: [
          { of: 'ground', at: at(4, -0.2) },
          { of: 'flap', at: at(3.25, -0.75) },
        ],
        coefficient: 1 / time,
      },
    ],
    run: { until: 1.5 * time },
  };
}

/** Last positions over size, velocities over √size, works over size. */
function figures(ran: Run, size: number): number[] {
  const motions = ['box', 'disc', 'flap'].flatMap((id) => {
    const { x, y, angle, vx, vy, spin } = ran.motion(id);
    return [x / size, y / size, angle, vx / Math.sqrt(size), vy / Math.sqrt(size), spin * Math.sqrt(size)];
  });
  return [...motions, ...ran.ledger().entries.map(({ work }) => work / size)];
}

describe('the same mechanism at 5 mm and at 5 m', () => {
  const sizes = [0.005, 5];

  it('takes the same number of steps', () => {
    const [small, large] = sizes.map((size) => {
      const mechanism = mechanismOf(feed(size));
      return mechanism.run.atMost / defaultStep(mechanism).step;
    });
    expect(Math.abs(small / large - 1)).toBeLessThan(1e-9);
  });

  it('gives the same non-dimensional results within 1e-6 (need of the stepper)', () => {
    const [small, large] = sizes.map((size) => figures(run(feed(size)), size));
    const scale = Math.max(...large.map(Math.abs));
    const worst = Math.max(
      ...large.map((value, i) => Math.abs(value - small[i]) / Math.max(Math.abs(value), 1e-3 * scale)),
    );
    console.log(`5 mm against 5 m: differs by ${worst.toExponential(1)} at the most of ${large.length} figures`);
    expect(worst).toBeLessThan(1e-6);
  });
});
