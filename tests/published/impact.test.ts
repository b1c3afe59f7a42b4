import { describe, expect, it } from 'vitest';
import { box, degrees, disc, floor, particle, track } from '../support/parts.js';
import { expectSound, expectWithin } from '../support/expect.js';
import { G, run } from '../support/run.js';

/** Nothing but the impact counts here. */
const free = { gravity: [0, 0] };

describe('impact of bodies', () => {
  it('central, e = ½: 1 kg at 2 m/s on 2 kg at rest leaves 0 and 1 m/s (Tayal, Engineering Mechanics, Ex. 18.1)', () => {
    const ran = run({
      ...free,
      bodies: [disc('a', [0, 0], 0.05, 1, { velocity: [2, 0] }), disc('b', [1, 0], 0.05, 2)],
      contacts: [{ between: ['a', 'b'], restitution: 0.5 }],
      run: { until: 1.5 },
    });
    expectSound(ran);
    expect(ran.motion('a').vx).toBeCloseTo(0, 12);
    expect(ran.motion('b').vx).toBeCloseTo(1, 12);
    // ½ m₁m₂/(m₁+m₂) (1 − e²) u² is lost.
    expect(ran.entry('impact', 'a/b').heat).toBeCloseTo(0.5 * (2 / 3) * 0.75 * 4, 12);
  });

  it('oblique, e = 0.9: 8.353604 m/s at 36.765696° and 15.179186 m/s at 58.848472° (Tayal Ex. 18.4)', () => {
    const [va, vb] = [
      [10 * Math.cos(degrees(30)), 10 * Math.sin(degrees(30))],
      [-15 * Math.cos(degrees(60)), 15 * Math.sin(degrees(60))],
    ];
    const before = 0.01;
    const ran = run({
      ...free,
      bodies: [
        disc('a', [-0.05 - before * va[0], -before * va[1]], 0.05, 1, { velocity: va }),
        disc('b', [0.05 - before * vb[0], -before * vb[1]], 0.05, 1, { velocity: vb }),
      ],
      contacts: [{ between: ['a', 'b'], restitution: 0.9 }],
      run: { until: 0.03 },
    });
    expectSound(ran);
    const [a, b] = [ran.motion('a'), ran.motion('b')];
    expectWithin('speed of a [m/s]', a.speed, 8.353604, 1e-6);
    expectWithin('speed of b [m/s]', b.speed, 15.179186, 1e-6);
    expectWithin('direction of a [°]', Math.atan2(a.vy, -a.vx) / degrees(1), 36.765696, 1e-6);
    expectWithin('direction of b [°]', Math.atan2(b.vy, b.vx) / degrees(1), 58.848472, 1e-6);
  });

  it('with a wall at 30° to the normal, e = ½: 0.661438 v at 49.106605° (Tayal Ex. 18.5)', () => {
    const ran = run({
      ...free,
      bodies: [disc('a', [-1, 0], 0.05, 1, { velocity: [Math.cos(degrees(30)), Math.sin(degrees(30))] })],
      tracks: [track('wall', [0, -5], [0, 5])],
      contacts: [{ between: ['a', 'wall'], restitution: 0.5 }],
      run: { until: 2 },
    });
    expectSound(ran);
    const { vx, vy, speed } = ran.motion('a');
    expectWithin('speed [m/s]', speed, 0.661438, 1e-6);
    expectWithin('direction [°]', Math.atan2(vy, -vx) / degrees(1), 49.106605, 1e-6);
  });

  it('one after the other, e = 1: 4, 2 and 1 kg leave at 1/3, 4/9 and 16/9 m/s (momentum and energy)', () => {
    const ran = run({
      ...free,
      bodies: [
        disc('a', [0, 0], 0.05, 4, { velocity: [1, 0] }),
        disc('b', [0.2, 0], 0.05, 2),
        disc('c', [0.4, 0], 0.05, 1),
      ],
      contacts: [{ between: ['*', '*'], restitution: 1 }],
      run: { until: 1 },
    });
    expectSound(ran);
    expect([ran.motion('a').vx, ran.motion('b').vx, ran.motion('c').vx]).toEqual([
      expect.closeTo(1 / 3, 12),
      expect.closeTo(4 / 9, 12),
      expect.closeTo(16 / 9, 12),
    ]);
    expect(ran.events('touch')).toHaveLength(2);
  });

  it('of a cue with two touching balls at once: −0.76 m/s, 2.6327 m/s at ±30° (OpenStax University Physics 1, ch. 9)', () => {
    const reach = 0.05 * Math.sqrt(3);
    const ran = run({
      ...free,
      bodies: [
        disc('cue', [-reach - 0.19, 0], 0.05, 1, { velocity: [3.8, 0] }),
        disc('up', [0, 0.05], 0.05, 1),
        disc('down', [0, -0.05], 0.05, 1),
      ],
      contacts: [{ between: ['*', '*'], restitution: 1 }],
      run: { until: 0.2 },
    });
    expectSound(ran);
    expectWithin('cue [m/s]', ran.motion('cue').vx, -0.76, 1e-6);
    for (const [id, sign] of [
      ['up', 1],
      ['down', -1],
    ] as const) {
      const { speed, vx, vy } = ran.motion(id);
      expectWithin(`${id} [m/s]`, speed, 2.63271722750469, 1e-6);
      expectWithin(`direction of ${id} [°]`, (sign * Math.atan2(vy, vx)) / degrees(1), 30, 1e-6);
    }
  });

  it('of a bullet that stays in a hanging block: 796.02 J lost, 1.99005 m/s left (ballistic pendulum: momentum)', () => {
    const [m, M, g] = [0.01, 2, 9.81];
    const ran = run({
      gravity: [0, -g],
      bodies: [
        particle('bullet', [-0.42, -1], m, { velocity: [400, 0] }),
        // A point mass in effect: it hangs on a bar without mass, and the bullet strikes through its centre.
        { id: 'block', shape: { kind: 'disc', radius: 0.02 }, mass: M, inertia: 1e-9, at: [0, -1] },
      ],
      joints: [{ id: 'hook', kind: 'pin', between: ['block', 'ground'], at: [0, 0] }],
      contacts: [{ between: ['bullet', 'block'] }],
      stations: [{ id: 'hit', when: { touch: ['bullet', 'block'] } }],
      run: { until: 0.4, step: 1e-5 },
    });
    expectSound(ran);
    expectWithin('lost [J]', ran.entry('impact', 'bullet/block').heat, 796.019900497512, 1e-5);
    expectWithin('effective mass [kg]', ran.station('hit').touch?.effectiveMass ?? NaN, (m * M) / (m + M), 1e-6);
    const { row } = ran.events('touch')[0];
    expectWithin('speed after [m/s]', ran.motion('block', row + 1).speed, 1.99004975124378, 1e-6);
  });
});

describe('a ball on a floor', () => {
  const e = 0.8;
  const ball = (until: number): ReturnType<typeof run> =>
    run({
      gravity: [0, -9.81],
      bodies: [disc('ball', [0, 1.05], 0.05, 1)],
      tracks: [floor],
      contacts: [{ between: ['ball', 'floor'], restitution: e }],
      run: { until },
    });

  it('rises to e²ⁿ h after the n-th of five bounces, within 1e-3 (need of the stepper)', () => {
    const ran = ball(3.3);
    const heights = ran.motions('ball').map(({ y }) => y - 0.05);
    const rows = ran.events('touch').map(({ row }) => row);
    expect(rows.length).toBeGreaterThanOrEqual(6);
    for (let n = 1; n <= 5; n += 1) {
      const top = Math.max(...heights.slice(rows[n - 1], rows[n]));
      expectWithin(`height after bounce ${n} [m]`, top, e ** (2 * n), 1e-3);
    }
  });

  it('comes to rest at √(2h/g)(1+e)/(1−e) = 4.06371 s after 4.55556 m of path (geometric series)', () => {
    const ran = ball(5);
    expectSound(ran);
    const last = ran.events('touch').at(-1);
    // Bounces below the rest speed (1e-3 of √(g·extent)) are left out; they would go on for 2 v/(g (1 − e)).
    expect(last?.time).toBeLessThan(4.06371276887158);
    expect(last?.time).toBeGreaterThan(4.06371276887158 - (2 * 1e-3 * Math.sqrt(100 / 9.81)) / 0.2);
    const ys = ran.motions('ball').map(({ y }) => y);
    const path = ys.slice(1).reduce((sum, y, i) => sum + Math.abs(y - ys[i]), 0);
    expectWithin('path [m]', path, 4.55555555555556, 1e-3);
    expect(ran.motion('ball').y).toBeCloseTo(0.05, 6);
    expectWithin('lost in impacts [J]', ran.entry('impact', 'ball/floor').heat, 9.81, 1e-6);
  });
});

describe('a block that rocks', () => {
  it('keeps ω₊/ω₋ = 1 − 1.5 sin² α = 0.985149 at its new corner (Housner, BSSA 53 (1963) 403–417)', () => {
    const [b, h] = [0.05, 0.5];
    const alpha = Math.atan(b / h);
    const lean = alpha / 2;
    const reach = Math.hypot(b, h);
    // It stands on its right corner; from there the centre is α − lean left of the vertical.
    const at: [number, number] = [-reach * Math.sin(alpha - lean), reach * Math.cos(alpha - lean)];
    const ran = run({
      gravity: [0, -9.81],
      bodies: [box('block', at, [2 * b, 2 * h], 1, { angle: -lean })],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: 1 }],
      run: { until: 1.2 },
    });
    expectSound(ran);
    const [hit] = ran.events('touch');
    expectWithin('quarter period [s]', hit.time, 0.344269565395136, 1e-5);
    const [before, after] = [ran.motion('block', hit.row), ran.motion('block', hit.row + 1)];
    expectWithin('ratio of spins', after.spin / before.spin, 0.985148514851485, 1e-5);
    const leans = ran.motions('block').map(({ angle }) => angle);
    expectWithin('next amplitude [rad]', Math.max(...leans), 0.0476784337849232, 1e-4);
  });
});

describe('a hard stop of a joint', () => {
  it('sends a slide back with e of its speed, and books the loss on the joint', () => {
    const ran = run({
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
    expectSound(ran);
    expect(ran.motion('carriage').vx).toBeCloseTo(-0.6, 10);
    const [stop] = ran.events('limit');
    expect(stop.time).toBeCloseTo(0.4, 6);
    expect(ran.entry('impact', 'guide').heat).toBeCloseTo(0.5 * 2 * 1.5 ** 2 * (1 - 0.16), 9);
  });
});

describe('a crate that drops 1 m', () => {
  it('meets the floor at √(2 g h) = 4.42869 m/s and loses m g h', () => {
    const ran = run({
      bodies: [box('crate', [0, 1.05], [0.2, 0.1], 1)],
      tracks: [floor],
      contacts: [{ between: ['crate', 'floor'] }],
      run: { until: 1 },
    });
    expectSound(ran);
    expectWithin('approach [m/s]', ran.events('touch')[0].approachSpeed, Math.sqrt(2 * G), 1e-7);
    expectWithin('lost [J]', ran.entry('impact', 'crate/floor').heat, G, 1e-7);
  });
});
