import { describe, expect, it } from 'vitest';
import { evaluateCriteria, type CriterionResult } from '../../../sim/criteria/index.js';
import { box, disc, floor, onRamp, particle, ramp } from '../../support/parts.js';
import { run, type Parts } from '../../support/run.js';
import type { StepperOptions } from '../../../sim/stepper/index.js';

/** Judges the criteria of a document on the stepper's run of it, by their ids. */
function judge(parts: Parts, options: StepperOptions = {}): Record<string, CriterionResult> & { texts: string } {
  const { mechanism, recording } = run(parts, options);
  const { criteria, findings } = evaluateCriteria(mechanism, recording);
  const byId = Object.fromEntries(criteria.map((each) => [each.id, each]));
  return Object.assign(byId, { texts: findings.map(({ text }) => text).join('\n') });
}

/** Expects the value of a criterion within a relative bound of a closed form, and prints both. */
function expectValue({ id, value }: CriterionResult, exact: number, bound: number): void {
  const off = Math.abs(value! / exact - 1);
  console.log(`${id}: ${value!.toPrecision(12)} (exact ${exact.toPrecision(12)}, off by ${off.toExponential(1)})`);
  expect(off).toBeLessThanOrEqual(bound);
}

// A mass of 2 kg falls 0.5 m on a spring of 4000 N/m under 9.81 m/s² (Roark, Shigley: δ = δ_st (1 + √(1 + 2h/δ_st))).
const drop = { mass: 2, rate: 4000, fall: 0.5, gravity: 9.81 };
const speed = 3.13209195267317;
const force = 300.449030550618;
const pressed = 0.0751122576376545;
const contactTime = 0.0733751333111518;

describe('a drop on a compliant stop', () => {
  const pair = ['weight', 'floor'];
  const parts: Parts = {
    gravity: [0, -drop.gravity],
    bodies: [particle('weight', [0, drop.fall], drop.mass)],
    tracks: [floor],
    contacts: [{ between: pair, stiffness: drop.rate }],
    stations: [
      { id: '1', when: { start: true } },
      { id: '2', when: { touch: pair } },
      { id: '3', when: { turns: { of: 'weight', along: [0, 1] } }, after: '2' },
      { id: '4', when: { parts: pair } },
    ],
    criteria: [
      { id: 'approach', measure: 'approachSpeed', of: pair, at: '2', atMost: 3.2 },
      { id: 'mass', measure: 'effectiveMass', of: pair, at: '2', between: [1.9, 2.1] },
      { id: 'force', measure: 'peakForce', of: pair, from: '2', to: '4', atMost: 300 },
      { id: 'stored', measure: 'storedEnergy', of: pair, at: '3', atMost: 12 },
      { id: 'contact', measure: 'duration', from: '2', to: '4', atMost: 0.08 },
      { id: 'travel', measure: 'travel', of: 'weight', from: '1', to: '3', atMost: 0.6 },
      { id: 'apart', measure: 'liftOff', of: pair, atMost: 1 },
      { id: 'lift', measure: 'work', account: 'gravity', from: '1', to: '2', atLeast: 9 },
    ],
    run: { until: 1.2 },
  };
  const found = judge(parts, { step: 1e-4 });

  it('meets it at √(2 g h), with its own mass', () => {
    expectValue(found.approach, speed, 1e-6);
    expectValue(found.mass, drop.mass, 1e-12);
  });

  it('presses with k δ at the most, and fails a limit just below', () => {
    expectValue(found.force, force, 1e-5);
    expect(found.force).toMatchObject({ passes: false, by: 'stepper' });
    expect(found.force.margin).toBeCloseTo(300 - force, 2);
    expect(found.force.resolution).toBeLessThan(1e-3);
    expect(found.texts).not.toContain('impact');
  });

  it('stores ½ k δ², touches for the printed time, and travels h + δ', () => {
    expectValue(found.stored, 0.5 * drop.rate * pressed ** 2, 1e-5);
    // The stepper dates a touch to the step's end, and a parting to the end of the first step without a force.
    expect(Math.abs(found.contact.value! - contactTime)).toBeLessThanOrEqual(2e-4);
    expectValue(found.travel, drop.fall + pressed, 1e-6);
  });

  it('is apart for 2 v / g between two contacts', () => {
    expectValue(found.apart, (2 * speed) / drop.gravity, 4e-4);
    expectValue(found.lift, drop.mass * drop.gravity * drop.fall, 1e-6);
  });

  it('shows the same peak with few rows as with all, to 1e-5, and says that the rows are no matter', () => {
    const few = judge(parts, { step: 1e-4, rows: 300 }).force;
    console.log(`with 300 rows: ${few.value} ± ${few.resolution} N, with all: ${found.force.value} N`);
    expect(Math.abs(few.value! - found.force.value!)).toBeLessThanOrEqual(1e-5 * force);
    expect(few.resolution).toBeLessThan(0.05);
  });
});

it('a drop on a spring: peak force and stroke of the spring, between rows', () => {
  // The head is of no mass that counts: the weight hangs on the spring from the start of its contact, here fixed to it.
  const found = judge({
    gravity: [0, -drop.gravity],
    bodies: [particle('weight', [0, 0.3], drop.mass, { velocity: [0, -speed] })],
    springs: [
      {
        ...{ id: 'spring', kind: 'linear', rate: drop.rate },
        between: [
          { of: 'weight', at: [0, 0.3] },
          { of: 'ground', at: [0, 0] },
        ],
      },
    ],
    criteria: [
      { id: 'force', measure: 'peakForce', of: 'spring', atMost: 310 },
      { id: 'stroke', measure: 'stroke', of: 'spring', between: [0.07, 0.08] },
    ],
    run: { until: 0.06 },
  });
  expectValue(found.force, force, 1e-5);
  expectValue(found.stroke, pressed, 1e-5);
  expect([found.force.passes, found.stroke.passes]).toEqual([true, true]);
});

it('a drop on a rigid floor has no peak force, and says so', () => {
  const found = judge({
    bodies: [disc('ball', [0, 0.6], 0.1, 1)],
    tracks: [floor],
    contacts: [{ between: ['ball', 'floor'], restitution: 1 }],
    criteria: [{ id: 'force', measure: 'peakForce', of: ['ball', 'floor'], atMost: 1 }],
    run: { until: 1 },
  });
  expect(found.force).toMatchObject({ value: null, passes: null });
  expect(found.texts).toContain('a rigid impact has no force');
});

it('a ball that comes to rest after a rigid blow presses with its weight, and the blow is left out', () => {
  const found = judge({
    bodies: [disc('ball', [0, 0.6], 0.1, 3)],
    tracks: [floor],
    contacts: [{ between: ['ball', 'floor'] }],
    criteria: [
      { id: 'force', measure: 'peakForce', of: ['ball', 'floor'], atMost: 30 },
      { id: 'heat', measure: 'heat', of: ['ball', 'floor'], atMost: 15 },
      { id: 'apart', measure: 'liftOff', of: ['ball', 'floor'], atMost: 0.1 },
    ],
    run: { until: 1 },
  });
  expectValue(found.force, 3 * 9.80665, 1e-6);
  expect(found.force.note).toBe('1 rigid impact has no force, and is left out.');
  expectValue(found.heat, 3 * 9.80665 * 0.5, 1e-6);
  expect(found.apart.value).toBe(0);
});

it('a box on a ramp presses with N and μ N together, summed over both its corners', () => {
  const found = judge({
    bodies: [box('box', onRamp(30, 0.5, 0.05), [0.2, 0.1], 5, { angle: -Math.PI / 6 })],
    tracks: [ramp(30, 4)],
    contacts: [{ between: ['box', 'ramp'], friction: 0.2 }],
    stations: [
      { id: '1', when: { start: true } },
      { id: '2', when: { time: 0.5 } },
    ],
    criteria: [
      { id: 'force', measure: 'peakForce', of: ['box', 'ramp'], from: '1', to: '2', atMost: 50 },
      { id: 'slip', measure: 'slipSpeed', of: ['box', 'ramp'], at: '2', atMost: 2 },
      { id: 'heat', measure: 'heat', of: ['box', 'ramp'], from: '1', to: '2', atMost: 9 },
      { id: 'speed', measure: 'speed', of: 'box', at: '2', atMost: 2 },
      { id: 'travel', measure: 'travel', of: 'box', from: '1', to: '2', atMost: 2 },
    ],
    run: { until: 0.6 },
  });
  const normal = 5 * 9.80665 * Math.cos(Math.PI / 6);
  const acceleration = 9.80665 * (0.5 - 0.2 * Math.cos(Math.PI / 6));
  expectValue(found.force, normal * Math.hypot(1, 0.2), 1e-6);
  expectValue(found.speed, acceleration * 0.5, 1e-9);
  expectValue(found.travel, acceleration * 0.125, 1e-9);
  expectValue(found.heat, 0.2 * normal * acceleration * 0.125, 1e-6);
  // The sliding speed of a row is that at the middle of its step.
  expect(Math.abs(found.slip.value! - acceleration * 0.5)).toBeLessThanOrEqual(acceleration * 1e-3);
});

it('a pendulum: angle, kinetic energy and greatest pin force at the bottom, 3 m g from horizontal', () => {
  const found = judge(
    {
      bodies: [particle('bob', [1, 0], 1)],
      joints: [{ id: 'pivot', kind: 'pin', between: ['bob', 'ground'], at: [0, 0] }],
      gravity: [0, -9.81],
      stations: [
        { id: '1', when: { start: true } },
        {
          id: '2',
          when: {
            crosses: {
              point: { of: 'bob', at: [1, 0] },
              line: [
                [0, -0.5],
                [0, -1.5],
              ],
            },
          },
        },
      ],
      criteria: [
        { id: 'energy', measure: 'kineticEnergy', of: 'bob', at: '2', atMost: 10 },
        { id: 'speed', measure: 'speed', of: 'bob', at: '2', atMost: 5 },
        { id: 'pin', measure: 'peakForce', of: 'pivot', atMost: 29 },
      ],
      run: { until: 1 },
    },
    { step: 2e-4 },
  );
  // A Coruña benchmark A01: 4.42944691807002 m/s and 29.43 N at the bottom.
  expectValue(found.speed, 4.42944691807002, 1e-5);
  expectValue(found.energy, 9.81, 1e-5);
  expectValue(found.pin, 29.43, 1e-5);
  expect(found.pin.passes).toBe(false);
});

describe('a drive', () => {
  // 2 N m on a disc of 0.5 kg m² for 2 s: 8 rad/s, P = T² t / I, 16 J.
  const turned = (more: Parts, drive: Parts = {}): ReturnType<typeof judge> =>
    judge({
      gravity: [0, 0],
      bodies: [disc('wheel', [0, 0], 0.5, 4, { spin: 0 })],
      joints: [{ id: 'shaft', kind: 'pin', between: ['wheel', 'ground'], at: [0, 0], ...more }],
      drives: [{ id: 'motor', on: 'shaft', torque: 2, efficiency: 0.8, ...drive }],
      criteria: [
        { id: 'peak', measure: 'peakPower', of: 'motor', atMost: 16 },
        { id: 'mean', measure: 'meanPower', of: 'motor', atMost: 16 },
        { id: 'eta', measure: 'efficiency', useful: ['joint-friction'], input: ['drive'], atLeast: 0.1 },
        { id: 'claim', measure: 'claimedEfficiency', of: 'motor', value: 0.8 },
        { id: 'bold', measure: 'claimedEfficiency', of: 'motor', value: 1.05 },
        { id: 'angle', measure: 'angle', of: 'wheel', at: 'end', atMost: 9 },
      ],
      run: { until: 2 },
    });

  it('delivers T² t / I at its greatest, half of it in the mean, and turns the wheel by ½ α t²', () => {
    const found = turned({});
    expectValue(found.peak, 16, 1e-9);
    expectValue(found.mean, 8, 1e-9);
    expectValue(found.angle, 8, 1e-9);
  });

  it('is allowed its own efficiency where nothing is lost after it, and no more', () => {
    const found = turned({});
    expectValue(found.claim, 0.8, 1e-9);
    expect([found.claim.passes, found.bold.passes]).toEqual([true, false]);
    expect(found.texts).toContain('no store gave up energy, and the 5 J too many came from nowhere');
  });

  it('is allowed less by what its bearing turns to heat, whatever counts as useful', () => {
    // The bearing takes 0.5 N m of the 2 N m.
    const found = turned({ friction: { torque: 0.5 } });
    expectValue(found.claim, 0.8 * 0.75, 1e-9);
    expectValue(found.eta, 0.8 * 0.25, 1e-9);
    expect(found.claim.passes).toBe(false);
    expect(found.texts).toContain('it forgets Loss in motor');
  });
});

describe('the efficiency of a hoist with a flywheel', () => {
  // A wheel of 2 kg m² at 6 rad/s, driven by 1 N m, winds up a spring against a brake of its bearing: 36 J of motion help.
  const wound = (input: unknown[]): ReturnType<typeof judge> =>
    judge({
      gravity: [0, 0],
      bodies: [disc('wheel', [0, 0], 1, 4, { spin: 6 })],
      joints: [{ id: 'shaft', kind: 'pin', between: ['wheel', 'ground'], at: [0, 0], friction: { torque: 0.5 } }],
      springs: [{ id: 'coil', kind: 'torsion', between: ['wheel', 'ground'], rate: 2 }],
      drives: [{ id: 'motor', on: 'shaft', torque: 1 }],
      criteria: [
        { id: 'eta', measure: 'efficiency', useful: ['spring'], input, atLeast: 0.5 },
        { id: 'claim', measure: 'claimedEfficiency', of: 'motor', value: 5 },
      ],
      run: { until: 1.2 },
    });

  it('is never above 1: the energy of motion that the input forgot is named', () => {
    const found = wound(['drive']);
    expect(found.eta).toMatchObject({ value: null, passes: null });
    expect(found.texts).toMatch(/no efficiency is above 100 %: the input leaves out what came from Energy of motion/);
    expect(found.texts).toMatch(/Claimed for motor: 500 %\. .* it forgets that Energy of motion gave up/);
    expect(found.claim.value).toBeLessThanOrEqual(1);
  });

  it('stays at or below 1 whatever one calls useful and input of the same run', () => {
    for (const input of [['drive'], ['drive', 'joint-friction'], ['spring'], ['joint-friction']]) {
      const { value } = wound(input).eta;
      expect(value ?? 0).toBeLessThanOrEqual(1);
    }
  });
});

it('a return margin by hand: ½ k (a² − b²) over lift, friction and what must be left', () => {
  // 3 kg on a level guide with 10 N of friction, pulled 0.3 m by a spring of 200 N/m from 0.5 m to 0.2 m of stretch:
  // 21 J given, 3 J of friction, 12 J required at the end: 1.4.
  const found = judge({
    gravity: [0, 0],
    bodies: [box('slide', [0.5, 0], [0.1, 0.1], 3)],
    joints: [
      { id: 'guide', kind: 'slide', between: ['slide', 'ground'], at: [0.5, 0], axis: [1, 0], friction: { force: 10 } },
    ],
    springs: [
      {
        ...{ id: 'spring', kind: 'linear', rate: 200, freeLength: 0.1 },
        between: [
          { of: 'slide', at: [0.5, 0] },
          { of: 'ground', at: [-0.1, 0] },
        ],
      },
    ],
    stations: [
      { id: '1', when: { start: true } },
      {
        id: '2',
        when: {
          crosses: {
            point: { of: 'slide', at: [0.5, 0] },
            line: [
              [0.2, 1],
              [0.2, -1],
            ],
          },
        },
      },
      {
        id: '3',
        when: {
          crosses: {
            point: { of: 'slide', at: [0.5, 0] },
            line: [
              [-0.8, 1],
              [-0.8, -1],
            ],
          },
        },
      },
    ],
    criteria: [
      { id: 'margin', measure: 'returnMargin', spring: 'spring', from: '1', to: '2', kineticEnergy: 12, atLeast: 1.25 },
      { id: 'beyond', measure: 'returnMargin', spring: 'spring', from: '1', to: '3', atLeast: 1 },
    ],
    run: { until: 2 },
  });
  expectValue(found.margin, 21 / 15, 1e-6);
  expect(found.margin.parts?.map(({ label }) => label)).toEqual([
    'Spring spring',
    'Joint friction guide',
    'Motion required at 2',
  ]);
  expect(found.beyond).toMatchObject({ value: null, passes: null });
  expect(found.texts).toContain('station 3 was not reached');
});

it('two discs that meet: effective mass m₁ m₂ / (m₁ + m₂), and the loss it makes', () => {
  const found = judge({
    gravity: [0, 0],
    bodies: [disc('a', [0, 0], 0.1, 1, { velocity: [2, 0] }), disc('b', [1, 0], 0.1, 3)],
    contacts: [{ between: ['a', 'b'], restitution: 0.5 }],
    stations: [
      { id: '1', when: { start: true } },
      { id: '2', when: { touch: ['a', 'b'] } },
    ],
    criteria: [
      { id: 'mass', measure: 'effectiveMass', of: ['b', 'a'], at: '2', atMost: 1 },
      { id: 'speed', measure: 'approachSpeed', of: ['b', 'a'], at: '2', atMost: 1 },
      { id: 'heat', measure: 'heat', of: ['a', 'b'], atMost: 2 },
      { id: 'whole', measure: 'kineticEnergy', of: 'all', at: '2', atMost: 2 },
    ],
    run: { until: 1 },
  });
  expectValue(found.mass, 0.75, 1e-9);
  expectValue(found.speed, 2, 1e-9);
  expectValue(found.heat, 0.5 * 0.75 * (1 - 0.25) * 4, 1e-9);
  expectValue(found.whole, 2, 1e-12);
  expect(found.speed.passes).toBe(false);
});
