import { describe, expect, it } from 'vitest';
import { box, degrees, disc, floor, onRamp, ramp, track } from '../support/parts.js';
import { expectSound, expectWithin } from '../support/expect.js';
import { G, run } from '../support/run.js';

describe('a disc that is set down sliding', () => {
  it('rolls at v₀/(3 μ g) = 0.509684 s with ⅔ v₀, after 3 J of heat (Coulomb friction on a solid disc)', () => {
    const ran = run({
      gravity: [0, -9.81],
      bodies: [disc('disc', [0, 0.1], 0.1, 2, { velocity: [3, 0] })],
      tracks: [floor],
      contacts: [{ between: ['disc', 'floor'], friction: 0.2 }],
      run: { until: 1 },
    });
    expectSound(ran);
    const [sticks] = ran.events('sticks');
    expectWithin('rolls at [s]', sticks.time, 0.509683995922528, 1e-5);
    expectWithin('travelled [m]', ran.motion('disc', sticks.row).x, 1.27420998980632, 1e-5);
    expectWithin('speed [m/s]', ran.motion('disc').vx, 2, 1e-6);
    expectWithin('heat [J]', ran.entry('friction', 'disc/floor').heat, 3, 1e-6);
    expect(ran.total('impact')).toBe(0);
  });
});

describe('an oscillator with Coulomb friction', () => {
  const ran = run({
    gravity: [0, -9.81],
    bodies: [box('block', [0.1, 0.05], [0.1, 0.1], 1)],
    tracks: [floor],
    contacts: [{ between: ['block', 'floor'], friction: 0.1 }],
    springs: [
      {
        id: 'spring',
        kind: 'linear',
        between: [
          { of: 'ground', at: [-1, 0.05] },
          { of: 'block', at: [0.1, 0.05] },
        ],
        rate: 100,
        freeLength: 1,
      },
    ],
    run: { until: 2 },
  });

  it('shifts by μ m g/k each half cycle and stops at −0.0019 m after 5 π √(m/k) = 1.570796 s', () => {
    expectSound(ran);
    const stop = ran.events('sticks').at(-1);
    expectWithin('stops at [s]', stop?.time ?? NaN, 1.5707963267949, 1e-4);
    expectWithin('stops at [m]', ran.motion('block').x, -0.0019, 1e-4);
  });

  it('makes 0.4998195 J of heat on 0.5095 m of path, and leaves 1.805e-4 J in the spring', () => {
    expectWithin('heat [J]', ran.entry('friction', 'block/floor').heat, 0.4998195, 1e-6);
    expectWithin('left in the spring [J]', ran.entry('spring', 'spring').stored?.to ?? NaN, 1.805e-4, 1e-4);
  });
});

describe('stick–slip on a belt, μs 0.4, μk 0.25', () => {
  // 10 kg on 1000 N/m, belt 0.1 m/s: slip (π + 2 atan(v/(ω D)))/ω, stick 2 D/v, D = (Fs − Fk)/k; closed form.
  const ran = run({
    gravity: [0, -9.81],
    bodies: [box('block', [0, 0.05], [0.1, 0.1], 10, { velocity: [0.1, 0] })],
    tracks: [{ ...floor, id: 'belt', surfaceSpeed: 0.1 }],
    contacts: [{ between: ['block', 'belt'], staticFriction: 0.4, kineticFriction: 0.25 }],
    springs: [
      {
        id: 'spring',
        kind: 'linear',
        between: [
          { of: 'ground', at: [-1, 0.05] },
          { of: 'block', at: [0, 0.05] },
        ],
        rate: 1000,
        freeLength: 1,
      },
    ],
    stations: [
      { id: 'a', when: { slips: ['block', 'belt'] }, after: 'b0' },
      { id: 'b0', when: { sticks: ['block', 'belt'] } },
      { id: 'b', when: { sticks: ['block', 'belt'] }, after: 'a' },
      { id: 'c', when: { slips: ['block', 'belt'] }, after: 'b' },
    ],
    // Breaking loose is found to a step, so that the times are as good as the step is short.
    run: { until: 2.5, step: 2e-4 },
  });
  const [a, b, c] = ['a', 'b', 'c'].map((id) => ran.station(id).time);

  it('slips for 0.4335370 s and sticks for 0.2943 s: a period of 0.7278370 s', () => {
    expectSound(ran);
    expectWithin('slip [s]', b - a, 0.43353696277, 2e-3);
    expectWithin('stick [s]', c - b, 0.2943, 2e-3);
    expectWithin('period [s]', c - a, 0.72783696277, 1e-3);
  });

  it('makes 1.7850202 J of heat a period, which the belt pays', () => {
    const friction = ran.entry('friction', 'block/belt', ran.ledger('a', 'c'));
    expectWithin('heat [J]', friction.heat, 1.78502015119, 1e-3);
    // A whole period leaves the block's energy as it was: the belt's friction does no work on it.
    expect(Math.abs(friction.work)).toBeLessThan(1e-2 * friction.heat);
  });
});

describe('static friction before kinetic', () => {
  // A 20 kg crate, μs 0.7, μk 0.6, g 9.8, pushed by 20, 30, 120 and 180 N (OpenStax University Physics 1, sect. 6.2).
  const pushed = (force: number): ReturnType<typeof run> =>
    run({
      gravity: [0, -9.8],
      bodies: [box('crate', [0, 0.25], [0.5, 0.5], 20)],
      tracks: [floor],
      contacts: [{ between: ['crate', 'floor'], staticFriction: 0.7, kineticFriction: 0.6 }],
      loads: [{ id: 'push', on: { of: 'crate', at: [0, 0] }, force: [force, 0] }],
      run: { until: 1 },
    });

  it.each([20, 30, 120])('holds against a push of %d N with as much', (force) => {
    const ran = pushed(force);
    expect(Math.abs(ran.contact('crate', 'floor', 'friction'))).toBeCloseTo(force, 6);
    expect(Math.abs(ran.motion('crate').x)).toBeLessThan(1e-9);
  });

  it('lets go at 180 N: 117.6 N of friction and 3.12 m/s²', () => {
    const ran = pushed(180);
    expectSound(ran);
    expectWithin('friction [N]', Math.abs(ran.contact('crate', 'floor', 'friction')), 117.6, 1e-6);
    expectWithin('speed after 1 s [m/s]', ran.motion('crate').vx, 3.12, 1e-4);
  });
});

describe('a crate on a truck bed', () => {
  // 50 kg, μs 0.4, μk 0.3, g 9.8 (OpenStax sect. 6.2); the bed is a sledge pushed along a smooth floor.
  const onTruck = (acceleration: number): ReturnType<typeof run> => {
    const follows = acceleration <= 0.4 * 9.8;
    const force = 1000 * acceleration + 50 * (follows ? acceleration : 0.3 * 9.8);
    return run({
      gravity: [0, -9.8],
      bodies: [box('truck', [0, 0.5], [6, 1], 1000), box('crate', [0, 1.25], [0.5, 0.5], 50)],
      tracks: [floor],
      contacts: [
        { between: ['truck', 'floor'] },
        { between: ['crate', 'truck'], staticFriction: 0.4, kineticFriction: 0.3 },
      ],
      loads: [{ id: 'pull', on: { of: 'truck', at: [0, 0.5] }, force: [force, 0] }],
      run: { until: 0.5 },
    });
  };

  it('is carried along at 2 m/s² by 100 N', () => {
    const ran = onTruck(2);
    expectSound(ran);
    expect(Math.abs(ran.contact('crate', 'truck', 'friction'))).toBeCloseTo(100, 4);
    expectWithin('speed [m/s]', ran.motion('crate').vx, 1, 1e-6);
    expect(Math.abs(ran.total('friction', 'heat'))).toBeLessThan(1e-6 * ran.ledger().turnover);
  });

  it('slips at 5 m/s²: 147 N and 2.94 m/s²', () => {
    const ran = onTruck(5);
    expectSound(ran);
    expect(Math.abs(ran.contact('crate', 'truck', 'friction'))).toBeCloseTo(147, 4);
    expectWithin('crate [m/s]', ran.motion('crate').vx, 0.5 * 2.94, 1e-4);
    expectWithin('truck [m/s]', ran.motion('truck').vx, 0.5 * 5, 1e-4);
    // Slip of ½ (5 − 2.94) t² against 147 N.
    expectWithin('heat [J]', ran.entry('friction', 'crate/truck').heat, 147 * 0.5 * 2.06 * 0.25, 1e-3);
  });
});

describe('a block on a ramp', () => {
  const onto = (angle: number, friction: number, until: number): ReturnType<typeof run> =>
    run({
      bodies: [box('block', onRamp(angle, 1, 0.05), [0.2, 0.1], 3, { angle: -degrees(angle) })],
      tracks: [ramp(angle, 20)],
      contacts: [{ between: ['block', 'ramp'], friction }],
      run: { until },
    });

  it('reaches g (sin 30° − μ cos 30°) t within 1e-4, and all its loss is friction', () => {
    const ran = onto(30, 0.2, 1.2);
    expectSound(ran);
    const a = G * (0.5 - 0.2 * Math.cos(degrees(30)));
    expectWithin('speed [m/s]', ran.motion('block').speed, a * 1.2, 1e-4);
    const heat = 0.2 * 3 * G * Math.cos(degrees(30)) * 0.5 * a * 1.44;
    expectWithin('heat [J]', ran.entry('friction', 'block/ramp').heat, heat, 1e-4);
    expect(ran.total('impact')).toBe(0);
  });

  it('at 15° with μs 0.3 creeps less than 1 µm in 5 s (need of the stepper)', () => {
    const ran = onto(15, 0.3, 5);
    expectSound(ran);
    const [start, end] = [ran.motion('block', 0), ran.motion('block')];
    const crept = Math.hypot(end.x - start.x, end.y - start.y);
    console.log(`creep: ${crept.toExponential(1)} m in 5 s`);
    expect(crept).toBeLessThan(1e-6);
    expect(Math.abs(ran.contact('block', 'ramp', 'friction'))).toBeCloseTo(3 * G * Math.sin(degrees(15)), 6);
  });

  it('at 17° with μ 0.3 slides, since tan 17° > 0.3', () => {
    expect(onto(17, 0.3, 1).motion('block').speed).toBeCloseTo(
      G * (Math.sin(degrees(17)) - 0.3 * Math.cos(degrees(17))),
      4,
    );
  });
});

describe('a disc on a ramp', () => {
  const down = (angle: number, friction: number): ReturnType<typeof run> =>
    run({
      bodies: [disc('disc', onRamp(angle, 1, 0.1), 0.1, 2)],
      tracks: [ramp(angle, 20)],
      contacts: [{ between: ['disc', 'ramp'], friction }],
      run: { until: 1 },
    });

  it('rolls at ⅔ g sin 30° where μ ≥ tan 30°/3, within 1e-4 (OpenStax sect. 11.1)', () => {
    const ran = down(30, 0.2);
    expectSound(ran);
    expectWithin('speed [m/s]', ran.motion('disc').speed, (2 / 3) * G * 0.5, 1e-4);
    expect(Math.abs(ran.total('friction', 'heat'))).toBeLessThan(1e-6 * ran.ledger().turnover);
  });

  it('slips below it: g (sin 30° − μ cos 30°), spun up by 2 μ g cos 30°/r', () => {
    const ran = down(30, 0.15);
    expectSound(ran);
    const c = Math.cos(degrees(30));
    expectWithin('speed [m/s]', ran.motion('disc').speed, G * (0.5 - 0.15 * c), 1e-4);
    expectWithin('spin [rad/s]', -ran.motion('disc').spin, (2 * 0.15 * G * c) / 0.1, 1e-4);
  });

  it('with a rolling resistance f rolls at ⅔ g (sin α − (f/r) cos α)', () => {
    const ran = run({
      bodies: [disc('disc', onRamp(10, 1, 0.1), 0.1, 2)],
      tracks: [ramp(10, 20)],
      contacts: [{ between: ['disc', 'ramp'], friction: 0.5, rollingResistance: 0.005 }],
      run: { until: 1 },
    });
    expectSound(ran);
    const [s, c] = [Math.sin(degrees(10)), Math.cos(degrees(10))];
    const a = (2 / 3) * G * (s - 0.05 * c);
    expectWithin('speed [m/s]', ran.motion('disc').speed, a, 1e-4);
    expectWithin('heat [J]', ran.entry('rolling-resistance', 'disc/ramp').heat, 0.05 * 2 * G * c * 0.5 * a, 1e-4);
  });

  it('does not start to roll where tan α < f/r', () => {
    const ran = run({
      bodies: [disc('disc', onRamp(2, 1, 0.1), 0.1, 2)],
      tracks: [ramp(2, 20)],
      contacts: [{ between: ['disc', 'ramp'], friction: 0.5, rollingResistance: 0.005 }],
      run: { until: 2 },
    });
    expect(Math.hypot(ran.motion('disc').x - ran.motion('disc', 0).x)).toBeLessThan(1e-6);
  });
});

describe('a block that is pushed over the end of its belt', () => {
  it('keeps the speed of the belt on a smooth table', () => {
    const ran = run({
      bodies: [box('block', [-1, 0.05], [0.2, 0.1], 2)],
      tracks: [{ ...track('belt', [-2, 0], [0, 0]), surfaceSpeed: 0.8 }, track('table', [0, 0], [5, 0])],
      contacts: [{ between: ['block', 'belt'], friction: 0.5 }, { between: ['block', 'table'] }],
      run: { until: 3 },
    });
    expectSound(ran);
    expectWithin('speed [m/s]', ran.motion('block').vx, 0.8, 1e-4);
    expect(Math.abs(ran.total('impact'))).toBeLessThan(1e-9);
    expect(ran.motion('block').y).toBeCloseTo(0.05, 6);
  });
});

describe('a crate on a belt that gathers speed faster than friction can', () => {
  it('slips from the start at μk g, and is carried along once both run alike', () => {
    // The belt reaches 1.2 m/s in 0.3 s; the crate follows with 0.3 g and has it at 1.2/(0.3 g).
    const belt = {
      curve: [
        [0, 0],
        [0.3, 1.2],
        [2, 1.2],
      ],
    };
    const ran = run({
      bodies: [box('crate', [0, 0.1], [0.3, 0.2], 6)],
      tracks: [{ ...floor, id: 'belt', surfaceSpeed: belt }],
      contacts: [{ between: ['crate', 'belt'], staticFriction: 0.4, kineticFriction: 0.3 }],
      stations: [{ id: 'early', when: { time: 0.2 } }],
      run: { until: 0.8 },
    });
    expectSound(ran);
    expectWithin('at 0.2 s [m/s]', ran.motion('crate', ran.station('early').row).vx, 0.3 * G * 0.2, 1e-9);
    expectWithin('carried along at [s]', ran.events('sticks')[0].time, 1.2 / (0.3 * G), 1e-6);
    // The belt runs 0.18 m in its start and 1.2 m/s after; the crate ½ · 0.3 g t².
    const t = 1.2 / (0.3 * G);
    const slip = 0.18 + 1.2 * (t - 0.3) - 0.5 * 1.2 * t;
    expectWithin('heat [J]', ran.entry('friction', 'crate/belt').heat, 0.3 * 6 * G * slip, 1e-6);
    expect(ran.numericalShare()).toBeLessThan(1e-9);
  });

  it('is let go by a belt that brakes too hard, at the very moment (speed curves end at a step)', () => {
    const ran = run({
      bodies: [box('crate', [0, 0.1], [0.3, 0.2], 6, { velocity: [1, 0] })],
      tracks: [
        {
          ...floor,
          id: 'belt',
          surfaceSpeed: {
            curve: [
              [0, 1],
              [0.30317, 1],
              [0.5, 0],
            ],
          },
        },
      ],
      contacts: [{ between: ['crate', 'belt'], friction: 0.2 }],
      run: { until: 1.2 },
    });
    expectSound(ran);
    expectWithin('travel [m]', ran.motion('crate').x, 0.30317 + 0.5 / (0.2 * G), 1e-6);
    expect(ran.numericalShare()).toBeLessThan(1e-9);
  });
});

describe('a block that comes off its ramp onto a level', () => {
  it('loses nothing to the method where its corners come over the level: the same at any step', () => {
    const at = (step: number): ReturnType<typeof run> =>
      run(
        {
          bodies: [box('block', onRamp(25, 0.6, 0.05), [0.2, 0.1], 3, { angle: -degrees(25) })],
          tracks: [ramp(25, 2), track('level', onRamp(25, 2, 0), [8, onRamp(25, 2, 0)[1]])],
          contacts: [{ between: ['block', '*'], friction: 0.15 }],
          run: { until: 1.2 },
        },
        { step },
      );
    const [coarse, fine] = [at(1e-3), at(2e-4)];
    expectSound(fine);
    expect(coarse.numericalShare()).toBeLessThan(1e-5);
    expectWithin('lost in impacts [J]', coarse.total('impact', 'heat'), fine.total('impact', 'heat'), 1e-4);
    expect(coarse.motion('block').y).toBeCloseTo(onRamp(25, 2, 0)[1] + 0.05, 6);
  });
});
