import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../support/audit.js';
import { expectWithin } from '../../support/expect.js';
import { box, degrees, disc, floor, onRamp, ramp, track } from '../../support/parts.js';
import { G, type Parts, type Run } from '../../support/run.js';

const CLOSE = 1e-9;
const earth = { gravity: [0, -9.81] };
const openStax = { gravity: [0, -9.8] };
const held = (rate: number, at: [number, number]): Parts => ({
  id: 'spring',
  kind: 'linear',
  between: [
    { of: 'ground', at: [-1, 0.05] },
    { of: 'block', at },
  ],
  rate,
  freeLength: 1,
});

describe('an oscillator with Coulomb friction (closed form, half cycle by half cycle)', () => {
  it('shifts by μ m g/k each half cycle, stops at −0.0019 m after 5 π √(m/k), with 0.4998195 J of heat', () => {
    const ran = audit({
      ...earth,
      bodies: [box('block', [0.1, 0.05], [0.1, 0.1], 1)],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: 0.1 }],
      springs: [held(100, [0.1, 0.05])],
      run: { until: 2 },
    });
    expectAudited(ran);
    expectWithin('stops at [s]', ran.events('sticks').at(-1)?.time ?? NaN, 1.5707963267949, CLOSE);
    expectWithin('stops at [m]', ran.motion('block').x, -0.0019, 1e-8);
    expectWithin('heat [J]', ran.entry('friction', 'block/floor').heat, 0.4998195, CLOSE);
    expectWithin('left in the spring [J]', ran.entry('spring', 'spring').stored?.to ?? NaN, 1.805e-4, 1e-7);
  });
});

describe('stick–slip on a belt, μs 0.4, μk 0.25', () => {
  it('slips for (π + 2 atan(v/(ω D)))/ω, sticks for 2 D/v, and makes 1.7850202 J of heat a period', () => {
    const ran = audit({
      ...earth,
      bodies: [box('block', [0, 0.05], [0.1, 0.1], 10, { velocity: [0.1, 0] })],
      tracks: [{ ...floor, id: 'belt', surfaceSpeed: 0.1 }],
      contacts: [{ between: ['block', 'belt'], staticFriction: 0.4, kineticFriction: 0.25 }],
      springs: [held(1000, [0, 0.05])],
      stations: [
        { id: 'b0', when: { sticks: ['block', 'belt'] } },
        { id: 'a', when: { slips: ['block', 'belt'] }, after: 'b0' },
        { id: 'b', when: { sticks: ['block', 'belt'] }, after: 'a' },
        { id: 'c', when: { slips: ['block', 'belt'] }, after: 'b' },
      ],
      run: { until: 2.5 },
    });
    expectAudited(ran);
    const [a, b, c] = ['a', 'b', 'c'].map((id) => ran.station(id).time);
    expectWithin('slip [s]', b - a, 0.43353696277, CLOSE);
    expectWithin('stick [s]', c - b, 0.2943, CLOSE);
    const friction = ran.entry('friction', 'block/belt', ran.ledger('a', 'c'));
    expectWithin('heat [J]', friction.heat, 1.78502015119, CLOSE);
    // A whole period leaves the block's energy as it was: the belt's friction does no work on it.
    expect(Math.abs(friction.work)).toBeLessThan(1e-9 * friction.heat);
  });
});

describe('static friction before kinetic (OpenStax University Physics 1, sect. 6.2)', () => {
  const pushed = (force: number): Run =>
    audit({
      ...openStax,
      bodies: [box('crate', [0, 0.25], [0.5, 0.5], 20)],
      tracks: [floor],
      contacts: [{ between: ['crate', 'floor'], staticFriction: 0.7, kineticFriction: 0.6 }],
      loads: [{ id: 'push', on: { of: 'crate', at: [0, 0] }, force: [force, 0] }],
      run: { until: 1 },
    });

  it.each([20, 30, 120])('holds a crate of 20 kg against a push of %d N with as much', (force) => {
    const ran = pushed(force);
    expectAudited(ran);
    expectWithin('friction [N]', Math.abs(ran.contact('crate', 'floor', 'friction')), force, 1e-12);
    expect(Math.abs(ran.motion('crate').x)).toBeLessThan(1e-15);
  });

  it('lets go at 180 N: 117.6 N of friction and 3.12 m/s² (printed: 118 N, 3.10)', () => {
    const ran = pushed(180);
    expectAudited(ran);
    expectWithin('friction [N]', Math.abs(ran.contact('crate', 'floor', 'friction')), 117.6, 1e-12);
    expectWithin('speed after 1 s [m/s]', ran.motion('crate').vx, 3.12, CLOSE);
  });
});

describe('a crate of 50 kg on a truck bed, μs 0.4, μk 0.3 (OpenStax sect. 6.2)', () => {
  const onTruck = (acceleration: number): Run => {
    const follows = acceleration <= 0.4 * 9.8;
    const force = 1000 * acceleration + 50 * (follows ? acceleration : 0.3 * 9.8);
    return audit({
      ...openStax,
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

  it('is carried along at 2 m/s² by 100 N, and no heat is made', () => {
    const ran = onTruck(2);
    expectAudited(ran);
    expectWithin('friction [N]', Math.abs(ran.contact('crate', 'truck', 'friction')), 100, 1e-11);
    expectWithin('speed [m/s]', ran.motion('crate').vx, 1, CLOSE);
    expect(ran.total('friction', 'heat')).toBe(0);
  });

  it('slips at 5 m/s²: 147 N, 2.94 m/s², and internal friction works on the two together (common practice)', () => {
    const ran = onTruck(5);
    expectAudited(ran);
    expectWithin('friction [N]', Math.abs(ran.contact('crate', 'truck', 'friction')), 147, 1e-11);
    expectWithin('crate [m/s]', ran.motion('crate').vx, 0.5 * 2.94, CLOSE);
    expectWithin('truck [m/s]', ran.motion('truck').vx, 0.5 * 5, CLOSE);
    // Slip of ½ (5 − 2.94) t² against 147 N.
    const { heat, work } = ran.entry('friction', 'crate/truck');
    expectWithin('heat [J]', heat, 147 * 0.5 * 2.06 * 0.25, CLOSE);
    expectWithin('work on both [J]', work, -heat, CLOSE);
  });
});

describe('a block of 2 kg on one of 4 kg, joined by a cord over a pulley, μk 0.4 (OpenStax sect. 6.2)', () => {
  it('moves at an even speed under P = 39.2 N', () => {
    // The cord runs from the lower block round a point at the left to the upper one: they move apart at equal speeds.
    const ran = audit({
      ...openStax,
      bodies: [
        box('lower', [0, 0.1], [4, 0.2], 4, { velocity: [0.5, 0] }),
        box('upper', [0, 0.3], [0.4, 0.2], 2, { velocity: [-0.5, 0] }),
      ],
      tracks: [floor],
      contacts: [
        { between: ['lower', 'floor'], friction: 0.4 },
        { between: ['upper', 'lower'], friction: 0.4 },
      ],
      joints: [
        {
          id: 'cord',
          kind: 'rope',
          through: [
            { of: 'lower', at: [-2, 0.1] },
            { of: 'ground', at: [-5, 0.1] },
            { of: 'ground', at: [-5, 0.3] },
            { of: 'upper', at: [-0.2, 0.3] },
          ],
        },
      ],
      loads: [{ id: 'P', on: { of: 'lower', at: [2, 0.1] }, force: [0.4 * (6 + 2) * 9.8 + 0.4 * 2 * 9.8, 0] }],
      run: { until: 0.5 },
    });
    expectAudited(ran);
    expectWithin('lower [m/s]', ran.motion('lower').vx, 0.5, CLOSE);
    expectWithin('upper [m/s]', ran.motion('upper').vx, -0.5, CLOSE);
  });
});

describe('a block on a ramp', () => {
  const onto = (angle: number, friction: number, until: number): Run =>
    audit({
      bodies: [box('block', onRamp(angle, 1, 0.05), [0.2, 0.1], 3, { angle: -degrees(angle) })],
      tracks: [ramp(angle, 20)],
      contacts: [{ between: ['block', 'ramp'], friction }],
      run: { until },
    });

  it('of 15° with μ 0.3 does not creep at all', () => {
    const ran = onto(15, 0.3, 5);
    expectAudited(ran);
    const [start, end] = [ran.motion('block', 0), ran.motion('block')];
    expect(Math.hypot(end.x - start.x, end.y - start.y)).toBeLessThan(1e-13);
    const friction = Math.abs(ran.contact('block', 'ramp', 'friction'));
    expectWithin('friction [N]', friction, 3 * G * Math.sin(degrees(15)), 1e-12);
  });

  it('of 17° with μ 0.3 slides, since tan 17° > 0.3', () => {
    const a = G * (Math.sin(degrees(17)) - 0.3 * Math.cos(degrees(17)));
    expectWithin('speed [m/s]', onto(17, 0.3, 1).motion('block').speed, a, CLOSE);
  });
});

describe('two hoops and discs on 60°, μ 0.6 (OpenStax sect. 11.1)', () => {
  const down = (share: number): Run =>
    audit({
      ...openStax,
      bodies: [disc('body', onRamp(60, 1, 0.1), 0.1, 2, { inertia: share * 0.02 })],
      tracks: [ramp(60, 20)],
      contacts: [{ between: ['body', 'ramp'], friction: 0.6 }],
      run: { until: 0.5 },
    });

  it('the hollow one slips, since it needs tan 60°/2 = 0.87; the solid one rolls, for it needs 0.58', () => {
    const [hollow, solid] = [down(1), down(0.5)];
    expectAudited(hollow);
    expectAudited(solid);
    const [s, c] = [Math.sin(degrees(60)), Math.cos(degrees(60))];
    expectWithin('hollow [m/s]', hollow.motion('body').speed, 0.5 * 9.8 * (s - 0.6 * c), CLOSE);
    expectWithin('solid [m/s]', solid.motion('body').speed, 0.5 * (2 / 3) * 9.8 * s, CLOSE);
  });
});

describe('a roller of 600 kg that 850 N pull at 30° (Tayal, Engineering Mechanics, Ex. 23.2)', () => {
  it('has 3 m/s after 5.501808 m', () => {
    const ran = audit({
      ...earth,
      bodies: [disc('roller', [0, 0.25], 0.25, 600)],
      tracks: [floor],
      contacts: [{ between: ['roller', 'floor'], friction: 0.5 }],
      loads: [
        {
          id: 'pull',
          on: { of: 'roller', at: [0, 0.25] },
          force: [850 * Math.cos(degrees(30)), 850 * Math.sin(degrees(30))],
        },
      ],
      stations: [
        {
          id: 'there',
          when: {
            crosses: {
              point: { of: 'roller', at: [0, 0.25] },
              line: [
                [5.501808, 0],
                [5.501808, 1],
              ],
            },
          },
        },
      ],
      run: { until: { station: 'there' }, atMost: 10 },
    });
    expect(ran.station('there').time).toBeGreaterThan(0);
    // The disc turns, so that its centre is what is looked at: F cos 30° s = ¾ m v².
    const { x, vx } = ran.motion('roller');
    expectWithin('v² [m²/s²]', vx * vx, (850 * Math.cos(degrees(30)) * x) / 450, CLOSE);
    expectWithin('speed [m/s]', vx, 3, 1e-6);
  });
});

describe('a belt that brings crates', () => {
  it('carries a crate along at 1.2/(μ g), with a heat of friction as great as the energy it gives', () => {
    const ran = audit({
      bodies: [box('crate', [0, 0.1], [0.3, 0.2], 6)],
      tracks: [{ ...floor, id: 'belt', surfaceSpeed: 1.2 }],
      contacts: [{ between: ['crate', 'belt'], friction: 0.3 }],
      run: { until: 0.8 },
    });
    expectAudited(ran);
    expectWithin('carried along at [s]', ran.events('sticks')[0].time, 1.2 / (0.3 * G), CLOSE);
    const { heat, work } = ran.entry('friction', 'crate/belt');
    expectWithin('work [J]', work, 0.5 * 6 * 1.44, CLOSE);
    expectWithin('heat [J]', heat, 0.5 * 6 * 1.44, CLOSE);
  });

  it('hands a block over to a smooth table at its own speed', () => {
    const ran = audit({
      bodies: [box('block', [-1, 0.05], [0.2, 0.1], 2)],
      tracks: [{ ...track('belt', [-2, 0], [0, 0]), surfaceSpeed: 0.8 }, track('table', [0, 0], [5, 0])],
      contacts: [{ between: ['block', 'belt'], friction: 0.5 }, { between: ['block', 'table'] }],
      run: { until: 3 },
    });
    expectAudited(ran);
    expectWithin('speed [m/s]', ran.motion('block').vx, 0.8, CLOSE);
    expect(ran.total('impact', 'heat')).toBe(0);
    expectWithin('height [m]', ran.motion('block').y, 0.05, 1e-12);
  });
});
