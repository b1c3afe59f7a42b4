import { describe, expect, it } from 'vitest';
import { handCheck } from '../../../../sim/ledger/index.js';
import { box, disc, floor, particle, track } from '../../../support/parts.js';
import type { Parts } from '../../../support/run.js';
import { byHand, checkOf } from './by-hand.js';

/** The reason why a body has no speed by hand between the start and the end. */
function reasonOf(parts: Parts, of: string): string | undefined {
  const check = checkOf(byHand(parts), of, 'start', 'end');
  expect(check.speed).toBeNull();
  return check.reason;
}

describe('a hand check says which assumption fails', () => {
  it('where a body runs off the end of its track', () => {
    const parts: Parts = {
      bodies: [particle('bead', [0, 0], 1, { velocity: [3, 0] })],
      tracks: [track('table', [-1, 0], [0.5, 0])],
      contacts: [{ between: ['bead', 'table'], friction: 0.1 }],
      run: { until: 0.5 },
    };
    expect(reasonOf(parts, 'bead')).toBe('The way of bead passes a corner or an end of its track.');
  });

  it('where a body leaves a dome', () => {
    const angle = 0.2;
    const parts: Parts = {
      bodies: [particle('bead', [2 * Math.sin(angle), 2 * Math.cos(angle)], 1)],
      tracks: [{ id: 'dome', from: [-2, 0], to: [{ to: [2, 0], bulge: -1 }] }],
      contacts: [{ between: ['bead', 'dome'] }],
      run: { until: 1.4 },
    };
    expect(reasonOf(parts, 'bead')).toBe('bead leaves what it was on.');
  });

  it('where a contact gives way and damps', () => {
    const parts: Parts = {
      bodies: [disc('ball', [0, 0.3], 0.1, 1)],
      tracks: [floor],
      contacts: [{ between: ['ball', 'floor'], stiffness: 5000, damping: 20 }],
      run: { until: 0.5 },
    };
    expect(reasonOf(parts, 'ball')).toContain('gives way');
  });

  it('where a spring ends on another body that moves too', () => {
    const slide = (id: string, x: number): Parts => ({
      id: `guide-${id}`,
      kind: 'slide',
      between: [id, 'ground'],
      at: [x, 0],
      axis: [1, 0],
    });
    const parts: Parts = {
      gravity: [0, 0],
      bodies: [box('a', [0, 0], [0.1, 0.1], 1), box('b', [1, 0], [0.1, 0.1], 2)],
      joints: [slide('a', 0), slide('b', 1)],
      springs: [
        {
          id: 'tie',
          kind: 'linear',
          between: [
            { of: 'a', at: [0, 0] },
            { of: 'b', at: [1, 0] },
          ],
          rate: 50,
          freeLength: 0.7,
        },
      ],
      run: { until: 0.1 },
    };
    expect(reasonOf(parts, 'a')).toBe('tie ends on b, which moves too.');
  });

  it('where a guide and a floor both bear the weight', () => {
    const parts: Parts = {
      bodies: [box('block', [0, 0.1], [0.2, 0.2], 1, { velocity: [1, 0] })],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: 0.1 }],
      joints: [{ id: 'guide', kind: 'slide', between: ['block', 'ground'], at: [0, 0.1], axis: [1, 0] }],
      run: { until: 0.1 },
    };
    expect(reasonOf(parts, 'block')).toBe('floor and guide share the load of block.');
  });

  it('where a load acts for a part of the way', () => {
    const parts: Parts = {
      gravity: [0, 0],
      bodies: [box('block', [0, 0], [0.2, 0.2], 1)],
      joints: [{ id: 'guide', kind: 'slide', between: ['block', 'ground'], at: [0, 0], axis: [1, 0] }],
      loads: [{ id: 'push', on: { of: 'block', at: [0, 0] }, force: [5, 0], until: 0.1 }],
      run: { until: 0.3 },
    };
    expect(reasonOf(parts, 'block')).toBe('push acts for a part of the way only.');
  });

  it('where a drive’s effort hangs on time', () => {
    const parts: Parts = {
      gravity: [0, 0],
      bodies: [box('block', [0, 0], [0.2, 0.2], 1)],
      joints: [{ id: 'guide', kind: 'slide', between: ['block', 'ground'], at: [0, 0], axis: [1, 0] }],
      drives: [{ id: 'ram', on: 'guide', force: 4 }],
      run: { until: 0.3 },
    };
    const { mechanism, recording } = byHand(parts).ran;
    const law = { kind: 'effortCurve', over: 'time', curve: [[0, 4]] } as const;
    const drives = mechanism.drives.map((drive) => ({ ...drive, law: { ...law, curve: [...law.curve] } }));
    const [check] = handCheck({ ...mechanism, drives }, recording);
    expect(check.speed).toBeNull();
    expect(check.reason).toBe('What the drive ram gives hangs on time, not on the way.');
  });

  it('where a blow is off the centre and starts the body turning', () => {
    const parts: Parts = {
      bodies: [box('plank', [0, 0.5], [1, 0.1], 2)],
      tracks: [track('edge', [0.2, 0], [0.8, 0])],
      contacts: [{ between: ['plank', 'edge'], restitution: 0.5 }],
      run: { until: 0.4 },
    };
    expect(reasonOf(parts, 'plank')).toContain('off the centre of plank');
  });
});
