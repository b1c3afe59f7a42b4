import { box, degrees, disc, floor, onRamp, particle, ramp, sliderCrank, track } from './parts.js';
import type { Parts } from './run.js';

const pin = (id: string, between: [string, string], at: [number, number], more: Parts = {}): Parts => ({
  id,
  kind: 'pin',
  between,
  at,
  ...more,
});
const slide = (id: string, body: string, at: [number, number], axis: [number, number], more: Parts = {}): Parts => ({
  id,
  kind: 'slide',
  between: [body, 'ground'],
  at,
  axis,
  ...more,
});
const link = (id: string, from: [string, number, number], to: [string, number, number], more: Parts): Parts => ({
  id,
  between: [
    { of: from[0], at: [from[1], from[2]] },
    { of: to[0], at: [to[1], to[2]] },
  ],
  ...more,
});
const bar = (id: string, at: [number, number], length: number, mass: number, more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'bar', length, width: 0.06 },
  mass,
  at,
  ...more,
});

const elbow: Parts = {
  kind: 'polygon',
  points: [
    [0, 0],
    [0.4, 0],
    [0.4, 0.1],
    [0.1, 0.1],
    [0.1, 0.4],
    [0, 0.4],
  ],
};

/** Machines that between them use every kind of element the stepper simulates. Each runs for about a second. */
export const machines: Record<string, Parts> = {
  'a block on a rough ramp that runs out on a level': {
    bodies: [box('block', onRamp(25, 0.6, 0.05), [0.2, 0.1], 3, { angle: -degrees(25) })],
    tracks: [
      ramp(25, 2),
      track('level', [2 * Math.cos(degrees(25)), -2 * Math.sin(degrees(25))], [8, -2 * Math.sin(degrees(25))]),
    ],
    contacts: [{ between: ['block', '*'], staticFriction: 0.25, kineticFriction: 0.15 }],
    run: { until: 1.5 },
  },
  'a crate on a belt whose speed changes': {
    bodies: [box('crate', [0, 0.1], [0.3, 0.2], 6)],
    tracks: [
      {
        ...track('belt', [-2, 0], [6, 0]),
        surfaceSpeed: {
          curve: [
            [0, 0],
            [0.3, 1.2],
            [0.8, 1.2],
            [1, -0.5],
          ],
        },
      },
    ],
    contacts: [{ between: ['crate', 'belt'], staticFriction: 0.4, kineticFriction: 0.3 }],
    run: { until: 1.5 },
  },
  'a carriage on a slide with friction, spring and damper, up to its stops': {
    bodies: [box('carriage', [0, 0], [0.2, 0.1], 4, { velocity: [2, 0] })],
    joints: [
      slide('guide', 'carriage', [0, 0], [1, 0], {
        friction: { coefficient: 0.1 },
        limits: { from: -0.2, to: 0.3, restitution: 0.5 },
      }),
    ],
    springs: [link('return', ['ground', -1, 0], ['carriage', 0, 0], { kind: 'linear', rate: 200, freeLength: 0.9 })],
    dampers: [link('dashpot', ['ground', -1, 0.1], ['carriage', 0, 0.1], { coefficient: 8 })],
    run: { until: 1.5 },
  },
  'a slide with a constant friction force and an orifice damper in one sense': {
    bodies: [box('carriage', [0, 0], [0.2, 0.1], 4, { velocity: [2, 0] })],
    joints: [slide('guide', 'carriage', [0, 0], [1, 0], { friction: { force: 3 } })],
    springs: [
      link('curve', ['ground', -1, 0], ['carriage', 0, 0], {
        kind: 'linear',
        curve: [
          [-0.5, -90],
          [0, 0],
          [0.2, 20],
          [0.5, 110],
        ],
      }),
    ],
    dampers: [
      link('orifice', ['ground', -1, 0.1], ['carriage', 0, 0.1], { coefficient: 12, exponent: 2, acts: 'extension' }),
    ],
    run: { until: 1.5 },
  },
  'a double pendulum with friction in its pins and a stop': {
    bodies: [bar('upper', [0.5, 0], 1, 2), bar('lower', [1.5, 0], 1, 1)],
    joints: [
      pin('hook', ['upper', 'ground'], [0, 0], { friction: { coefficient: 0.1, radius: 0.03 } }),
      pin('knee', ['lower', 'upper'], [1, 0], {
        friction: { torque: 0.2 },
        limits: { from: -0.6, to: 0.6, restitution: 0.3 },
      }),
    ],
    run: { until: 1.5 },
  },
  'a hammer on a torsion spring that a latch lets go at a time': {
    bodies: [bar('hammer', [0, 0.2], 0.4, 1.5, { angle: degrees(90) }), box('anvil', [0.55, 0], [0.1, 0.3], 5)],
    tracks: [track('bench', [-1, -0.15], [2, -0.15])],
    contacts: [
      { between: ['hammer', 'anvil'], friction: 0.2, restitution: 0.4 },
      { between: ['anvil', 'bench'], friction: 0.4 },
    ],
    joints: [pin('pivot', ['hammer', 'ground'], [0, 0]), { id: 'sear', kind: 'weld', between: ['hammer', 'ground'] }],
    springs: [{ id: 'main', kind: 'torsion', between: ['hammer', 'ground'], rate: 2.5, freeAngle: -2.2 }],
    latches: [{ id: 'latch', joint: 'sear', releasesAt: { time: 0.2 } }],
    run: { until: 1.2 },
  },
  'latches that let go at a station and at a force': {
    bodies: [
      box('first', [0, 0], [0.2, 0.2], 2),
      box('second', [1, 0], [0.2, 0.2], 2),
      box('third', [2, 0], [0.2, 0.2], 1),
    ],
    joints: [
      slide('guide-2', 'second', [1, 0], [0, 1]),
      { id: 'hold-2', kind: 'weld', between: ['second', 'ground'] },
      slide('guide-3', 'third', [2, 0], [1, 0]),
      { id: 'hold-3', kind: 'weld', between: ['third', 'ground'] },
    ],
    springs: [link('spring', ['second', 1, 0], ['third', 2, 0], { kind: 'linear', rate: 80, freeLength: 0.6 })],
    stations: [
      { id: 'start', when: { start: true } },
      {
        id: 'fallen',
        when: {
          crosses: {
            point: { of: 'first', at: [0, 0] },
            line: [
              [-1, -0.5],
              [1, -0.5],
            ],
          },
        },
      },
      { id: 'end', when: { end: true } },
    ],
    latches: [
      { id: 'by-station', joint: 'hold-2', releasesAt: { station: 'fallen' } },
      { id: 'by-force', joint: 'hold-3', releasesAt: { force: 36 } },
    ],
    run: { until: 1.2 },
  },
  'a drop on a damped buffer': {
    bodies: [box('crate', [0, 0.6], [0.3, 0.2], 12)],
    tracks: [floor],
    contacts: [{ between: ['crate', 'floor'], stiffness: 2e4, damping: 200, friction: 0.3 }],
    run: { until: 1 },
  },
  'one-way springs between bodies': {
    gravity: [0, 0],
    bodies: [
      particle('left', [0, 0], 1, { velocity: [1, 0] }),
      particle('middle', [1, 0], 2),
      particle('right', [2, 0], 1, { velocity: [1.5, 0] }),
    ],
    springs: [
      link('push', ['left', 0, 0], ['middle', 1, 0], {
        kind: 'linear',
        rate: 50,
        freeLength: 0.8,
        acts: 'compression',
      }),
      link('pull', ['middle', 1, 0], ['right', 2, 0], { kind: 'linear', rate: 30, freeLength: 1.1, acts: 'extension' }),
    ],
    run: { until: 2 },
  },
  'polygons, one of them not convex, that fall in a heap': {
    bodies: [
      { id: 'elbow', shape: elbow, mass: 3, at: [0, 0.3], angle: 0.4 },
      {
        id: 'wedge',
        shape: {
          kind: 'polygon',
          points: [
            [0, 0],
            [0.3, 0],
            [0, 0.2],
          ],
        },
        mass: 1,
        at: [0.1, 0.9],
        angle: -0.3,
      },
      disc('disc', [0.3, 1.2], 0.08, 1),
    ],
    tracks: [track('bin', [-0.5, 1], [-0.5, 0], [1, 0], [1, 1])],
    contacts: [{ between: ['*', '*'], friction: 0.3, restitution: 0.2 }],
    run: { until: 1 },
  },
  'rounded bars that roll and topple': {
    bodies: [
      bar('low', [0, 0.03], 0.6, 1),
      bar('high', [0.05, 0.5], 0.4, 1, { angle: 1.3 }),
      disc('roller', [-0.8, 0.1], 0.1, 2, { velocity: [1.5, 0], spin: -15 }),
    ],
    tracks: [floor],
    contacts: [{ between: ['*', '*'], friction: 0.3, rollingResistance: 0.001 }],
    run: { until: 1 },
  },
  'loads that follow the body and the sheet, for a while': {
    gravity: [0, 0],
    bodies: [box('plate', [0, 0], [0.4, 0.2], 2, { spin: 1 })],
    loads: [
      { id: 'jet', on: { of: 'plate', at: [0.2, 0.05] }, force: [3, 1], follows: 'body', from: 0.2, until: 0.7 },
      { id: 'wind', on: { of: 'plate', at: [0, 0] }, force: [0, -2], until: 0.5 },
      { id: 'twist', on: 'plate', torque: 0.1, from: 0.4 },
    ],
    run: { until: 1 },
  },
  'a slider-crank driven by a torque, with friction in every joint': (() => {
    const crank = sliderCrank({ spin: 5 });
    const joints = (crank.joints as Parts[]).map((joint) => ({
      ...joint,
      friction: joint.kind === 'pin' ? { coefficient: 0.1, radius: 0.008 } : { coefficient: 0.15 },
    }));
    return {
      ...crank,
      gravity: [0, -9.80665],
      joints,
      drives: [{ id: 'motor', on: 'shaft', torque: 4, efficiency: 0.8, until: 0.6 }],
      run: { until: 1 },
    };
  })(),
  'a weldment on a rail that a force drives for half a second': {
    bodies: [
      box('base', [0, 0], [0.4, 0.1], 3),
      bar('post', [0, 0.4], 0.6, 1, { angle: degrees(90) }),
      disc('head', [0, 0.8], 0.08, 2),
    ],
    joints: [
      slide('rail', 'base', [0, 0], [1, 0]),
      { id: 'foot', kind: 'weld', between: ['post', 'base'] },
      pin('neck', ['head', 'post'], [0, 0.75]),
    ],
    drives: [{ id: 'ram', on: 'rail', force: 40, until: 0.5 }],
    run: { until: 1 },
  },
  'two stacked crates that slide apart on a chute': {
    bodies: [
      box('lower', onRamp(20, 1, 0.1), [0.6, 0.2], 5, { angle: -degrees(20) }),
      box('upper', onRamp(20, 1, 0.3), [0.4, 0.2], 4, { angle: -degrees(20) }),
    ],
    tracks: [ramp(20, 10)],
    contacts: [
      { between: ['lower', 'ramp'], friction: 0.05 },
      { between: ['upper', 'lower'], staticFriction: 0.08, kineticFriction: 0.04 },
    ],
    loads: [{ id: 'brake', on: { of: 'lower', at: onRamp(20, 1, 0.1) }, force: [-8, 0], from: 0.3 }],
    run: { until: 1 },
  },
  'a roller over a spline': {
    bodies: [disc('roller', [-0.7, 0.1], 0.1, 2, { velocity: [2, 0], spin: -20 })],
    tracks: [
      {
        id: 'dip',
        from: [-1, 0],
        to: [
          { to: [0, 0] },
          {
            through: [
              [0.5, 0],
              [1, -0.2],
              [1.6, 0.05],
              [2.4, 0],
            ],
          },
          { to: [5, 0] },
        ],
      },
    ],
    contacts: [{ between: ['roller', 'dip'], friction: 0.4, rollingResistance: 0.0005 }],
    run: { until: 1.4 },
  },
};
