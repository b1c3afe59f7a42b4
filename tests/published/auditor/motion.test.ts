import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../support/audit.js';
import { expectWithin } from '../../support/expect.js';
import { box, degrees, disc, floor, onRamp, particle, ramp, sliderCrank, track } from '../../support/parts.js';
import { G, type Parts, type Run } from '../../support/run.js';

/** Relative error allowed against a closed form at the default tolerance (the need is 1e-7). */
const CLOSE = 1e-9;
const earth = { gravity: [0, -9.81] };
const [S30, C30] = [0.5, Math.sqrt(3) / 2];
const spring = (from: Parts, to: Parts, more: Parts): Parts => ({
  id: 'spring',
  kind: 'linear',
  between: [from, to],
  ...more,
});
const ground = (x: number, y: number): Parts => ({ of: 'ground', at: [x, y] });

describe('a block on a ramp (Coulomb friction, constant acceleration)', () => {
  it('passes 3 m at √(2 a s) and √(2 s/a), a = g (sin α − μ cos α)', () => {
    const ran = audit({
      bodies: [box('block', onRamp(30, 1, 0.05), [0.2, 0.1], 3, { angle: -degrees(30) })],
      tracks: [ramp(30, 20)],
      contacts: [{ between: ['block', 'ramp'], friction: 0.2 }],
      stations: [
        {
          id: 'passed',
          when: {
            crosses: { point: { of: 'block', at: onRamp(30, 1, 0.05) }, line: [onRamp(30, 4, -1), onRamp(30, 4, 1)] },
          },
        },
      ],
      run: { until: { station: 'passed' }, atMost: 5 },
    });
    expectAudited(ran);
    const a = G * (S30 - 0.2 * C30);
    expectWithin('time [s]', ran.station('passed').time, Math.sqrt(6 / a), CLOSE);
    expectWithin('speed [m/s]', ran.motion('block').speed, Math.sqrt(6 * a), CLOSE);
    expectWithin('heat [J]', ran.entry('friction', 'block/ramp').heat, 0.2 * 3 * G * C30 * 3, CLOSE);
    // A smooth reaction does no work (common practice).
    expect(Math.abs(ran.entry('reaction', 'block/ramp').work)).toBeLessThan(1e-9);
  });
});

describe('a disc on a ramp', () => {
  const down = (friction: number): Run =>
    audit({
      bodies: [disc('disc', onRamp(30, 1, 0.1), 0.1, 2)],
      tracks: [ramp(30, 20)],
      contacts: [{ between: ['disc', 'ramp'], friction }],
      run: { until: 1 },
    });

  it('rolls at ⅔ g sin α and loses nothing to friction (OpenStax University Physics 1, sect. 11.1)', () => {
    const ran = down(0.2);
    expectAudited(ran);
    expectWithin('speed [m/s]', ran.motion('disc').speed, (2 / 3) * G * S30, CLOSE);
    expectWithin('spin [rad/s]', -ran.motion('disc').spin, ((2 / 3) * G * S30) / 0.1, CLOSE);
    expect(ran.total('friction', 'heat')).toBe(0);
  });

  it('slips where μ < tan α/3: g (sin α − μ cos α), spun up by 2 μ g cos α/r', () => {
    const ran = down(0.15);
    expectAudited(ran);
    expectWithin('speed [m/s]', ran.motion('disc').speed, G * (S30 - 0.15 * C30), CLOSE);
    expectWithin('spin [rad/s]', -ran.motion('disc').spin, (2 * 0.15 * G * C30) / 0.1, CLOSE);
  });

  it('with a rolling resistance f rolls at ⅔ g (sin α − (f/r) cos α)', () => {
    const ran = audit({
      bodies: [disc('disc', onRamp(10, 1, 0.1), 0.1, 2)],
      tracks: [ramp(10, 20)],
      contacts: [{ between: ['disc', 'ramp'], friction: 0.5, rollingResistance: 0.005 }],
      run: { until: 1 },
    });
    expectAudited(ran);
    const [s, c] = [Math.sin(degrees(10)), Math.cos(degrees(10))];
    const a = (2 / 3) * G * (s - 0.05 * c);
    expectWithin('speed [m/s]', ran.motion('disc').speed, a, CLOSE);
    expectWithin('heat [J]', ran.entry('rolling-resistance', 'disc/ramp').heat, 0.05 * 2 * G * c * 0.5 * a, CLOSE);
  });

  it('of 10 m/s rolls 22.3760541 m up 20° (OpenStax sect. 11.1)', () => {
    const [c, s] = [Math.cos(degrees(20)), Math.sin(degrees(20))];
    const ran = audit({
      gravity: [0, -9.8],
      bodies: [disc('cylinder', [-0.1 * s, 0.1 * c], 0.1, 5, { velocity: [10 * c, 10 * s], spin: -100 })],
      tracks: [track('hill', [-2 * c, -2 * s], [40 * c, 40 * s])],
      contacts: [{ between: ['cylinder', 'hill'], friction: 0.5 }],
      stations: [{ id: 'top', when: { turns: { of: 'cylinder', along: [1, 0] } } }],
      run: { until: { station: 'top' }, atMost: 6 },
    });
    expectAudited(ran);
    const [start, top] = [ran.motion('cylinder', 0), ran.motion('cylinder')];
    expectWithin('way up [m]', Math.hypot(top.x - start.x, top.y - start.y), (0.75 * 100) / (9.8 * s), CLOSE);
  });
});

describe('a body that is set down sliding and comes to roll (Coulomb friction)', () => {
  it.each([
    ['a solid disc', 0.5, 0.509683995922528, 2, 1.27420998980632, 3],
    ['a sphere', 0.4, 0.436871996505024, 2.14285714285714, 1.12338513387006, 2.57142857142857],
  ])('%s rolls as I/(m r²) = %d says', (_, share, time, speed, travel, heat) => {
    const ran = audit({
      ...earth,
      bodies: [disc('body', [0, 0.1], 0.1, 2, { inertia: share * 2 * 0.01, velocity: [3, 0] })],
      tracks: [floor],
      contacts: [{ between: ['body', 'floor'], friction: 0.2 }],
      run: { until: 1 },
    });
    expectAudited(ran);
    const [sticks] = ran.events('sticks');
    expectWithin('rolls at [s]', sticks.time, time, CLOSE);
    expectWithin('travelled [m]', ran.motion('body', sticks.row).x, travel, CLOSE);
    expectWithin('speed [m/s]', ran.motion('body').vx, speed, CLOSE);
    expectWithin('heat [J]', ran.entry('friction', 'body/floor').heat, heat, CLOSE);
  });
});

describe('a drop on a spring', () => {
  it('of 2 kg from 0.5 m on 4000 N/m: 75.112 mm, 300.449 N, 0.0733751 s (closed form)', () => {
    const ran = audit({
      ...earth,
      bodies: [disc('ball', [0, 0.55], 0.05, 2)],
      tracks: [floor],
      contacts: [{ between: ['ball', 'floor'], stiffness: 4000 }],
      stations: [{ id: 'low', when: { turns: { of: 'ball', along: [0, 1] } } }],
      run: { until: 0.5 },
    });
    expectAudited(ran);
    const { row } = ran.station('low');
    expectWithin('speed at the touch [m/s]', ran.events('touch')[0].approachSpeed, 3.13209195267317, CLOSE);
    expectWithin('stroke [m]', 0.05 - ran.motion('ball', row).y, 0.0751122576376545, CLOSE);
    expectWithin('greatest force [N]', ran.contact('ball', 'floor', 'normal', row), 300.449030550618, CLOSE);
    const lasts = ran.events('parts')[0].time - ran.events('touch')[0].time;
    expectWithin('contact lasts [s]', lasts, 0.0733751333111518, CLOSE);
    // A spring gives back what it took (common practice).
    expect(Math.abs(ran.entry('spring', 'ball/floor').work)).toBeLessThan(1e-9);
  });

  it('of 5 kg from 0.1 m on 500 N/m: 26.9107631 cm (Tayal, Engineering Mechanics, Ex. 16.6)', () => {
    const ran = audit({
      ...earth,
      bodies: [particle('mass', [0, 1.1], 5)],
      joints: [{ id: 'guide', kind: 'slide', between: ['mass', 'ground'], at: [0, 1.1], axis: [0, 1] }],
      springs: [spring(ground(0, 0), { of: 'mass', at: [0, 1.1] }, { rate: 500, freeLength: 1, acts: 'compression' })],
      stations: [{ id: 'low', when: { turns: { of: 'mass', along: [0, 1] } } }],
      run: { until: { station: 'low' }, atMost: 1 },
    });
    expectAudited(ran);
    expectWithin('compression [m]', 1 - ran.motion('mass').y, 0.269107631409, 1e-10);
  });

  it('of 5 kg, 0.5 m down 30° of μ 0.2 on 1500 N/m: 0.114611112 m, 0.298351564 m back (Tayal Ex. 16.10)', () => {
    const ran = audit({
      ...earth,
      bodies: [box('block', onRamp(30, 1, 0.05), [0.1, 0.1], 5, { angle: -degrees(30) })],
      tracks: [ramp(30, 6)],
      contacts: [{ between: ['block', 'ramp'], friction: 0.2 }],
      springs: [
        spring(
          { of: 'ground', at: onRamp(30, 3, 0.05) },
          { of: 'block', at: onRamp(30, 1, 0.05) },
          { rate: 1500, freeLength: 1.5, acts: 'compression' },
        ),
      ],
      stations: [
        { id: 'start', when: { start: true } },
        { id: 'down', when: { turns: { of: 'block', along: [1, 0] } } },
        { id: 'up', when: { turns: { of: 'block', along: [1, 0] } }, after: 'down' },
      ],
      run: { until: 2 },
    });
    expectAudited(ran);
    const along = (row: number): number => ran.motion('block', row).x * C30 - ran.motion('block', row).y * S30;
    const [down, up] = [ran.station('down').row, ran.station('up').row];
    const heat = ran.entry('friction', 'block/ramp', ran.ledger('start', 'down')).heat;
    expectWithin('compression [m]', along(down) - 1.5, 0.114611111942, CLOSE);
    expectWithin('heat on the way down [J]', heat, 5.22155728498, CLOSE);
    expectWithin('rebound up the plane [m]', along(down) - along(up), 0.298351563935, CLOSE);
  });
});

describe('a pendulum that strikes a block at its lowest point', () => {
  it('leaves it (1 + e) I ω L/(I + M L²), and keeps that less e L ω (angular momentum about its hook)', () => {
    const [m, M, L, r, e] = [2, 3, 0.8, 0.06, 0.4];
    const inertia = 0.5 * m * r * r + m * L * L;
    const ran = audit({
      bodies: [disc('bob', [-L, 0], r, m), box('block', [r + 0.1, -L], [0.2, 0.3], M)],
      tracks: [track('bench', [-0.5, -L - 0.15], [9, -L - 0.15])],
      joints: [{ id: 'hook', kind: 'pin', between: ['bob', 'ground'], at: [0, 0] }],
      contacts: [{ between: ['bob', 'block'], restitution: e }, { between: ['block', 'bench'] }],
      stations: [{ id: 'hit', when: { touch: ['bob', 'block'] } }],
      run: { until: 0.8 },
    });
    expectAudited(ran);
    const omega = Math.sqrt((2 * m * G * L) / inertia);
    const { row, touch } = ran.station('hit');
    const given = ((1 + e) * inertia * omega * L) / (inertia + M * L * L);
    expectWithin('speed at the strike [m/s]', ran.motion('bob', row).speed, omega * L, CLOSE);
    expectWithin('effective mass [kg]', touch?.effectiveMass ?? NaN, 1 / ((L * L) / inertia + 1 / M), CLOSE);
    expectWithin('speed given [m/s]', ran.motion('block').vx, given, CLOSE);
    expectWithin('speed left [m/s]', ran.motion('bob', row + 1).vx, given - e * omega * L, CLOSE);
    const lost = (0.5 * (1 - e * e) * (omega * L) ** 2) / ((L * L) / inertia + 1 / M);
    expectWithin('lost [J]', ran.entry('impact', 'bob/block').heat, lost, CLOSE);
  });
});

describe('two weights on a rope over a fixed point', () => {
  it('of 2 and 4 kg fall at g/3 with 26.1333 N in the rope (OpenStax sect. 6.1: 3.27 m/s², 26.1 N)', () => {
    const ran = audit({
      gravity: [0, -9.8],
      bodies: [particle('light', [-0.1, 0], 2), particle('heavy', [0.1, 0], 4)],
      joints: [
        {
          id: 'rope',
          kind: 'rope',
          through: [{ of: 'light', at: [-0.1, 0] }, ground(-0.1, 2), ground(0.1, 2), { of: 'heavy', at: [0.1, 0] }],
        },
      ],
      stations: [
        { id: 'start', when: { start: true } },
        { id: 'end', when: { end: true } },
      ],
      run: { until: 0.9 },
    });
    expectAudited(ran);
    expectWithin('acceleration [m/s²]', ran.motion('light').vy / 0.9, 9.8 / 3, CLOSE);
    // The rope takes of one what it gives to the other: 2·4/(2 + 4)·2 g over the way.
    const onLight = ran.ledger('start', 'end', ['light']).entries.find(({ account }) => account === 'rope');
    const onBoth = ran.entry('rope', 'rope');
    const way = 0.5 * (9.8 / 3) * 0.81;
    expectWithin('tension [N]', (onLight?.work ?? NaN) / way, 26.1333333333333, CLOSE);
    expect(Math.abs(onBoth.work)).toBeLessThan(1e-9);
  });
});

describe('a free slider-crank', () => {
  it('turns once in ∮ √(J(φ)/2E) dφ and keeps its energy (reduced inertia, any text on machines)', () => {
    const ran = audit({
      ...sliderCrank(),
      stations: [{ id: 'turn', when: { angle: { of: 'crank', passes: Math.PI / 2 + 2 * Math.PI } } }],
      run: { until: { station: 'turn' }, atMost: 2 },
    });
    expectAudited(ran);
    const [crank, rod, slider] = ran.mechanism.bodies;
    const reduced = (phi: number): number => {
      const [a, l, c, s] = [0.1, 0.3, Math.cos(phi), Math.sin(phi)];
      const reach = Math.sqrt(l * l - a * a * s * s);
      const rodSpin = (-a * c) / reach;
      const sliderSpeed = -a * s - (a * a * s * c) / reach;
      const rodSpeed = ((-a * s + sliderSpeed) / 2) ** 2 + ((a * c) / 2) ** 2;
      const own = crank.inertia + (crank.mass * a * a) / 4;
      return own + rod.mass * rodSpeed + rod.inertia * rodSpin ** 2 + slider.mass * sliderSpeed ** 2;
    };
    const energy = 0.5 * reduced(Math.PI / 2) * 100;
    const parts = 400;
    const turn = Array.from({ length: parts }, (_, i) => Math.sqrt(reduced((2 * Math.PI * i) / parts) / (2 * energy)));
    const period = (turn.reduce((sum, value) => sum + value, 0) * 2 * Math.PI) / parts;
    const { kineticFrom, kineticTo } = ran.ledger();
    expectWithin('energy [J]', kineticFrom, energy, 1e-12);
    expectWithin('energy after a turn [J]', kineticTo, energy, 1e-10);
    expectWithin('time of a turn [s]', ran.endTime, period, CLOSE);
    expectWithin('spin after it [rad/s]', ran.motion('crank').spin, 10, CLOSE);
  });
});

describe('a damper between two bodies that nothing else holds', () => {
  it('takes ½ μ (u₀² − u²) with u = u₀ exp(−c t/μ), of momentum nothing', () => {
    const [m, M, c, t] = [2, 3, 4, 0.5];
    const ran = audit({
      gravity: [0, 0],
      bodies: [particle('a', [0, 0], m, { velocity: [1, 0] }), particle('b', [1, 0], M, { velocity: [3, 0] })],
      dampers: [
        {
          id: 'dashpot',
          between: [
            { of: 'a', at: [0, 0] },
            { of: 'b', at: [1, 0] },
          ],
          coefficient: c,
        },
      ],
      run: { until: t },
    });
    expectAudited(ran);
    const mu = (m * M) / (m + M);
    const u = 2 * Math.exp((-c * t) / mu);
    const mean = (m * 1 + M * 3) / (m + M);
    expectWithin('speed of a [m/s]', ran.motion('a').vx, mean - (M / (m + M)) * u, CLOSE);
    expectWithin('speed of b [m/s]', ran.motion('b').vx, mean + (m / (m + M)) * u, CLOSE);
    expectWithin('heat [J]', ran.entry('damper', 'dashpot').heat, 0.5 * mu * (4 - u * u), CLOSE);
  });
});

describe('a damped oscillator', () => {
  it('of ζ = 0.1 is at 0.0531802 m after a damped period, with 0.3585933 J of heat of 0.5 J (closed form)', () => {
    const ends = [ground(0, 0), { of: 'mass', at: [1.1, 0] }] as const;
    const ran = audit({
      gravity: [0, 0],
      bodies: [particle('mass', [1.1, 0], 1)],
      springs: [spring(...ends, { rate: 100, freeLength: 1 })],
      dampers: [{ id: 'dashpot', between: ends, coefficient: 2 }],
      run: { until: 0.631483883399655 },
    });
    expectAudited(ran);
    expectWithin('x [m]', ran.motion('mass').x - 1, 0.053180208294426, CLOSE);
    expectWithin('heat [J]', ran.entry('damper', 'dashpot').heat, 0.358593272288073, CLOSE);
  });
});

describe('an orifice damper (exponent 2)', () => {
  it('slows a carriage to v₀/(1 + c v₀ t/m) in (m/c) ln(1 + c v₀ t/m) (m v′ = −c v²)', () => {
    const [m, c, v0, t] = [2, 6, 3, 0.8];
    const ran = audit({
      gravity: [0, 0],
      bodies: [particle('carriage', [1, 0], m, { velocity: [v0, 0] })],
      dampers: [
        { id: 'orifice', between: [ground(0, 0), { of: 'carriage', at: [1, 0] }], coefficient: c, exponent: 2 },
      ],
      run: { until: t },
    });
    expectAudited(ran);
    const grow = 1 + (c * v0 * t) / m;
    expectWithin('speed [m/s]', ran.motion('carriage').vx, v0 / grow, CLOSE);
    expectWithin('travel [m]', ran.motion('carriage').x - 1, (m / c) * Math.log(grow), CLOSE);
  });
});

describe('a block that a spring throws and friction stops', () => {
  it('of 3 kg, 4500 N/m, 8 cm comes 2.0 m far where μ = 0.244898 (OpenStax sect. 7.3), at the time of its two phases', () => {
    const [k, m, x0, mu] = [4500, 3, 0.08, 0.244897959183673];
    const ran = audit({
      gravity: [0, -9.8],
      bodies: [box('block', [0, 0.05], [0.1, 0.1], m)],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: mu }],
      springs: [
        spring(ground(-1, 0.05), { of: 'block', at: [0, 0.05] }, { rate: k, freeLength: 1 + x0, acts: 'compression' }),
      ],
      run: { until: 2 },
    });
    expectAudited(ran);
    const omega = Math.sqrt(k / m);
    const shift = (mu * 9.8) / omega ** 2;
    const swing = Math.acos(-shift / (x0 - shift));
    const thrown = omega * (x0 - shift) * Math.sin(swing);
    const stop = ran.events('sticks').at(-1);
    expectWithin('travel [m]', ran.motion('block').x, 2, CLOSE);
    expectWithin('stops at [s]', stop?.time ?? NaN, swing / omega + thrown / (mu * 9.8), CLOSE);
    expectWithin('heat [J]', ran.entry('friction', 'block/floor').heat, 0.5 * k * x0 * x0, CLOSE);
  });
});
