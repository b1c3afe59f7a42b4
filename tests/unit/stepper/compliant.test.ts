import { describe, expect, it } from 'vitest';
import { audit } from '../../support/audit.js';
import { expectSound, expectWithin } from '../../support/expect.js';
import { box, disc, floor } from '../../support/parts.js';
import { G, run, type Parts } from '../../support/run.js';

describe('a compliant pair that overlaps as drawn', () => {
  /** 2 mm into the floor at 1e5 N/m: 0.2 J, which throw 1 kg 20 mm high. */
  const pressed = (body: Parts): Parts => ({
    bodies: [body],
    tracks: [floor],
    contacts: [{ between: ['block', 'floor'], stiffness: 1e5 }],
    run: { until: 0.02 },
  });

  it.each([
    ['disc', disc('block', [0, 0.098], 0.1, 1)],
    ['box', box('block', [0, 0.048], [0.2, 0.1], 1)],
  ])('starts with the energy stored: a %s is thrown up with all of it', (_, body) => {
    const ran = run(pressed(body));
    expectSound(ran);
    const { entries } = ran.ledger();
    const spring = entries.find(({ account, of }) => account === 'spring' && String(of) === 'block,floor');
    expect(spring?.stored?.from).toBeCloseTo(0.2, 9);
    expect(spring?.stored?.to).toBe(0);
    expect(ran.numericalShare()).toBeLessThan(1e-3);
    expect(ran.total('damper', 'heat')).toBe(0);
    const exact = audit(pressed(body)).motion('block');
    expectWithin('speed it leaves with [m/s]', ran.motion('block').vy, exact.vy, 1e-4);
  });

  it('starts so between bodies too', () => {
    const ran = run({
      gravity: [0, 0],
      bodies: [disc('a', [0, 0], 0.1, 1), disc('b', [0.19, 0], 0.1, 1)],
      contacts: [{ between: ['a', 'b'], stiffness: 1e4 }],
      run: { until: 0.1 },
    });
    expectSound(ran);
    // ½ k d² = 0.5 J shared by two of 1 kg: v = √0.5.
    expectWithin('speed [m/s]', ran.motion('b').vx, Math.SQRT1_2, 1e-4);
    expectWithin('speed [m/s]', ran.motion('a').vx, -Math.SQRT1_2, 1e-4);
  });
});

describe('a box on an accelerating belt with compliant contact', () => {
  it('sticks until its limit and slips once, without chatter', () => {
    const belt: Parts = {
      bodies: [box('box', [0, 0.0495], [0.2, 0.1], 1)],
      tracks: [
        {
          ...floor,
          id: 'belt',
          surfaceSpeed: {
            curve: [
              [0, 0],
              [1, 2],
              [2, 8],
            ],
          },
        },
      ],
      contacts: [{ between: ['box', 'belt'], friction: 0.4, stiffness: 2e4, damping: 200 }],
      run: { until: 1.5, step: 2e-4 },
    };
    const ran = run(belt);
    expectSound(ran);
    // 2 m/s² is held, 6 m/s² is not: μ g = 3.92 m/s².
    expect(ran.events('slips').map(({ time }) => time)).toEqual([expect.closeTo(1, 2)]);
    expect(ran.events('sticks').length).toBeLessThanOrEqual(1);
    expectWithin('speed [m/s]', ran.motion('box').vx, 2 + 0.4 * G * 0.5, 5e-3);
  });
});
