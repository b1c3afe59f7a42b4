import { describe, expect, it } from 'vitest';
import { cross, distance, dot, norm, rotate, subtract, type Vec } from '../../../sim/core/vec.js';
import { camMotion, camPoint, motionLaw } from '../../../sim/geometry/index.js';
import type { CamLaw, CamShape } from '../../../sim/mechanism/kinds/body.js';

type Law = Exclude<CamLaw, 'table'>;

/** Peak factors of velocity, acceleration, jerk (VDI 2143-1; Norton, Cam Design, ch. 2–3), computed from the closed forms. */
const PEAKS: [Law, number, number, number][] = [
  ['parabolic', 2, 4, 0],
  ['harmonic', Math.PI / 2, Math.PI ** 2 / 2, 15.5031383401],
  ['cycloidal', 2, 6.28318530718, 39.4784176044],
  ['modified-trapezoid', 2, 4.88812376281, 61.4259748124],
  ['modified-sine', 1.75960338595, 5.52795707054, 69.4663572887],
  ['3-4-5', 1.875, 5.7735026919, 60],
  ['4-5-6-7', 2.1875, 7.5131884044, 52.5],
];

const samples = Array.from({ length: 20_001 }, (_, k) => k / 20_000);

describe('a motion law', () => {
  it.each(PEAKS)('%s has the published peak factors', (law, velocity, acceleration, jerk) => {
    const motions = samples.map((x) => motionLaw(law, x));
    const peak = (pick: (m: (typeof motions)[0]) => number): number =>
      Math.max(...motions.map((m) => Math.abs(pick(m))));
    expect(peak((m) => m.velocity) / velocity).toBeCloseTo(1, 7);
    expect(peak((m) => m.acceleration) / acceleration).toBeCloseTo(1, 7);
    if (jerk > 0) expect(peak((m) => m.jerk) / jerk).toBeCloseTo(1, 7);
  });

  it.each(PEAKS)('%s rises from 0 to 1 and starts and ends at rest', (law) => {
    const [start, end] = [motionLaw(law, 0), motionLaw(law, 1)];
    expect(start.displacement).toBeCloseTo(0, 14);
    expect(end.displacement).toBeCloseTo(1, 14);
    expect(start.velocity).toBeCloseTo(0, 14);
    expect(end.velocity).toBeCloseTo(0, 14);
  });

  it.each(PEAKS)('%s has derivatives that agree with differences', (law) => {
    const h = 1e-5;
    for (let x = 0.013; x < 1; x += 0.0171) {
      // The parabolic law jumps in the middle.
      if (Math.abs(x - 0.5) < 2 * h) continue;
      const [a, m, b] = [motionLaw(law, x - h), motionLaw(law, x), motionLaw(law, x + h)];
      expect(Math.abs((b.displacement - a.displacement) / (2 * h) - m.velocity)).toBeLessThan(1e-7);
      expect(Math.abs((b.velocity - a.velocity) / (2 * h) - m.acceleration)).toBeLessThan(1e-6);
      if (law !== 'modified-trapezoid' && law !== 'modified-sine') {
        expect(Math.abs((b.acceleration - a.acceleration) / (2 * h) - m.jerk)).toBeLessThan(1e-5);
      }
    }
  });
});

const rad = Math.PI / 180;
const base: CamShape = {
  kind: 'cam',
  baseRadius: 0.042,
  turns: 'counterclockwise',
  follower: { kind: 'roller', radius: 0.008, offset: 0, along: [0, 1] },
  segments: [
    { lift: 0.02, over: 90 * rad, law: 'cycloidal' },
    { lift: 0, over: 60 * rad, law: 'dwell' },
    { lift: -0.02, over: 90 * rad, law: '3-4-5' },
    { lift: 0, over: 120 * rad, law: 'dwell' },
  ],
};

const variants: [string, CamShape][] = [
  ['centric roller', base],
  ['offset roller', { ...base, follower: { ...base.follower, offset: 0.012 } }],
  ['clockwise offset roller', { ...base, turns: 'clockwise', follower: { ...base.follower, offset: -0.01 } }],
  ['level flat face', { ...base, follower: { kind: 'flat', radius: 0, offset: 0, along: [1, 0] } }],
  [
    'clockwise flat face',
    { ...base, turns: 'clockwise', follower: { kind: 'flat', radius: 0, offset: 0, along: [0, 1] } },
  ],
  ['knife', { ...base, follower: { kind: 'knife', radius: 0, offset: 0.005, along: [0, 1] } }],
  [
    'swinging roller',
    {
      ...base,
      follower: { ...base.follower, pivot: [0.1, 0.02], arm: 0.09 },
      segments: base.segments.map((segment) => ({ ...segment, lift: segment.lift / 0.09 })),
    },
  ],
];

/** The profile as the sheet sees it when the cam has turned by `turn` in its working sense. */
function turned(cam: CamShape, turn: number, count = 7200): Vec[] {
  const angle = cam.turns === 'counterclockwise' ? turn : -turn;
  return Array.from({ length: count }, (_, k) => rotate(camPoint(cam, (2 * Math.PI * k) / count).at, angle));
}

describe('a cam profile', () => {
  it.each(variants)('moves its follower as its segments say: %s', (_, cam) => {
    const { follower } = cam;
    const [ux, uy] = follower.along;
    for (const turn of [0.2, 0.9, 1.4, 2.1, 3.3, 5]) {
      const points = turned(cam, turn);
      const { s } = camMotion(cam, turn);
      if (follower.kind === 'flat') {
        // A flat face rests on the profile's highest point along the line.
        const highest = Math.max(...points.map((p) => dot(p, follower.along)));
        expect(highest).toBeCloseTo(cam.baseRadius + s, 7);
        continue;
      }
      const reach = cam.baseRadius + (follower.kind === 'roller' ? follower.radius : 0);
      let center: Vec;
      if (follower.pivot && follower.arm) {
        const far = norm(follower.pivot);
        const low = Math.acos((follower.arm ** 2 + far ** 2 - reach ** 2) / (2 * follower.arm * far));
        const [px, py] = rotate(follower.pivot, Math.PI + low + s);
        center = [follower.pivot[0] + (px * follower.arm) / far, follower.pivot[1] + (py * follower.arm) / far];
      } else {
        const height = Math.sqrt(reach ** 2 - follower.offset ** 2) + s;
        center = [height * ux + follower.offset * uy, height * uy - follower.offset * ux];
      }
      // The roller touches the profile: its centre is one radius from the nearest point.
      const nearest = Math.min(...points.map((p) => distance(p, center)));
      expect(nearest).toBeCloseTo(follower.kind === 'roller' ? follower.radius : 0, follower.kind === 'roller' ? 6 : 4);
    }
  });

  it.each(variants)('has a slope that agrees with differences: %s', (_, cam) => {
    const h = 1e-6;
    for (let turn = 0.011; turn < 6.28; turn += 0.0173) {
      const [a, m, b] = [camPoint(cam, turn - h), camPoint(cam, turn), camPoint(cam, turn + h)];
      const slope = subtract(b.at, a.at);
      expect(Math.hypot(slope[0] / (2 * h) - m.slope[0], slope[1] / (2 * h) - m.slope[1])).toBeLessThan(1e-6);
    }
  });

  it('has the published pressure angle and least radius of curvature: cycloidal 20 mm in 90°, prime circle 50 mm', () => {
    // tan φ = s′/(R + s); ρ = ((R+s)² + s′²)^{3/2} / ((R+s)² + 2 s′² − s″(R+s)).
    let steepest = 0;
    let sharpest = Infinity;
    for (const x of samples) {
      const turn = x * 90 * rad;
      const { s, ds, dds } = camMotion(base, turn);
      const r = 0.05 + s;
      steepest = Math.max(steepest, Math.atan2(ds, r) / rad);
      const radius = (r ** 2 + ds ** 2) ** 1.5 / (r ** 2 + 2 * ds ** 2 - dds * r);
      if (radius > 0) sharpest = Math.min(sharpest, radius);
    }
    expect(steepest).toBeCloseTo(23.2330166297932, 5);
    expect(sharpest * 1000).toBeCloseTo(39.4245620695054, 5);
    // The same sharpest radius by differences of the profile itself, a roller's radius less.
    let profile = Infinity;
    const h = 1e-4;
    for (let turn = 0.02; turn < 90 * rad - 0.02; turn += 2e-4) {
      const [a, m, b] = [camPoint(base, turn - h), camPoint(base, turn), camPoint(base, turn + h)];
      const change = subtract(b.slope, a.slope).map((v) => v / (2 * h)) as unknown as Vec;
      const bend = -cross(m.slope, change) / norm(m.slope) ** 3;
      if (bend > 0) profile = Math.min(profile, 1 / bend);
    }
    expect(profile * 1000).toBeCloseTo(39.4245620695054 - 8, 2);
  });

  it('follows a table through its points and on beyond a full turn', () => {
    const table: Vec[] = [
      [0, 0],
      [0.5, 0.002],
      [1, 0.006],
      [Math.PI, 0.01],
    ];
    const cam: CamShape = {
      ...base,
      segments: [
        { lift: 0.01, over: Math.PI, law: 'table', table },
        { lift: -0.01, over: Math.PI, law: 'cycloidal' },
      ],
    };
    for (const [turn, s] of table) expect(camMotion(cam, turn).s).toBeCloseTo(s, 15);
    expect(camMotion(cam, 0.7 + 4 * Math.PI).s).toBeCloseTo(camMotion(cam, 0.7).s, 14);
    expect(camMotion(cam, -0.3).s).toBeCloseTo(camMotion(cam, 2 * Math.PI - 0.3).s, 14);
  });
});
