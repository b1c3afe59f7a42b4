import type { Body, Shape } from '../../../sim/mechanism/kinds/body.js';
import type { Vec } from '../../../sim/core/vec.js';
import type { Mechanism } from '../../../sim/mechanism/model.js';

const body = (id: string, shape: Shape, at: Vec): Body => ({
  id,
  name: id,
  shape,
  mass: 1,
  inertia: 0.1,
  centerOfMass: [0, 0],
  at,
  angle: 0,
  velocity: [0, 0],
  spin: 0,
});

const ground = (at: Vec) => ({ of: 'ground', at });

/** A sheet with an element of every kind that has a symbol. It is not meant to run. */
export const everyKind: Mechanism = {
  title: 'Every kind',
  sheet: {},
  notes: '',
  gravity: [0, -9.80665],
  bodies: [
    body('box', { kind: 'box', width: 0.24, height: 0.16 }, [0, 0.5]),
    body('disc', { kind: 'disc', radius: 0.1 }, [0.5, 0.5]),
    body('bar', { kind: 'bar', length: 0.3, width: 0.04 }, [1, 0.5]),
    body('point', { kind: 'particle' }, [1.5, 0.5]),
    body('plate', { kind: 'polygon', points: [[0, 0], [0.2, 0], [0, 0.2]] }, [2, 0.5]), // prettier-ignore
    body('link', { kind: 'none' }, [2.5, 0.5]),
    body('cam', { kind: 'cam', baseRadius: 0.05, segments: [], turns: 'counterclockwise', follower: { kind: 'flat', radius: 0, offset: 0, along: [0, 1] } }, [3, 0.5]), // prettier-ignore
  ],
  tracks: [
    {
      id: 'chute',
      from: [-1, 0],
      segments: [
        { kind: 'line', to: [1, 0] },
        { kind: 'arc', to: [1.5, 0.2], bulge: 0.2 },
        { kind: 'spline', through: [[2, 0.1], [2.5, 0.2]] }, // prettier-ignore
      ],
      closed: false,
      side: 'left',
      surfaceSpeed: 0.5,
    },
  ],
  contacts: [],
  joints: [
    { id: 'pin', kind: 'pin', between: ['link', 'ground'], at: [2.4, 0.5] },
    { id: 'second-pin', kind: 'pin', between: ['disc', 'ground'], at: [0.5, 0.5] },
    { id: 'slide', kind: 'slide', between: ['box', 'ground'], at: [0, 0.5], axis: [1, 0] },
    { id: 'weld', kind: 'weld', between: ['bar', 'plate'] },
    { id: 'rope', kind: 'rope', between: ['box', 'disc'], through: [{ of: 'box', at: [0, 0.5] }, ground([0.2, 1]), { of: 'disc', at: [0.5, 0.5] }], length: 2 }, // prettier-ignore
    { id: 'gear', kind: 'gear', joints: ['pin', 'second-pin'], ratio: -2, efficiency: 1 },
    { id: 'rack', kind: 'rack', pin: 'second-pin', slide: 'slide', radius: 0.1, efficiency: 1 },
    { id: 'screw', kind: 'screw', pin: 'pin', slide: 'slide', lead: 0.01, friction: 0.1 },
  ],
  springs: [
    { id: 'coil', kind: 'linear', between: [{ of: 'box', at: [0.12, 0.5] }, ground([0.3, 0.5])], rate: 100, freeLength: 0.2, acts: 'both' }, // prettier-ignore
    { id: 'spiral', kind: 'torsion', between: ['link', 'ground'], rate: 1, freeAngle: 0 },
    { id: 'gas-spring', kind: 'gas', between: [{ of: 'bar', at: [1, 0.5] }, ground([1, 1])], force: 100, stroke: 0.1, ratio: 1.2 }, // prettier-ignore
  ],
  dampers: [
    { id: 'cup', kind: 'linear', between: [{ of: 'bar', at: [1, 0.5] }, ground([1.2, 1])], coefficient: 10, exponent: 1, acts: 'both' }, // prettier-ignore
    { id: 'rotary', kind: 'rotary', between: ['disc', 'ground'], coefficient: 1, exponent: 1, acts: 'both' },
  ],
  drives: [
    { id: 'motor', on: 'pin', law: { kind: 'motor', stallTorque: 1, noLoadSpeed: 10 }, efficiency: 1 },
    { id: 'push', on: 'slide', law: { kind: 'effort', value: -5 }, efficiency: 1 },
  ],
  loads: [
    { id: 'pull', kind: 'force', on: { of: 'box', at: [0, 0.5] }, force: [10, 5], follows: 'body' },
    { id: 'twist', kind: 'torque', on: 'disc', torque: -1 },
  ],
  latches: [{ id: 'latch', joint: 'slide', releasesAt: { time: 1 } }],
  system: ['box'],
  stations: [],
  criteria: [],
  demonstration: [],
  run: { until: { time: 1 }, atMost: 1 },
  extent: 4.2,
};
