import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../support/audit.js';
import { expectWithin } from '../../support/expect.js';
import { box, degrees, disc, floor, particle, track } from '../../support/parts.js';

const free = { gravity: [0, 0] };
const earth = { gravity: [0, -9.81] };

describe('impact of bodies', () => {
  it('central, e = ½: 1 kg at 2 m/s on 2 kg at rest leaves 0 and 1 m/s (Tayal, Engineering Mechanics, Ex. 18.1)', () => {
    const ran = audit({
      ...free,
      bodies: [disc('a', [0, 0], 0.05, 1, { velocity: [2, 0] }), disc('b', [1, 0], 0.05, 2)],
      contacts: [{ between: ['a', 'b'], restitution: 0.5 }],
      run: { until: 1.5 },
    });
    expectAudited(ran);
    expect(ran.motion('a').vx).toBeCloseTo(0, 14);
    expect(ran.motion('b').vx).toBeCloseTo(1, 14);
    // ½ m₁m₂/(m₁+m₂) (1 − e²) u² is lost.
    expect(ran.entry('impact', 'a/b').heat).toBeCloseTo(0.5 * (2 / 3) * 0.75 * 4, 13);
  });

  it('oblique, e = 0.9: 8.353604 m/s at 36.765696° and 15.179186 m/s at 58.848472° (Tayal Ex. 18.4)', () => {
    const va = [10 * Math.cos(degrees(30)), 10 * Math.sin(degrees(30))];
    const vb = [-15 * Math.cos(degrees(60)), 15 * Math.sin(degrees(60))];
    const before = 0.01;
    const ran = audit({
      ...free,
      bodies: [
        disc('a', [-0.05 - before * va[0], -before * va[1]], 0.05, 1, { velocity: va }),
        disc('b', [0.05 - before * vb[0], -before * vb[1]], 0.05, 1, { velocity: vb }),
      ],
      contacts: [{ between: ['a', 'b'], restitution: 0.9 }],
      run: { until: 0.03 },
    });
    expectAudited(ran);
    const [a, b] = [ran.motion('a'), ran.motion('b')];
    expectWithin('speed of a [m/s]', a.speed, 8.353604, 1e-7);
    expectWithin('speed of b [m/s]', b.speed, 15.179186, 1e-7);
    expectWithin('direction of a [°]', Math.atan2(a.vy, -a.vx) / degrees(1), 36.765696, 1e-7);
    expectWithin('direction of b [°]', Math.atan2(b.vy, b.vx) / degrees(1), 58.848472, 1e-7);
  });

  it('with a wall at 30° to the normal, e = ½: √7/4 v at atan(2/√3)  (Tayal Ex. 18.5: 0.661438 at 49.106605°)', () => {
    const ran = audit({
      ...free,
      bodies: [disc('a', [-1, 0], 0.05, 1, { velocity: [Math.cos(degrees(30)), Math.sin(degrees(30))] })],
      tracks: [track('wall', [0, -5], [0, 5])],
      contacts: [{ between: ['a', 'wall'], restitution: 0.5 }],
      run: { until: 2 },
    });
    expectAudited(ran);
    const { vx, vy, speed } = ran.motion('a');
    expectWithin('speed [m/s]', speed, Math.sqrt(7) / 4, 1e-13);
    expectWithin('direction [rad]', Math.atan2(vy, -vx), Math.atan(2 / Math.sqrt(3)), 1e-13);
  });

  it('one after the other, e = 1: 4, 2 and 1 kg leave at 1/3, 4/9 and 16/9 m/s (momentum and energy)', () => {
    const ran = audit({
      ...free,
      bodies: [
        disc('a', [0, 0], 0.05, 4, { velocity: [1, 0] }),
        disc('b', [0.2, 0], 0.05, 2),
        disc('c', [0.4, 0], 0.05, 1),
      ],
      contacts: [{ between: ['*', '*'], restitution: 1 }],
      run: { until: 1 },
    });
    expectAudited(ran);
    expectWithin('a [m/s]', ran.motion('a').vx, 1 / 3, 1e-13);
    expectWithin('b [m/s]', ran.motion('b').vx, 4 / 9, 1e-13);
    expectWithin('c [m/s]', ran.motion('c').vx, 16 / 9, 1e-13);
    expect(ran.events('touch')).toHaveLength(2);
  });

  it('of a cue with two touching balls at once: −0.76 m/s, 2.6327 m/s at ±30° (OpenStax University Physics 1, ch. 9)', () => {
    const ran = audit({
      ...free,
      bodies: [
        disc('cue', [-0.05 * Math.sqrt(3) - 0.19, 0], 0.05, 1, { velocity: [3.8, 0] }),
        disc('up', [0, 0.05], 0.05, 1),
        disc('down', [0, -0.05], 0.05, 1),
      ],
      contacts: [{ between: ['*', '*'], restitution: 1 }],
      run: { until: 0.2 },
    });
    expectAudited(ran);
    expectWithin('cue [m/s]', ran.motion('cue').vx, -0.76, 1e-9);
    for (const [id, sign] of [
      ['up', 1],
      ['down', -1],
    ] as const) {
      const { speed, vx, vy } = ran.motion(id);
      expectWithin(`${id} [m/s]`, speed, 2.63271722750469, 1e-9);
      expectWithin(`direction of ${id} [°]`, (sign * Math.atan2(vy, vx)) / degrees(1), 30, 1e-9);
    }
  });

  it('of a bullet that stays in a hanging block: 796.0199 J lost, 1.99005 m/s left, 0.2018501 m of rise (momentum)', () => {
    const [m, M] = [0.01, 2];
    const ran = audit({
      ...earth,
      bodies: [
        particle('bullet', [-0.4, -1], m, { velocity: [400, 0] }),
        { id: 'block', shape: { kind: 'box', width: 0.1, height: 0.1 }, mass: M, at: [0.05, -1] },
      ],
      // Two equal links: the block swings without turning.
      joints: [
        {
          id: 'left',
          kind: 'rope',
          through: [
            { of: 'ground', at: [0, 0.05] },
            { of: 'block', at: [0, -0.95] },
          ],
        },
        {
          id: 'right',
          kind: 'rope',
          through: [
            { of: 'ground', at: [0.1, 0.05] },
            { of: 'block', at: [0.1, -0.95] },
          ],
        },
      ],
      tracks: [track('barrel', [-1, -1], [-0.0001, -1])],
      contacts: [{ between: ['bullet', 'block'] }, { between: ['bullet', 'barrel'] }],
      stations: [{ id: 'hit', when: { touch: ['bullet', 'block'] } }],
      run: { until: { station: 'hit' }, atMost: 1 },
    });
    expectAudited(ran);
    const { row, touch } = ran.station('hit');
    expectWithin('lost [J]', ran.entry('impact', 'bullet/block').heat, 796.019900497512, 1e-9);
    expectWithin('effective mass [kg]', touch?.effectiveMass ?? NaN, (m * M) / (m + M), 1e-9);
    expectWithin('speed before [m/s]', ran.motion('bullet', row).vx, 400, 1e-12);
    expectWithin('speed after [m/s]', ran.motion('block').vx, 1.99004975124378, 1e-9);
  });

  it('of a bullet of 2 g at 500 m/s on the rim of a disc of 3.2 kg: 1.24843945 rad/s (OpenStax sect. 11.3)', () => {
    // The disc's mass and inertia on a plate through its hub, whose face the bullet meets square, 0.5 m out.
    const plate = { kind: 'box', width: 1.2, height: 0.02 };
    const ran = audit({
      ...free,
      bodies: [
        particle('bullet', [0.5, -1], 0.002, { velocity: [0, 500] }),
        { id: 'disc', shape: plate, mass: 3.2, inertia: 0.4, at: [0, 0] },
      ],
      joints: [{ id: 'hub', kind: 'pin', between: ['disc', 'ground'], at: [0, 0] }],
      contacts: [{ between: ['bullet', 'disc'] }],
      run: { until: 0.002 },
    });
    expectAudited(ran);
    const { row } = ran.events('touch')[0];
    expectWithin('spin [rad/s]', ran.motion('disc', row + 1).spin, 0.5 / 0.4005, 1e-11);
  });
});

describe('a ball on a floor, dropped from 1 m', () => {
  it.each([
    [0.5, 1.35457092295719, 1.66666666666667],
    [0.8, 4.06371276887158, 4.55555555555556],
    [0.9, 8.57894917872889, 9.52631578947368],
  ])('with e = %d bounces at √(2h/g)(1 + 2e + … ), to rest at %d s after %d m (geometric series)', (e, rest, path) => {
    const ran = audit({
      ...earth,
      bodies: [disc('ball', [0, 1.05], 0.05, 1)],
      tracks: [track('floor', [-0.5, 0], [0.5, 0])],
      contacts: [{ between: ['ball', 'floor'], restitution: e, restSpeed: 1e-6 }],
      run: { until: rest + 0.2 },
    });
    expectAudited(ran);
    const first = Math.sqrt(2 / 9.81);
    const touches = ran.events('touch');
    const speed = Math.sqrt(2 * 9.81);
    let worst = 0;
    touches.slice(0, 20).forEach(({ time, approachSpeed }, n) => {
      const exact = first * (1 + (2 * e * (1 - e ** n)) / (1 - e));
      worst = Math.max(worst, Math.abs(time / exact - 1), Math.abs(approachSpeed / speed - e ** n));
    });
    console.log(`e = ${e}: ${touches.length} bounces, time and speed of the first 20 off by ${worst.toExponential(1)}`);
    expect(worst).toBeLessThan(1e-9);
    expectWithin('at rest from [s]', touches.at(-1)?.time ?? NaN, rest, 2e-5);
    // The path is twice the sum of the heights, less the first: heights from the bounces' own speeds.
    const heights = touches.map(({ approachSpeed }) => approachSpeed ** 2 / (2 * 9.81));
    const way = 2 * heights.reduce((sum, height) => sum + height, 0) - heights[0];
    expectWithin('path [m]', way, path, 1e-7);
    expectWithin('lost in impacts [J]', ran.entry('impact', 'ball/floor').heat, 9.81, 1e-9);
    expect(ran.motion('ball').y).toBeCloseTo(0.05, 9);
  });

  it('that rose to 6 m from 9 m has e = 0.816497, and rises to 9 m from 13.5 m (Tayal Ex. 18.3)', () => {
    const ran = audit({
      ...earth,
      bodies: [disc('ball', [0, 13.55], 0.05, 1)],
      tracks: [floor],
      contacts: [{ between: ['ball', 'floor'], restitution: Math.sqrt(2 / 3) }],
      stations: [
        { id: 'hit', when: { touch: ['ball', 'floor'] } },
        { id: 'top', when: { turns: { of: 'ball', along: [0, 1] } }, after: 'hit' },
      ],
      run: { until: 3.5 },
    });
    expectAudited(ran);
    expectWithin('height [m]', ran.motion('ball', ran.station('top').row).y - 0.05, 9, 1e-9);
  });
});

describe('a block that rocks', () => {
  it('keeps ω₊/ω₋ = 1 − 1.5 sin² α = 0.985149 at its new corner (Housner, BSSA 53 (1963) 403–417)', () => {
    const [b, h] = [0.05, 0.5];
    const alpha = Math.atan(b / h);
    const lean = alpha / 2;
    const reach = Math.hypot(b, h);
    // It stands on its right corner; from there the centre is α − lean left of the vertical.
    const ran = audit({
      ...earth,
      bodies: [
        box('block', [-reach * Math.sin(alpha - lean), reach * Math.cos(alpha - lean)], [2 * b, 2 * h], 1, {
          angle: -lean,
        }),
      ],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: 1 }],
      stations: [
        { id: 'hit', when: { touch: ['block', 'floor'] } },
        { id: 'out', when: { turns: { of: 'block', along: [1, 0] } }, after: 'hit' },
      ],
      run: { until: 1.2 },
    });
    expectAudited(ran);
    const [hit] = ran.events('touch');
    expectWithin('quarter period [s]', hit.time, 0.344269565395136, 1e-9);
    const [before, after] = [ran.motion('block', hit.row), ran.motion('block', hit.row + 1)];
    expectWithin('ratio of spins', after.spin / before.spin, 0.985148514851485, 1e-9);
    expectWithin('next amplitude [rad]', ran.motion('block', ran.station('out').row).angle, 0.0476784337849232, 1e-8);
  });
});

describe('a hard stop of a joint', () => {
  it('sends a slide back with e of its speed, and books the loss on the joint', () => {
    const ran = audit({
      ...free,
      bodies: [box('carriage', [0, 0], [0.1, 0.1], 2, { velocity: [1.5, 0] })],
      joints: [
        {
          id: 'guide',
          kind: 'slide',
          between: ['carriage', 'ground'],
          at: [0, 0],
          axis: [1, 0],
          limits: { from: -1, to: 0.6, restitution: 0.4 },
        },
      ],
      run: { until: 1 },
    });
    expectAudited(ran);
    const [stop] = ran.events('limit');
    expectWithin('time [s]', stop.time, 0.4, 1e-12);
    expectWithin('speed back [m/s]', -ran.motion('carriage').vx, 0.6, 1e-12);
    expectWithin('heat [J]', ran.entry('impact', 'guide').heat, 0.5 * 2 * 1.5 ** 2 * (1 - 0.16), 1e-12);
  });
});
