import { describe, expect, it } from 'vitest';
import { potentialAt } from '../../../sim/ledger/potentials.js';
import type { LinearSpring, TorsionSpring } from '../../../sim/mechanism/kinds/spring.js';
import type { Mechanism } from '../../../sim/mechanism/model.js';
import { startRun } from '../recording/synthetic.js';
import { cratesMechanism } from '../report/crates.js';

/** A body that is drawn at (3, 0), then stands at (3 + way, 4) turned by an angle. */
function moved(way: number, angle = 0) {
  const { writer, row } = startRun({ bodies: [{ id: 'upper', mass: 2, inertia: 1 }], accounts: [] });
  const { columns } = writer.layout.bodies[0];
  row(0, [[columns.x, 3]]);
  row(1, [
    [columns.x, 3 + way],
    [columns.y, 4],
    [columns.angle, angle],
  ]);
  return writer.finish('reachedEnd');
}

const spring = (more: Partial<LinearSpring> = {}): LinearSpring => ({
  kind: 'linear',
  id: 's',
  between: [
    { of: 'ground', at: [0, 0] },
    { of: 'upper', at: [3, 0] },
  ],
  ...{ rate: 10, freeLength: 4, acts: 'both' },
  ...more,
});
const document = (springs: Mechanism['springs']): Mechanism => ({ ...cratesMechanism(), gravity: [0, -10], springs });
const stored = (each: Mechanism['springs'][0], run = moved(0)): number | undefined =>
  potentialAt(document([each]), run, { account: 'spring', of: 's' }, 1);

describe('potentialAt', () => {
  it('has gravity by the mass of the document and the place the run recorded', () => {
    // −m g·r = 2 kg · 10 m/s² · 4 m
    expect(potentialAt(document([]), moved(0), { account: 'gravity', of: 'upper' }, 1)).toBe(80);
  });

  it('has a spring as ½ k δ², with δ from where its ends are', () => {
    // Ends (0, 0) and (3, 4): 5 m apart, 1 m longer than free.
    expect(stored(spring())).toBeCloseTo(5, 12);
    expect(stored(spring({ freeLength: 7 }))).toBeCloseTo(20, 12);
  });

  it('turns the end of a spring with its body', () => {
    const off = spring({
      between: [
        { of: 'ground', at: [3, 4] },
        { of: 'upper', at: [5, 0] },
      ],
      freeLength: 1,
    });
    // 2 m off the centre, a quarter turned: at (3, 6), 2 m from (3, 4), 1 m longer than free.
    expect(stored(off, moved(0, Math.PI / 2))).toBeCloseTo(5, 12);
  });

  it('has nothing in a one-way spring on its other side', () => {
    expect([stored(spring({ acts: 'compression' })), stored(spring({ acts: 'extension' }))]).toEqual([0, 5]);
    expect(stored(spring({ acts: 'compression', freeLength: 7 }))).toBeCloseTo(20, 12);
    expect(stored(spring({ acts: 'extension', freeLength: 7 }))).toBe(0);
  });

  it('has a curve by its area from nil, with the last slopes beyond its ends', () => {
    const curve: LinearSpring['curve'] = [
      [-1, -4],
      [0, 0],
      [0.5, 5],
      [0.75, 6],
    ];
    // δ = 1: ½·0.5·5 + 0.25·5.5 + 0.25·6.5 (the slope of 4 N/m goes on)
    expect(stored(spring({ curve }))).toBeCloseTo(1.25 + 1.375 + 1.625, 12);
    // δ = −2: ½·2·8 (the slope of 4 N/m goes on)
    expect(stored(spring({ curve, freeLength: 7 }))).toBeCloseTo(8, 12);
  });

  it('has a torsion spring by the turn since drawn', () => {
    const torsion: TorsionSpring = { kind: 'torsion', id: 's', between: ['ground', 'upper'], rate: 8, freeAngle: 0.5 };
    // Ground relative to the body: −1.5 − 0.5 = −2
    expect(stored(torsion, moved(0, 1.5))).toBeCloseTo(16, 12);
  });

  it('has nothing to say of what stores nothing, of a compliant pair, and of what is not in the document', () => {
    const mechanism = document([spring()]);
    const at = (account: 'friction' | 'spring' | 'gravity', of: string | [string, string]) =>
      potentialAt(mechanism, moved(0), { account, of }, 1);
    expect([at('friction', 'upper'), at('spring', ['upper', 'chute']), at('spring', 't'), at('gravity', 'x')]).toEqual(
      Array(4).fill(undefined),
    );
  });
});
