import { describe, expect, it } from 'vitest';
import type { Recording } from '../../../sim/recording/index.js';
import * as read from '../../../sim/recording/index.js';
import type { Cells } from './synthetic.js';
import { startRun } from './synthetic.js';

/** Thrown up at 3 m/s with 2 m/s across and turning at 1 rad/s, in g = 10 m/s²; a row each 0.25 s. */
function thrownBody(): Recording {
  const { writer, row } = startRun({
    bodies: [{ id: 'ball', mass: 2, inertia: 0.5 }],
    accounts: [{ account: 'gravity', of: 'ball', bodies: ['ball'], stored: true }],
  });
  const { x, y, angle, vx, vy, spin } = writer.layout.bodies[0].columns;
  const { work, stored } = writer.layout.accounts[0].columns;
  for (let i = 0; i <= 4; i++) {
    const t = i / 4;
    const height = 3 * t - 5 * t * t;
    const cells: Cells = [
      ...([
        [x, 2 * t],
        [y, height],
        [angle, t],
        [vx, 2],
        [vy, 3 - 10 * t],
        [spin, 1],
      ] as const),
      ...([
        [work[0], -20 * height],
        [stored!, 20 * height],
      ] as const),
    ];
    row(t, cells);
    row(t, cells);
  }
  return writer.finish('reachedEnd');
}

describe('reading a recording', () => {
  const run = thrownBody();
  const [ball] = run.layout.bodies;
  const [gravity] = run.layout.accounts;

  it('finds the last row at or before a time, the later of two at one time', () => {
    expect([-1, 0, 0.1, 0.25, 0.6, 1, 9].map((time) => read.rowAtOrBefore(run, time))).toEqual([0, 1, 1, 3, 5, 9, 9]);
  });

  it('reads the motion of a body at a row', () => {
    expect(read.bodyAtRow(run, ball, 5)).toEqual({ x: 1, y: 0.25, angle: 0.5, vx: 2, vy: -2, spin: 1 });
  });

  it('interpolates a constant acceleration exactly between rows', () => {
    for (const time of [0.01, 0.2, 0.37, 0.999]) {
      const pose = read.poseAtTime(run, ball, time);
      expect(pose.x).toBeCloseTo(2 * time, 14);
      expect(pose.y).toBeCloseTo(3 * time - 5 * time * time, 14);
      expect(pose.angle).toBeCloseTo(time, 14);
    }
  });

  it('lets a body stand still before the first row and after the last', () => {
    expect(read.poseAtTime(run, ball, -1)).toEqual({ x: 0, y: 0, angle: 0 });
    expect(read.poseAtTime(run, ball, 50)).toEqual({ x: 2, y: -2, angle: 1 });
  });

  it('interpolates work in a straight line between rows', () => {
    const [from, to] = [3, 4].map((row) => read.workAtRow(run, gravity, row)[0]);
    expect([from, to]).toEqual([-20 * 0.4375, -20 * 0.25]);
    expect(read.workAtTime(run, gravity, 0.25)[0]).toBe(from);
    expect(read.workAtTime(run, gravity, 0.3)[0]).toBeCloseTo(from + 0.2 * (to - from), 14);
    expect(read.workAtTime(run, gravity, 2)[0]).toBe(40);
  });

  it('works out kinetic energy of translation and turning', () => {
    expect(read.kineticEnergyOf(run, ball, 1)).toBe(0.5 * 2 * (4 + 9) + 0.5 * 0.5);
  });

  it('reads stored energy where an account stores any', () => {
    expect(read.storedAtRow(run, gravity, 5)).toBe(5);
    const { stored: _, ...columns } = gravity.columns;
    expect(read.storedAtRow(run, { ...gravity, columns }, 5)).toBeUndefined();
  });

  it('finds bodies by id', () => {
    expect(read.bodyOf(run, 'ball')).toBe(ball);
    expect(read.bodyOf(run, 'ground')).toBeUndefined();
  });
});

describe('middleOfLink', () => {
  const { writer, row } = startRun({
    bodies: [{ id: 'arm', mass: 1, inertia: 1 }],
    accounts: [],
    dampers: [
      {
        id: 'strut',
        between: [
          { of: 'ground', at: [0, 4] },
          { of: 'arm', at: [3, 0] },
        ],
      },
      { id: 'hub', between: ['arm', 'ground'] },
      { id: 'nowhere', between: ['ground', 'ground'] },
    ],
  });
  const { x, angle } = writer.layout.bodies[0].columns;
  row(0, [
    [x, 1],
    [angle, 0.5],
  ]);
  row(1, [
    [x, 2],
    [angle, 0.5 + Math.PI / 2],
  ]);
  const run = writer.finish('reachedEnd');
  const [strut, hub, nowhere] = run.layout.dampers;

  it('lies between the two ends as drawn', () => {
    expect(read.middleOfLink(run, strut, 0)).toEqual([1.5, 2]);
  });

  it('follows the end that is fixed to a body', () => {
    const [mx, my] = read.middleOfLink(run, strut, 1)!;
    expect(mx).toBeCloseTo(1, 14);
    expect(my).toBeCloseTo(3, 14);
  });

  it('is at the body where one acts on its angle alone', () => {
    expect(read.middleOfLink(run, hub, 1)).toEqual([2, 0]);
  });

  it('is nowhere when no end has a place', () => {
    expect(read.middleOfLink(run, nowhere, 0)).toBeUndefined();
  });
});
