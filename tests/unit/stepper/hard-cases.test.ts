import { describe, expect, it } from 'vitest';
import { expectSound } from '../../support/expect.js';
import { box, disc, floor } from '../../support/parts.js';
import { G, run, type Parts } from '../../support/run.js';

const bar = (id: string, at: [number, number], length: number, mass: number, more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'bar', length, width: 0.04 },
  mass,
  at,
  ...more,
});
const pin = (id: string, between: [string, string], at: [number, number]): Parts => ({ id, kind: 'pin', between, at });

describe('joints that hold more than they need', () => {
  it('two parallel guides with friction slow a carriage by μ g, as one would', () => {
    const guide = (id: string, y: number): Parts => ({
      id,
      kind: 'slide',
      between: ['carriage', 'ground'],
      at: [0, y],
      axis: [1, 0],
      friction: { coefficient: 0.1 },
    });
    const ran = run({
      bodies: [box('carriage', [0, 0], [0.2, 0.1], 2, { velocity: [1, 0] })],
      joints: [guide('upper', 0.05), guide('lower', -0.05)],
      run: { until: 0.5 },
    });
    expectSound(ran);
    expect(ran.motion('carriage').vx).toBeCloseTo(1 - 0.1 * G * 0.5, 6);
    expect(ran.total('joint-friction', 'heat')).toBeCloseTo(-ran.ledger().kineticChange, 9);
  });

  it('a table on three parallel links moves as on two, and keeps its energy', () => {
    const links = ['a', 'b', 'c'];
    const ran = run({
      bodies: [
        ...links.map((id, i) => bar(id, [0.5 * i, -0.25], 0.5, 1, { angle: Math.PI / 2 })),
        bar('table', [0.5, -0.5], 1, 2),
      ],
      joints: links.flatMap((id, i) => [
        pin(`${id}-top`, [id, 'ground'], [0.5 * i, 0]),
        pin(`${id}-foot`, ['table', id], [0.5 * i, -0.5]),
      ]),
      loads: [{ id: 'push', on: { of: 'table', at: [0.5, -0.5] }, force: [5, 0] }],
      run: { until: 1 },
    });
    expectSound(ran);
    expect(ran.numericalShare()).toBeLessThan(1e-6);
    expect(Math.abs(ran.motion('table').angle)).toBeLessThan(1e-9);
  });
});

describe('linkages at their change points', () => {
  it('a parallelogram that passes flat keeps its energy, and stays a parallelogram', () => {
    const ran = run({
      gravity: [0, 0],
      bodies: [
        bar('a', [0.25, 0], 0.5, 1, { spin: 3, velocity: [0, 0.75] }),
        bar('b', [1.25, 0], 0.5, 1, { spin: 3, velocity: [0, 0.75] }),
        bar('table', [1, 0], 1, 2, { velocity: [0, 1.5] }),
      ],
      joints: [
        pin('a0', ['a', 'ground'], [0, 0]),
        pin('b0', ['b', 'ground'], [1, 0]),
        pin('a1', ['table', 'a'], [0.5, 0]),
        pin('b1', ['table', 'b'], [1.5, 0]),
      ],
      run: { until: 3 },
    });
    expectSound(ran);
    const { kineticFrom, kineticTo } = ran.ledger();
    expect(Math.abs(kineticTo / kineticFrom - 1)).toBeLessThan(1e-6);
    expect(Math.abs(ran.motion('a').angle - ran.motion('b').angle)).toBeLessThan(1e-6);
  });

  it('a triangle of two bars on the ground does not move under a ton', () => {
    const ran = run({
      bodies: [
        bar('a', [0.25, 0.433], 1, 1, { angle: Math.PI / 3 }),
        bar('b', [0.75, 0.433], 1, 1, { angle: -Math.PI / 3 }),
      ],
      joints: [
        pin('left', ['a', 'ground'], [0, 0]),
        pin('right', ['b', 'ground'], [1, 0]),
        pin('top', ['a', 'b'], [0.5, 0.866]),
      ],
      loads: [{ id: 'ton', on: { of: 'a', at: [0.5, 0.866] }, force: [0, -9807] }],
      run: { until: 1 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(ran.motion('a').speed).toBeLessThan(1e-9);
    expect(ran.motion('a').y).toBeCloseTo(0.433, 9);
  });
});

describe('odd starts', () => {
  it('bodies drawn touching and running into each other strike at once, each pair once', () => {
    const ran = run({
      gravity: [0, 0],
      bodies: [disc('a', [0, 0], 0.05, 1, { velocity: [1, 0] }), disc('b', [0.1, 0], 0.05, 1)],
      contacts: [{ between: ['a', 'b'], restitution: 1 }],
      stations: [{ id: 'hit', when: { touch: ['a', 'b'] } }],
      run: { until: 0.5 },
    });
    expectSound(ran);
    expect([ran.motion('a').vx, ran.motion('b').vx]).toEqual([expect.closeTo(0, 12), expect.closeTo(1, 12)]);
    // A contact that is there at the start does not count as a touch (ruling of the contract).
    expect(ran.stations).toEqual([]);
  });

  it('a box set down with a downward and a sideways speed bounces by e and rubs by μ of the blow', () => {
    const ran = run({
      bodies: [box('box', [0, 0.05], [0.2, 0.1], 1, { velocity: [1, -2] })],
      tracks: [floor],
      contacts: [{ between: ['box', 'floor'], friction: 0.1, restitution: 0.5 }],
      run: { until: 0.01 },
    });
    expectSound(ran);
    const { vx, vy, time } = ran.motion('box');
    expect(vy + G * time).toBeCloseTo(1, 9);
    expect(vx).toBeCloseTo(1 - 0.1 * 3, 1);
  });

  it('nothing happens where there is no gravity and nothing moves', () => {
    const ran = run({
      gravity: [0, 0],
      bodies: [disc('a', [0, 0], 0.05, 1), disc('b', [0.1, 0], 0.05, 1)],
      contacts: [{ between: ['a', 'b'] }],
      run: { until: 0.5 },
    });
    expect(ran.recording.end).toBe('reachedEnd');
    expect(ran.ledger()).toMatchObject({ kineticChange: 0, unbooked: 0 });
    expect(ran.events('touch')).toEqual([]);
  });

  it('a machine of 10 µm works as one of a metre', () => {
    const ran = run({
      bodies: [disc('disc', [0, 2e-5], 5e-6, 1e-12), box('box', [3e-5, 3e-5], [1e-5, 1e-5], 1e-12, { angle: 0.2 })],
      tracks: [{ id: 'floor', from: [-1e-3, 0], to: [{ to: [1e-3, 0] }] }],
      contacts: [{ between: ['*', '*'], friction: 0.3, restitution: 0.2 }],
      run: { until: 0.01 },
    });
    expectSound(ran);
    expect(ran.motion('disc').y / 5e-6).toBeCloseTo(1, 5);
    expect(ran.motion('box').y / 5e-6).toBeCloseTo(1, 5);
  });
});

describe('very unlike masses', () => {
  it.each([1e3, 1e6])('a light box rests on one of %d times its mass', (ratio) => {
    const ran = run({
      bodies: [box('heavy', [0, 0.05], [0.2, 0.1], ratio), box('light', [0, 0.16], [0.2, 0.1], 1)],
      tracks: [floor],
      contacts: [{ between: ['*', '*'], friction: 0.3, restitution: 0.5 }],
      run: { until: 1 },
    });
    expectSound(ran);
    expect(ran.motion('light').y).toBeCloseTo(0.15, 6);
    expect(ran.motion('heavy').y).toBeCloseTo(0.05, 6);
  });
});
