import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Recording } from '../../sim/recording/index.js';
import { runStepper } from '../../sim/stepper/index.js';
import { box, degrees, disc, floor, onRamp, ramp, track } from '../support/parts.js';
import { mechanismOf, type Parts } from '../support/run.js';

/** Ends marked, and one more station between them. */
const marked = (id: string, when: Parts): Parts[] => [
  { id: 'start', when: { start: true } },
  { id, when },
  { id: 'end', when: { end: true } },
];

/** A disc that rolls down a rough ramp for a second. */
export const rollingDisc: Parts = {
  bodies: [disc('disc', onRamp(20, 0.2, 0.1), 0.1, 3)],
  tracks: [ramp(20, 10)],
  contacts: [{ between: ['disc', 'ramp'], friction: 0.5 }],
  stations: marked('half', { time: 0.5 }),
  run: { until: 1 },
};

/** A carriage that runs against a spring, comes back, and meets a wall. */
export const sprungCarriage: Parts = {
  bodies: [box('carriage', [0, 0.05], [0.2, 0.1], 4, { velocity: [2, 0] })],
  tracks: [floor, track('wall', [-0.6, 1], [-0.6, 0])],
  contacts: [
    { between: ['carriage', 'floor'], friction: 0.05 },
    { between: ['carriage', 'wall'], restitution: 0.5 },
  ],
  springs: [
    {
      id: 'stop',
      kind: 'linear',
      between: [
        { of: 'carriage', at: [0.1, 0.05] },
        { of: 'ground', at: [1, 0.05] },
      ],
      rate: 400,
      freeLength: 0.6,
      acts: 'compression',
    },
  ],
  stations: [
    { id: 'start', when: { start: true } },
    { id: 'turned', when: { turns: { of: 'carriage', along: [1, 0] } } },
    { id: 'struck', when: { touch: ['carriage', 'wall'] } },
    { id: 'end', when: { end: true } },
  ],
  run: { until: 1.4 },
};

/** A block that a ramp's friction brakes on a level. */
export const brakedBlock: Parts = {
  bodies: [box('block', onRamp(25, 0.6, 0.05), [0.2, 0.1], 3, { angle: -degrees(25) })],
  tracks: [ramp(25, 10)],
  contacts: [{ between: ['block', 'ramp'], friction: 0.3 }],
  stations: marked('half', { time: 0.5 }),
  run: { until: 1 },
};

export interface Pair {
  mechanism: Mechanism;
  reference: Recording;
}

/** The mechanism and a fine run of it, which stands for the independent one. */
export function referenceOf(parts: Parts, step = 1e-4): Pair {
  const mechanism = mechanismOf(parts);
  return { mechanism, reference: runStepper(mechanism, { step }) };
}

/** A run in which something is not what the document says. */
export function tamperedRun(mechanism: Mechanism, change: (copy: Mechanism) => void, step = 2e-4): Recording {
  const copy = structuredClone(mechanism);
  change(copy);
  return runStepper(copy, { step });
}
