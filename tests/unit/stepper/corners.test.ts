import { describe, expect, it } from 'vitest';
import { audit } from '../../support/audit.js';
import { expectSound, expectWithin } from '../../support/expect.js';
import { box, disc, track } from '../../support/parts.js';
import { G, run, type Parts } from '../../support/run.js';

/** A table whose end is the corner at the origin, with what it goes on to. */
const table = (...points: [number, number][]): Parts => track('table', [-1, 0], [0, 0], ...points);
const on = (body: Parts, path: Parts, contact: Parts, until: number): Parts => ({
  bodies: [body],
  tracks: [path],
  contacts: [{ between: ['body', 'table'], ...contact }],
  run: { until },
});

describe('a disc that goes over a convex corner of one track on to the next flank', () => {
  // It would leave the corner at cos θ = (2 + v²/(g r))/3 without friction, steeper than these flanks.
  it.each([
    ['smooth, on to 45°', [1, -1], 0, 0.3, 0],
    ['rolling, on to 11°', [1, -0.2], 0.6, 0.3, -3],
  ] as const)('%s: keeps its energy and its contact, with no impact', (_, end, friction, speed, spin) => {
    const body = disc('body', [-0.2, 0.1], 0.1, 1, { velocity: [speed, 0], spin });
    const ran = run(on(body, table([...end]), { friction }, 1.1));
    expectSound(ran);
    expect(ran.recording.findings).toEqual([]);
    expect(ran.events('touch')).toEqual([]);
    expect(ran.events('parts')).toEqual([]);
    expect(ran.numericalShare()).toBeLessThan(1e-5);
    const { x, y, speed: now } = ran.motion('body');
    // r from the flank, on its free side.
    expect((x * -end[1] + y * end[0]) / Math.hypot(...end)).toBeCloseTo(0.1, 6);
    const share = spin === 0 ? 1 : 1.5;
    expectWithin('v² [m²/s²]', now ** 2, speed ** 2 + (2 * G * (0.1 - y)) / share, 1e-4);
  });
});

describe('what stands on a convex corner of one track', () => {
  it('is one contact: a disc slips there when the exact run says', () => {
    const parts = on(disc('body', [0.02, Math.sqrt(0.0096)], 0.1, 1), table([0, -1]), { friction: 0.3 }, 0.3);
    const ran = run(parts);
    expectSound(ran);
    expect(ran.contact('body', 'table', 'points', 1)).toBe(1);
    expectWithin('slips at [s]', ran.events('slips')[0].time, audit(parts).events('slips')[0].time, 5e-3);
  });

  it('is one contact: a box that tips over it slips when the exact run says', () => {
    const parts = on(box('body', [0.03, 0.05], [0.4, 0.1], 1), table([0, -1]), { friction: 0.3 }, 0.3);
    const ran = run(parts);
    expectSound(ran);
    expectWithin('slips at [s]', ran.events('slips')[0].time, audit(parts).events('slips')[0].time, 5e-3);
  });

  it('is one contact: it bears with the stiffness of the pair, not twice that', () => {
    const ran = run(on(disc('body', [0, 0.11], 0.1, 1), table([0, -1]), { stiffness: 1e5 }, 0.1));
    expectSound(ran);
    const [touch, parts] = [ran.events('touch')[0].time, ran.events('parts')[0].time];
    // m ẍ = −k x − m g, met at v: half a period and what the weight adds, 2 atan(g/(v ω))/ω.
    const [rate, speed] = [Math.sqrt(1e5), Math.sqrt(2 * G * 0.01)];
    const exact = (Math.PI + 2 * Math.atan(G / (speed * rate))) / rate;
    expectWithin('in touch for [s]', parts - touch, exact, 2e-2);
    expect(ran.total('damper', 'heat')).toBe(0);
  });
});
