import { describe, expect, it } from 'vitest';
import { readMechanism } from '../../../sim/mechanism/index.js';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import type { CamShape } from '../../../sim/mechanism/kinds/body.js';
import { full } from './full.js';
import { altered, bench, changed, mechanismOf, ramp, readDocument } from './samples.js';

const mechanism = mechanismOf(full());
const one = <T extends { id: string }>(elements: T[], id: string): T => elements.find((each) => each.id === id)!;

describe('A block on a ramp', () => {
  it('becomes a mechanism in SI', () => {
    expect(mechanismOf(ramp())).toMatchObject({
      title: 'Block on a ramp',
      gravity: [0, -9.80665],
      bodies: [
        {
          id: 'block',
          name: 'block',
          shape: { kind: 'box', width: 0.06, height: 0.04 },
          mass: 2,
          centerOfMass: [0, 0],
          velocity: [0, 0],
          spin: 0,
          rest: { on: 'ramp', at: 0.1 },
        },
      ],
      tracks: [
        {
          from: [0, 0.3],
          segments: [
            { kind: 'line', to: [0.4, 0] },
            { kind: 'line', to: [0.8, 0] },
          ],
          side: 'left',
        },
      ],
      contacts: [{ between: ['block', 'ramp'], staticFriction: 0.2, kineticFriction: 0.2, pointer: '/contacts/0' }],
      system: ['block'],
      stations: [
        { id: '1', when: { kind: 'start' } },
        { id: '2', when: { kind: 'rests', of: 'block' } },
      ],
      run: { until: { time: 3 }, atMost: 3 },
    });
  });

  it('has the extent of everything drawn', () => {
    expect(mechanismOf(ramp()).extent).toBeCloseTo(Math.hypot(0.8, 0.3), 12);
  });

  it('lists each default that was applied, with its reason', () => {
    const { defaults } = readDocument(ramp());
    const wanted = {
      '/gravity': 'standard gravity, downwards',
      '/bodies/0/inertia': 'box of uniform density with this mass, about its centroid',
      '/bodies/0/centerOfMass': 'centroid of the shape',
      '/bodies/0/velocity': 'starts at rest',
      '/tracks/0/side': 'the free side is on the left',
      '/contacts/0/restitution': 'not given',
      '/system': 'all bodies are inside the boundary',
    };
    expect(Object.fromEntries(defaults.map(({ pointer, why }) => [pointer, why]))).toMatchObject(wanted);
  });

  it('lists no default that was not needed', () => {
    const { defaults } = readDocument(full());
    const pointers = defaults.map(({ pointer }) => pointer);
    expect(pointers).not.toContain('/gravity');
    expect(pointers).not.toContain('/bodies/1/inertia');
    expect(pointers).not.toContain('/run/atMost');
    expect(new Set(pointers).size).toBe(pointers.length);
  });
});

describe('Bodies', () => {
  it('have the mass of their area, density and thickness', () => {
    expect(one(mechanism.bodies, 'plate').mass).toBeCloseTo(7850 * 0.1 * 0.02 * 0.01, 14);
  });

  it('have the inertia of their shape: a disc ½ m r²', () => {
    expect(one(mechanism.bodies, 'wheel').inertia).toBeCloseTo(0.5 * 0.05 ** 2, 16);
  });

  it('of one point do not turn', () => {
    expect(one(mechanism.bodies, 'bob')).toMatchObject({ mass: 0.45359237, inertia: 0, spin: 0 });
  });

  it('have the corners of a polygon counter-clockwise, whichever way they were typed', () => {
    const corners = [
      [0, 0],
      [0, 1],
      [1, 0],
    ];
    const document = changed(bench(), 'bodies', 2, { shape: { kind: 'polygon', points: corners } });
    expect(one(mechanismOf(document).bodies, 'carriage')).toMatchObject({
      shape: {
        points: [
          [0, 0],
          [1, 0],
          [0, 1],
        ],
      },
      centerOfMass: [1 / 3, 1 / 3].map((part) => expect.closeTo(part, 14) as number),
    });
  });

  it('with a wrong mass are still seen to overlap', () => {
    const document = changed(ramp(), 'bodies', 0, { mass: 0, rest: null, at: ['600 mm', 0] });
    expect(readDocument(document).problems.map(({ code }) => code)).toEqual(['out-of-range', 'starts-inside']);
  });
});

describe('Cams', () => {
  it('have falls as negative lifts, and tables in SI', () => {
    const { shape } = one(mechanism.bodies, 'cam');
    expect((shape as CamShape).segments).toMatchObject([
      { lift: 0.01, law: 'cycloidal' },
      { lift: 0, law: 'dwell' },
      {
        lift: -0.01,
        law: 'table',
        table: [
          [0, 0],
          [Math.PI / 4, -0.005],
          [Math.PI / 2, -0.01],
        ],
      },
      { lift: 0, law: 'dwell' },
    ]);
  });

  it('have the follower’s line and pivot in body coordinates', () => {
    const document = changed(full(), 'bodies', 7, { at: ['7 m', 0], angle: '90 deg' });
    const { follower } = one(mechanismOf(document).bodies, 'swinging-cam').shape as CamShape;
    expect(follower.pivot?.[0]).toBeCloseTo(0, 15);
    expect(follower.pivot?.[1]).toBeCloseTo(-0.1, 15);
    expect(follower.along[0]).toBeCloseTo(1, 15);
  });

  it('of a swinging follower rise by angles', () => {
    const { shape } = one(mechanism.bodies, 'swinging-cam');
    expect((shape as CamShape).segments[0].lift).toBeCloseTo(Math.PI / 18, 15);
    const wrong = structuredClone(full());
    ((wrong.bodies as JsonObject[])[7].shape as { segments: JsonObject[] }).segments[0].rise = '10 mm';
    expect(readDocument(wrong).problems[0]).toMatchObject({
      code: 'wrong-dimension',
      pointer: '/bodies/7/shape/segments/0/rise',
    });
  });
});

describe('Tracks', () => {
  it('that are closed get a line where their ends differ', () => {
    expect(one(mechanism.tracks, 'belt').segments).toEqual([
      { kind: 'line', to: [2, -1] },
      { kind: 'line', to: [2, -2] },
      { kind: 'line', to: [1, -1] },
    ]);
  });

  it('that are closed and meet end exactly where they begin', () => {
    const circle = {
      id: 'ring',
      from: [0, 1],
      to: [
        { to: [2, 1], bulge: 1 },
        { to: [0, 1 + 1e-9], bulge: 1 },
      ],
      closed: true,
    };
    const { tracks } = mechanismOf(altered(bench(), { tracks: [circle] }));
    expect(tracks[0].segments).toEqual([
      { kind: 'arc', to: [2, 1], bulge: 1 },
      { kind: 'arc', to: [0, 1], bulge: 1 },
    ]);
  });

  it('have a bulge of nothing as a line', () => {
    const track = {
      id: 't',
      from: [0, 1],
      to: [
        { to: [2, 1], bulge: 0 },
        { to: [3, 1], bulge: 1e-12 },
      ],
    };
    const { tracks } = mechanismOf(altered(bench(), { tracks: [track] }));
    expect(tracks[0].segments.map(({ kind }) => kind)).toEqual(['line', 'line']);
  });
});

describe('Springs and dampers', () => {
  it('get their rate from the wire by EN 13906-1', () => {
    // d 2, D 16, n 8, G 81 500 MPa: 4.974365234375 N/mm.
    const spring = one(mechanism.springs, 'spring');
    expect(spring.kind === 'linear' && spring.rate).toBeCloseTo(4974.365234375, 9);
  });

  it('are relaxed as drawn', () => {
    expect(one(mechanism.springs, 'stop')).toMatchObject({
      freeLength: 1,
      rate: expect.closeTo(87.56341762323818, 10) as number,
      acts: 'both',
    });
  });

  it('with a curve have its slope at the free length', () => {
    expect(one(mechanism.springs, 'hard')).toMatchObject({
      rate: 2000,
      curve: [
        [-0.01, -40],
        [0, 0],
        [0.01, 20],
      ],
    });
  });

  it('have the coefficient of their exponent', () => {
    expect(one(mechanism.dampers, 'dashpot')).toMatchObject({ kind: 'linear', coefficient: 40, exponent: 2 });
    expect(one(mechanism.dampers, 'brake')).toMatchObject({ kind: 'rotary', coefficient: 0.5, exponent: 1 });
  });
});

describe('Joints', () => {
  it('have unit axes', () => {
    expect(one(mechanism.joints, 'slide')).toMatchObject({
      axis: [0.6, 0.8],
      limits: { from: -0.02, to: 0.1, restitution: 0 },
    });
  });

  it('carry their friction by kind', () => {
    expect(one(mechanism.joints, 'pin')).toMatchObject({
      friction: { kind: 'coefficient', coefficient: 0.1, radius: 0.006 },
    });
    expect(one(mechanism.joints, 'axle')).toMatchObject({ friction: { kind: 'torque', torque: 0.02 } });
    expect(one(mechanism.joints, 'guide')).toMatchObject({ friction: { kind: 'force', force: 3 } });
  });

  it('of rope are as long as drawn, and between the parts of their ends', () => {
    const through = [
      { of: 'crank', at: [0, 0] },
      { of: 'ground', at: [0, 1] },
      { of: 'carriage', at: ['400 mm', 1] },
    ];
    const { joints } = mechanismOf(altered(bench(), { joints: [{ id: 'r', kind: 'rope', through }] }));
    expect(joints[0]).toMatchObject({ between: ['crank', 'carriage'], length: 1.4 });
  });

  it('may be pinned anywhere on a particle and on a body without outline', () => {
    const document = altered(full(), { joints: [] });
    const pins = [
      { id: 'far', kind: 'pin', between: ['bob', 'ground'], at: ['4 m', '3 m'] },
      { id: 'farther', kind: 'pin', between: ['link', 'bob'], at: ['5 m', '3 m'] },
    ];
    const rest = { drives: [], latches: [], criteria: [], sizing: undefined, run: { until: 1 } };
    const { problems } = readMechanism(JSON.stringify({ ...document, ...rest, joints: pins }));
    expect(problems).toEqual([]);
  });
});

describe('Drives, loads and latches', () => {
  it('carry their law by kind', () => {
    const laws = mechanism.drives.map(({ id, law }) => [id, law.kind]);
    expect(laws).toEqual([
      ['motor', 'motor'],
      ['push', 'effortCurve'],
      ['pull', 'speed'],
      ['help', 'effortCurve'],
    ]);
    expect(one(mechanism.drives, 'push').law).toMatchObject({
      over: 'position',
      curve: [
        [0, 10],
        [0.1, 20],
      ],
    });
  });

  it('take torque on a pin and force on a slide', () => {
    const wrong = altered(bench(), { drives: [{ id: 'd', on: 's', torque: '2 N m' }] });
    expect(readDocument(wrong).problems.map(({ code, pointer }) => `${code} ${pointer}`)).toEqual([
      'missing-key /drives/0/force',
      'unknown-key /drives/0/torque',
    ]);
  });

  it('begin and end at a time or a station', () => {
    expect(one(mechanism.loads, 'wind')).toMatchObject({
      from: { time: 0.1 },
      until: { station: '3' },
      follows: 'body',
    });
    expect(one(mechanism.latches, 'latch')).toEqual({ id: 'latch', joint: 'weld', releasesAt: { force: 40 } });
  });
});

describe('What is asked of a mechanism', () => {
  it('is kept in SI beside it', () => {
    expect(one(mechanism.criteria, 'c1')).toEqual({
      id: 'c1',
      measure: 'approachSpeed',
      of: ['plate', 'belt'],
      at: '3',
      atMost: 0.8,
    });
    expect(mechanism.sizing).toEqual({ solve: '/springs/1/rate', from: 100, to: 10000, for: 'c2', with: 'worst' });
    expect(mechanism.spread).toMatchObject({
      trials: 500,
      vary: [
        { kind: 'plusMinus', half: 0.1, relative: true },
        { kind: 'plusMinus', half: 100, relative: false },
        { kind: 'uniform', from: 0.05, to: 0.2 },
        { kind: 'normal', relative: false },
        { kind: 'values', values: [0.29, 0.31] },
      ],
    });
    expect(mechanism.demonstration[0]).toMatchObject({
      view: [0.4, 0.15, 1],
      to: { station: '2' },
      mark: ['block', 'spring'],
    });
    expect(mechanism.sheet).toMatchObject({ drawingNumber: 'T-001', scale: '1:2' });
  });

  it('ends a run at its station, its time or its limit', () => {
    expect(mechanism.run).toEqual({ until: { station: '2' }, atMost: 10, step: 1e-4, tolerance: 1e-9, timeBudget: 60 });
    const open = mechanismOf(altered(ramp(), { run: { until: { station: '2' } } }));
    expect(open.run).toEqual({ until: { station: '2' }, atMost: 60 });
  });
});
