import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../support/audit.js';
import { expectWithin } from '../../support/expect.js';
import { degrees, particle, track } from '../../support/parts.js';
import type { Run } from '../../support/run.js';

const earth = { gravity: [0, -9.81] };

describe('a particle on a smooth dome', () => {
  it.each([0.05, 10, 30])('let go at %d° from the top leaves it at cos θ = ⅔ cos θ₀', (from) => {
    const start = degrees(from);
    const ran = audit({
      ...earth,
      bodies: [particle('bead', [Math.sin(start), Math.cos(start)], 1)],
      tracks: [{ id: 'dome', from: [1, 0], to: [{ to: [-1, 0], bulge: 1 }], side: 'right' }],
      contacts: [{ between: ['bead', 'dome'] }],
      run: { until: 3.2 },
    });
    expectAudited(ran);
    const [left] = ran.events('parts');
    expectWithin('leaves at [rad]', Math.atan2(left.at[0], left.at[1]), Math.acos((2 / 3) * Math.cos(start)), 1e-9);
    const speed = Math.sqrt(((2 * 9.81) / 3) * Math.cos(start));
    expectWithin('speed there [m/s]', ran.motion('bead', left.row).speed, speed, 1e-9);
    expect(ran.total('impact')).toBe(0);
  });
});

describe('a particle in a loop', () => {
  /** A slope of 45°, an arc of 2 m that turns it level, and three quarters of a circle of 1 m. */
  const foot: [number, number] = [-Math.SQRT2, 2 - Math.SQRT2];
  const loop = (height: number): Run =>
    audit({
      ...earth,
      bodies: [particle('bead', [foot[0] - height + foot[1], height], 1)],
      tracks: [
        {
          id: 'loop',
          from: [foot[0] - 4, foot[1] + 4],
          to: [
            { to: foot },
            { to: [0, 0], bulge: Math.tan(Math.PI / 16) },
            { to: [0, 2], bulge: 1 },
            { to: [-1, 1], bulge: Math.tan(Math.PI / 8) },
          ],
        },
      ],
      contacts: [{ between: ['bead', 'loop'] }],
      stations: [{ id: 'off', when: { parts: ['bead', 'loop'] } }],
      run: { until: { station: 'off' }, atMost: 4 },
    });

  it('goes round from above 5R/2 (OpenStax University Physics 1, sect. 7.3), with no impact', () => {
    const ran = loop(2.5001);
    expectAudited(ran);
    expect(ran.total('impact')).toBe(0);
    const [end] = ran.events('parts');
    expectWithin('leaves at its end, x [m]', end.at[0], -1, 1e-9);
    expectWithin('speed there [m/s]', ran.motion('bead', end.row).speed, Math.sqrt(2 * 9.81 * 1.5001), 1e-9);
  });

  it.each([2.4, 1.9, 2.4999])('from %d m leaves it ⅔ (h − R) above its centre', (height) => {
    const ran = loop(height);
    expectAudited(ran);
    const [left] = ran.events('parts');
    expectWithin('height of leaving [m]', left.at[1] - 1, (2 / 3) * (height - 1), 1e-9);
    expect(left.at[0]).toBeGreaterThan(0);
  });
});

describe('a ladder that slides down a smooth wall on a smooth floor', () => {
  it.each([60, 75, 40])('from %d° leaves the wall where its top has come down by a third', (from) => {
    const [length, r, start] = [2, 0.02, degrees(from)];
    const [dx, dy] = [length * Math.cos(start), length * Math.sin(start)];
    const ran = audit({
      ...earth,
      bodies: [
        {
          id: 'ladder',
          shape: { kind: 'bar', length, width: 2 * r },
          mass: 10,
          inertia: (10 * length * length) / 12,
          at: [r + dx / 2, r + dy / 2],
          angle: Math.PI - start,
        },
      ],
      tracks: [track('wall', [0, 5], [0, 0]), track('floor', [0, 0], [20, 0])],
      contacts: [{ between: ['ladder', '*'] }],
      run: { until: 2 },
    });
    expectAudited(ran);
    const left = ran.events('parts').find(({ pair }) => pair.includes('wall'));
    if (!left) throw new Error('it never left the wall');
    const angle = Math.PI - ran.motion('ladder', left.row).angle;
    expectWithin('sin θ/sin θ₀', Math.sin(angle) / Math.sin(start), 2 / 3, 1e-8);
    // θ′² = 3 g (sin θ₀ − sin θ)/L until then.
    const spin = Math.sqrt((3 * 9.81 * Math.sin(start)) / 3 / length);
    expectWithin('spin [rad/s]', ran.motion('ladder', left.row).spin, spin, 1e-8);
  });
});
