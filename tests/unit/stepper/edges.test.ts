import { describe, expect, it } from 'vitest';
import { box, disc, floor, track } from '../../support/parts.js';
import { expectSound, expectWithin } from '../../support/expect.js';
import { G, run, type Run } from '../../support/run.js';

/** Each event costs a handful of trials; a run that looks for the same event again and again takes many more. */
const expectCalm = (ran: Run): void => {
  expectSound(ran);
  expect(ran.recording.findings).toEqual([]);
  expect(ran.recording.counters.trials).toBeLessThan(1.2 * ran.recording.counters.steps + 200);
};

describe('a box that slides over the end of its track', () => {
  const slid = (...points: [number, number][]): Run =>
    run({
      bodies: [box('box', [-0.3, 0.05], [0.4, 0.1], 1, { velocity: [1.6, 0] })],
      tracks: [track('table', [-2, 0], [0, 0], ...points)],
      contacts: [{ between: ['box', 'table'], friction: 0.4 }],
      run: { until: 1.5 },
    });

  it('stops just past the edge, tips over it, slips and falls, with each event found once', () => {
    const ran = slid();
    expectCalm(ran);
    // v²/(2 μ g) = 0.326 m carries its centre 26 mm past the edge.
    expectWithin('stops at [s]', ran.events('sticks')[0].time, 1.6 / (0.4 * G), 0.02);
    expect(ran.events('slips')).toHaveLength(1);
    expect(ran.events('parts')).toHaveLength(1);
    expect(ran.motion('box').y).toBeLessThan(-1);
    expect(ran.total('impact')).toBe(0);
  });

  it('falls on to the floor below where the edge is the top of a wall, and never goes into the wall', () => {
    const ran = slid([0, -1], [3, -1]);
    expectCalm(ran);
    const { x, y, speed } = ran.motion('box');
    expect(y).toBeCloseTo(-0.95, 6);
    expect(x).toBeGreaterThan(0.2);
    expect(speed).toBeLessThan(1e-6);
  });
});

describe('a disc that rolls over the end of its track', () => {
  it('turns about the edge and leaves with the energy it had', () => {
    const ran = run({
      bodies: [disc('disc', [-1, 0.1], 0.1, 1, { velocity: [0.5, 0], spin: -5 })],
      tracks: [track('table', [-2, 0], [0, 0])],
      contacts: [{ between: ['disc', 'table'], friction: 0.6 }],
      run: { until: 2.5 },
    });
    expectCalm(ran);
    expect(ran.motion('disc').x).toBeGreaterThan(0.1);
    expect(ran.total('impact')).toBe(0);
    expect(ran.events('touch')).toEqual([]);
    expect(ran.events('parts')).toHaveLength(1);
  });
});

describe('a box on two pedestals', () => {
  const on = (x: number): Run =>
    run({
      bodies: [box('box', [x, 0.05], [1.4, 0.1], 1)],
      tracks: [track('left', [-0.1, 0], [0.1, 0]), track('right', [0.9, 0], [1.1, 0])],
      contacts: [{ between: ['box', '*'], friction: 0.3 }],
      run: { until: 0.5 },
    });

  it('rests, and the two carry its weight', () => {
    const ran = on(0.5);
    expectSound(ran);
    const forces = ['left', 'right'].map((id) => ran.contact('box', id, 'normal'));
    expect(forces[0] + forces[1]).toBeCloseTo(G, 6);
    expect(Math.min(...forces)).toBeGreaterThan(0);
    expect(ran.motion('box').speed).toBeLessThan(1e-9);
  });

  it('rests with its centre over one of them on that one alone, and tips over its edge from beyond', () => {
    expect(on(0).contact('box', 'left', 'normal')).toBeGreaterThan(0.5 * G);
    const tips = run({
      bodies: [box('box', [0.12, 0.05], [1.4, 0.1], 1)],
      tracks: [track('left', [-0.1, 0], [0.1, 0])],
      contacts: [{ between: ['box', '*'], friction: 0.3 }],
      run: { until: 0.2 },
    });
    expectSound(tips);
    // About the edge: α = m g d/(I + m (d² + h²)), d = 20 mm, h = 50 mm.
    const inertia = (1.4 ** 2 + 0.1 ** 2) / 12 + 0.02 ** 2 + 0.05 ** 2;
    const early = tips.motions('box').find(({ time }) => time >= 0.05);
    expectWithin('spin at 0.05 s [rad/s]', -(early?.spin ?? NaN), (G * 0.02 * (early?.time ?? NaN)) / inertia, 1e-2);
  });
});

describe('a disc in a V groove of 45°', () => {
  const groove = track('groove', [-1, 1], [0, 0], [1, 1]);

  it('rests on both flanks, at r √2 above the bottom', () => {
    const ran = run({
      bodies: [disc('disc', [0, 0.05 * Math.SQRT2], 0.05, 1)],
      tracks: [groove],
      contacts: [{ between: ['disc', 'groove'], friction: 0.3 }],
      run: { until: 1 },
    });
    expectSound(ran);
    // N = m g/(2 cos 45°) on each.
    expect(ran.contact('disc', 'groove', 'normal')).toBeCloseTo(G * Math.SQRT2, 6);
    expect(ran.contact('disc', 'groove', 'points')).toBe(2);
    expect(ran.motion('disc').y).toBeCloseTo(0.05 * Math.SQRT2, 9);
  });

  it('comes to rest there when it is dropped beside', () => {
    const ran = run({
      bodies: [disc('disc', [0.1, 0.6], 0.05, 1)],
      tracks: [groove],
      contacts: [{ between: ['disc', 'groove'], friction: 0.3, restitution: 0.3 }],
      run: { until: 3 },
    });
    expectSound(ran);
    expect(Math.hypot(ran.motion('disc').x, ran.motion('disc').y - 0.05 * Math.SQRT2)).toBeLessThan(1e-6);
  });
});

describe('a ladder on a smooth wall and floor', () => {
  it('leaves the wall when its top has come down to two thirds of where it started', () => {
    // A uniform rod let go on smooth surfaces (any text on rigid-body dynamics): the wall's force falls to nil at sin θ = ⅔ sin θ₀.
    const [length, start] = [2, (75 * Math.PI) / 180];
    const ran = run({
      bodies: [
        {
          id: 'ladder',
          shape: {
            kind: 'polygon',
            points: [
              [-1, 0],
              [1, 0],
              [0, 1e-3],
            ],
          },
          mass: 1,
          inertia: length ** 2 / 12,
          centerOfMass: [0, 0],
          at: [Math.cos(start), Math.sin(start)],
          angle: Math.PI - start,
        },
      ],
      tracks: [{ ...floor, id: 'floor' }, track('wall', [0, 4], [0, -1])],
      contacts: [{ between: ['ladder', 'floor'] }, { between: ['ladder', 'wall'] }],
      loads: [],
      stations: [{ id: 'off', when: { parts: ['ladder', 'wall'] } }],
      run: { until: { station: 'off' }, atMost: 3, step: 5e-4 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    const { angle } = ran.motion('ladder', ran.station('off').row);
    expectWithin('sin θ where it leaves', Math.sin(Math.PI - angle), (2 / 3) * Math.sin(start), 5e-3);
  });
});
