import { describe, expect, it } from 'vitest';
import { box, floor, track } from '../../support/parts.js';
import { expectSound } from '../../support/expect.js';
import { G, run } from '../../support/run.js';

describe('ten boxes on each other', () => {
  const names = Array.from({ length: 10 }, (_, i) => `box-${i}`);
  const ran = run({
    bodies: names.map((id, i) => box(id, [0, 0.05 + 0.1 * i], [0.2, 0.1], 1)),
    tracks: [floor],
    contacts: [{ between: ['*', '*'], friction: 0.3 }],
    run: { until: 3 },
  });

  it('stay stacked: none moves a micrometre in 3 s (need of the stepper)', () => {
    expect(ran.recording.end).toBe('reachedEnd');
    const moved = names.map((id, i) => {
      const { x, y } = ran.motion(id);
      return Math.hypot(x, y - 0.05 - 0.1 * i);
    });
    console.log(`stack: moved ${Math.max(...moved).toExponential(1)} m at the most`);
    expect(Math.max(...moved)).toBeLessThan(1e-6);
  });

  it('press on each other with the weight of those above', () => {
    for (let i = 1; i < names.length; i += 1) {
      expect(ran.contact(names[i], names[i - 1], 'normal')).toBeCloseTo((10 - i) * G, 2);
    }
    expect(ran.contact('box-0', 'floor', 'normal')).toBeCloseTo(10 * G, 2);
  });
});

describe('ten boxes dropped on each other', () => {
  it('come to rest in their stack, and lose what they fell', () => {
    const ran = run({
      bodies: Array.from({ length: 10 }, (_, i) => box(`box-${i}`, [0, 0.05 + 0.11 * i], [0.2, 0.1], 1)),
      tracks: [floor],
      contacts: [{ between: ['*', '*'], friction: 0.3 }],
      run: { until: 3 },
    });
    expectSound(ran);
    // Each falls 10 mm farther than the one below it.
    const fell = 0.01 * 45 * G;
    expect(ran.total('gravity')).toBeCloseTo(fell, 3);
    expect(-ran.total('impact')).toBeCloseTo(fell, 2);
    expect(ran.motion('box-9').y).toBeCloseTo(0.95, 5);
  });
});

describe('a box against two walls and a floor', () => {
  it('does not move, though its contacts share the load in many ways', () => {
    const ran = run({
      bodies: [box('box', [0, 0.05], [0.2, 0.1], 1)],
      tracks: [track('bin', [-0.1, 1], [-0.1, 0], [0.1, 0], [0.1, 1])],
      contacts: [{ between: ['box', 'bin'], friction: 0.3 }],
      run: { until: 1 },
    });
    expectSound(ran);
    expect(Math.hypot(ran.motion('box').x, ran.motion('box').y - 0.05)).toBeLessThan(1e-9);
  });
});
