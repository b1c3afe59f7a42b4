import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vec } from '../../../sim/core/vec.js';
import { apart, balloonRadius, placeBalloons } from '../../../sim/drawing/balloons.js';
import { nameStations, stationMarks } from '../../../sim/drawing/stations.js';

const flat = () => ({ left: 0, right: 400, low: 100, high: 300 });
const anchors = fc.array(fc.tuple(fc.integer({ min: 0, max: 400 }), fc.integer({ min: 100, max: 300 })), { minLength: 1, maxLength: 20 }); // prettier-ignore

describe('balloons', () => {
  it('never cover each other, wherever their items are', () => {
    fc.assert(
      fc.property(anchors, (places) => {
        const balloons = placeBalloons(places.map((at, i) => ({ number: i + 1, at: at, onLine: true })), flat); // prettier-ignore
        expect(balloons.map(({ number }) => number).sort((a, b) => a - b)).toEqual(places.map((_, i) => i + 1));
        for (const a of balloons)
          for (const b of balloons) {
            const distance = Math.hypot(a.center[0] - b.center[0], a.center[1] - b.center[1]);
            if (a !== b) expect(distance).toBeGreaterThanOrEqual(2 * balloonRadius);
          }
      }),
    );
  });

  it('of neighbours stand in one row, in the order of their items, above what is drawn', () => {
    const row = placeBalloons(
      [160, 100, 130].map((x, i) => ({ number: i + 1, at: [x, 200], onLine: true })),
      flat,
    );
    const byX = [...row].sort((a, b) => a.center[0] - b.center[0]);
    expect(byX.map(({ number }) => number)).toEqual([2, 3, 1]);
    expect(new Set(row.map(({ center }) => center[1])).size).toBe(1);
    expect(row[0].center[1] + balloonRadius).toBeLessThan(flat().low);
  });

  it('that meet on the move give way along their row', () => {
    const still = { number: 1, at: [0, 0] as Vec, onLine: true, center: [50, 0] as Vec, flow: [1, 0] as Vec };
    const [first, second] = apart([still, { ...still, number: 2 }]);
    expect(first.center).toEqual([50, 0]);
    expect(second.center[0] - 50).toBeGreaterThanOrEqual(2 * balloonRadius);
    expect(second.center[1]).toBe(0);
  });
});

describe('stations', () => {
  const at = (x: number, mark: string) => ({ at: [x, 0] as Vec, mark, word: 'touch', open: false });
  const flags = (xs: number[]) =>
    stationMarks(xs.map((x, i) => at(x, String(i + 1))), 100).flatMap((each) => (each.kind === 'text' && each.text === 'touch' ? [each] : [])); // prettier-ignore

  it('stand on one base line where there is room', () => {
    expect(new Set(flags([0, 200, 400]).map(({ at: [, y] }) => y)).size).toBe(1);
  });

  it('at one place fly to both sides and then stand in rows, so that no word covers another', () => {
    const words = flags([100, 100, 100, 104]).map(({ at: [x, y], anchor }) => {
      const width = 'touch'.length * 6;
      const left = anchor[0] === 0 ? x : x - width;
      return { left, right: left + width, y };
    });
    for (const a of words)
      for (const b of words) {
        if (a === b) continue;
        expect(a.y !== b.y || a.right < b.left || b.right < a.left).toBe(true);
      }
  });

  it('carry short ids in their pennants and count where ids are words', () => {
    const short = nameStations([{ id: '1', when: { kind: 'start' } }, { id: '2', when: { kind: 'touch' } }]); // prettier-ignore
    expect(short.get('2')).toEqual({ mark: '2', word: 'touch' });
    const long = nameStations([{ id: 'let-go', when: { kind: 'start' } }], new Map([['let-go', 'Let go']]));
    expect(long.get('let-go')).toEqual({ mark: '1', word: 'Let go' });
  });
});
