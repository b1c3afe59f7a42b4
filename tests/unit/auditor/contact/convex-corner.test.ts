import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../../support/audit.js';
import { disc, track } from '../../../support/parts.js';

const RADIUS = 0.1;
const G = 9.81;

describe('a round over a convex corner of a track', () => {
  // It would part at cos θ = (v² + 2 g r) / (3 g r), 45.8°: past the flank, which lies at 45°.
  const ran = audit({
    gravity: [0, -G],
    bodies: [disc('roller', [-0.2, RADIUS], RADIUS, 1, { velocity: [0.3, 0] })],
    tracks: [track('table', [-1, 0], [0, 0], [1, -1])],
    contacts: [{ between: ['roller', 'table'] }],
    run: { until: 1.2 },
  });

  it('keeps to the corner and comes onto the flank without parting or a touch', () => {
    expectAudited(ran);
    expect(ran.recording.events.filter(({ kind }) => kind !== 'station')).toEqual([]);
    const { x, y } = ran.motion('roller');
    expect((x + y) / Math.SQRT2).toBeCloseTo(RADIUS, 9);
  });

  it('has the speed of its fall', () => {
    const { y, speed } = ran.motion('roller');
    expect(speed ** 2).toBeCloseTo(0.3 ** 2 + 2 * G * (RADIUS - y), 8);
  });
});
