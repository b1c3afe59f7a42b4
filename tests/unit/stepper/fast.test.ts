import { describe, expect, it } from 'vitest';
import { box, disc, particle } from '../../support/parts.js';
import { expectSound } from '../../support/expect.js';
import { run, type Parts } from '../../support/run.js';

const free = { gravity: [0, 0] };

describe('what is too fast for its step', () => {
  // In one step the particle goes 5 mm by default, and a metre with the long step; the plate is 1 mm thick.
  it.each([undefined, 3.3e-3])('meets a thin plate all the same, with a step of %s s', (step) => {
    const ran = run(
      {
        ...free,
        bodies: [particle('shot', [0, 0], 0.01, { velocity: [300, 0] }), box('plate', [5, 0], [0.001, 2], 10)],
        contacts: [{ between: ['shot', 'plate'], restitution: 0.5 }],
        run: { until: 0.1 },
      },
      step ? { step } : {},
    );
    expectSound(ran);
    const [{ time, approachSpeed }] = ran.events('touch');
    expect(time).toBeCloseTo(4.9995 / 300, 8);
    expect(approachSpeed).toBeCloseTo(300, 9);
    // Momentum, and half the approach speed apart.
    expect(ran.motion('plate').vx).toBeCloseTo((0.01 * 300 * 1.5) / 10.01, 9);
  });

  it('meets another that comes the other way', () => {
    const ran = run(
      {
        ...free,
        bodies: [
          disc('a', [-3, 0], 0.01, 1, { velocity: [300, 0] }),
          disc('b', [3.5, 0], 0.01, 1, { velocity: [-300, 0] }),
        ],
        contacts: [{ between: ['a', 'b'], restitution: 1 }],
        run: { until: 0.03 },
      },
      { step: 0.004 },
    );
    expect(ran.motion('a').vx).toBeCloseTo(-300, 9);
    expect(ran.motion('b').vx).toBeCloseTo(300, 9);
  });

  it.each(['left', 'both'])('is kept on its side of a track that is free on the side "%s"', (side) => {
    const heightOver = (body: Parts): number => {
      const ran = run(
        {
          ...free,
          bodies: [body],
          tracks: [{ id: 'sheet', from: [-1, -0.3], to: [{ to: [1, 0.4] }], side }],
          contacts: [{ between: ['body', 'sheet'], restitution: 0.2 }],
          run: { until: 0.03 },
        },
        { step: 0.01 },
      );
      expectSound(ran);
      expect(ran.events('touch').length).toBeGreaterThan(0);
      const { x, y } = ran.motion('body');
      return y - (0.05 + 0.35 * x);
    };
    expect(heightOver(particle('body', [0.03, 3.1], 1, { velocity: [0, -300] }))).toBeGreaterThan(0);
    expect(heightOver(box('body', [0, 3], [0.2, 0.1], 1, { velocity: [0, -300], angle: 0.4 }))).toBeGreaterThan(0);
  });
});
