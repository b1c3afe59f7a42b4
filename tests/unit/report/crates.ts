import type { Mechanism } from '../../../sim/mechanism/model.js';

/** The mechanism that goes with the run `twoCrates`: two crates on a chute of two named segments. */
export function cratesMechanism(): Mechanism {
  const crate = { shape: { kind: 'box', width: 0.4, height: 0.3 } as const, mass: 2, inertia: 0, angle: 0, spin: 0 };
  const still = { ...crate, centerOfMass: [0, 0] as const, at: [0, 0] as const, velocity: [0, 0] as const };
  return {
    title: 'Two stacked crates on a chute',
    gravity: [0, -9.80665],
    bodies: [
      { ...still, id: 'upper', name: 'Upper crate' },
      { ...still, id: 'lower', name: 'Lower crate' },
    ],
    tracks: [
      {
        id: 'chute',
        from: [0, 0],
        segments: [
          { kind: 'line', to: [5, -1], name: 'slope' },
          { kind: 'line', to: [9, -1] },
        ],
        closed: false,
        side: 'left',
        surfaceSpeed: 0,
      },
    ],
    ...{ sheet: {}, notes: '', criteria: [], demonstration: [] },
    ...{ contacts: [], joints: [], springs: [], dampers: [], drives: [], loads: [], latches: [] },
    system: ['upper', 'lower'],
    stations: [
      { id: '1', when: { kind: 'start' } },
      { id: '2', when: { kind: 'end' } },
      { id: '3', when: { kind: 'time', time: 9 } },
    ],
    run: { until: { time: 2 }, atMost: 2 },
    extent: 10,
  };
}
