import { describe, expect, it } from 'vitest';
import { disc, particle, track } from '../support/parts.js';
import { expectSound, expectWithin } from '../support/expect.js';
import { G, run, type Parts, type Run } from '../support/run.js';

/**
 * Down a slope, through arcs and a spline that meet it smoothly, up again: on a track without friction the speed is that of
 * the height alone, v² = v₀² + 2 g (y₀ − y), and no corner is met. A chord would give itself away as an impact.
 */
const ARC = Math.tan(Math.PI / 16);
/** Segments from (−2, 1): an arc of 45° out of the level, a slope, and an arc of 45° back into the level. */
const [R, S] = [1, Math.SQRT1_2];
const top: [number, number] = [-2, 1];
const steep: [number, number] = [top[0] + R * S, top[1] - R * (1 - S)];
const foot: [number, number] = [steep[0] + 0.5, steep[1] - 0.5];
const level: [number, number] = [foot[0] + R * S, foot[1] - R * (1 - S)];
const end: [number, number] = [level[0] + 2, level[1]];

type Segment = Parts;
const there: Segment[] = [{ to: steep, bulge: -ARC }, { to: foot }, { to: level, bulge: ARC }, { to: end }];
const start: [number, number] = [-3, 1];
const one = (side: string): Parts[] => [{ id: 'way', from: start, to: [{ to: top }, ...there], side }];
/** The same, drawn from its end to its start. */
const back: Parts[] = [
  {
    id: 'way',
    from: end,
    to: [{ to: level }, { to: foot, bulge: -ARC }, { to: steep }, { to: top, bulge: ARC }, { to: start }],
    side: 'right',
  },
];
/** Five tracks in place of one, the third and the last of them drawn the other way. */
const five: Parts[] = [
  track('a', start, top),
  { id: 'b', from: top, to: [{ to: steep, bulge: -ARC }] },
  { ...track('c', foot, steep), side: 'right' },
  { id: 'd', from: foot, to: [{ to: level, bulge: ARC }] },
  { ...track('e', end, level), side: 'right' },
];

const ways: [string, Parts[]][] = [
  ['as one track, free on its left', one('left')],
  ['as one track, free on both sides', one('both')],
  ['drawn backwards, free on its right', back],
  ['as five tracks, two of them drawn backwards', five],
];

describe.each(ways)('a smooth way %s', (_, tracks) => {
  const sent = (body: Parts): Run =>
    run({ bodies: [body], tracks, contacts: [{ between: ['body', '*'] }], run: { until: 1.9 } });

  it.each([
    ['a particle', particle('body', [-2.9, 1], 1, { velocity: [1, 0] })],
    ['a disc', disc('body', [-2.9, 1.1], 0.1, 1, { velocity: [1, 0] })],
  ])('gives %s the speed of its height within 1e-4, and no impact', (name, body) => {
    const ran = sent(body);
    expectSound(ran);
    const [from, to] = [ran.motion('body', 0), ran.motion('body')];
    expect(to.x).toBeGreaterThan(level[0]);
    expectWithin(`${name} [m/s]`, to.speed, Math.sqrt(1 + 2 * G * (from.y - to.y)), 1e-4);
    expect(ran.events('touch')).toEqual([]);
    // It parts from each track as it passes on to the next.
    expect(ran.events('parts')).toHaveLength(tracks.length - 1);
    expect(Math.abs(ran.total('impact'))).toBeLessThan(1e-9 * ran.ledger().turnover);
    expect(ran.numericalShare()).toBeLessThan(1e-4);
  });
});

describe('a spline', () => {
  const dip: Parts = {
    id: 'dip',
    from: [-1, 0.6],
    to: [
      {
        through: [
          [-0.6, 0.15],
          [0, 0],
          [0.6, 0.2],
          [1, 0.7],
        ],
      },
    ],
  };

  it.each(['left', 'both'])('free on the side "%s" gives a particle the speed of its height, and no impact', (side) => {
    const ran = run({
      bodies: [{ id: 'bead', shape: { kind: 'particle' }, mass: 1, rest: { on: 'dip', at: 0.05 } }],
      tracks: [{ ...dip, side }],
      contacts: [{ between: ['bead', 'dip'] }],
      run: { until: 2 },
    });
    expectSound(ran);
    expect(ran.events('touch')).toEqual([]);
    const [{ y }] = ran.motions('bead');
    const fastest = ran.motions('bead').reduce((a, b) => (b.speed > a.speed ? b : a));
    expectWithin('greatest speed [m/s]', fastest.speed, Math.sqrt(2 * G * (y - fastest.y)), 1e-4);
    expect(Math.abs(ran.total('impact'))).toBe(0);
  });

  it('lets a disc roll with v² = 2 g Δh/(1 + ½), its centre at its radius above the curve', () => {
    const ran = run({
      bodies: [{ id: 'disc', shape: { kind: 'disc', radius: 0.08 }, mass: 1, rest: { on: 'dip', at: 0.1 } }],
      tracks: [dip],
      contacts: [{ between: ['disc', 'dip'], friction: 1 }],
      run: { until: 1.5 },
    });
    expectSound(ran);
    const [{ y }] = ran.motions('disc');
    const fastest = ran.motions('disc').reduce((a, b) => (b.speed > a.speed ? b : a));
    expectWithin('greatest speed [m/s]', fastest.speed, Math.sqrt((2 * G * (y - fastest.y)) / 1.5), 1e-4);
    expect(Math.abs(ran.total('friction', 'heat'))).toBeLessThan(1e-6 * ran.ledger().turnover);
    expect(ran.total('impact')).toBe(0);
  });
});

describe('the fastest way down (Johann Bernoulli 1696): a cycloid from (0, 0) to (1, −1), as a spline', () => {
  it('takes 0.582895 s at g = 9.81, the straight line 0.638551 s', () => {
    const [r, last] = [0.57291703753175, 2.41201114391353];
    const cycloid = (t: number): [number, number] => [r * (t - Math.sin(t)), -r * (1 - Math.cos(t))];
    const begin = 0.15;
    const through = Array.from({ length: 40 }, (_, i) => cycloid(begin + ((last - begin) * (i + 1)) / 40));
    const ran = run({
      gravity: [0, -9.81],
      // It starts a little way on, at the speed that it has there.
      bodies: [
        particle('bead', cycloid(begin), 1, {
          velocity: ((v: number) => [v * Math.sin(begin / 2), -v * Math.cos(begin / 2)])(
            Math.sqrt(-2 * 9.81 * cycloid(begin)[1]),
          ),
        }),
      ],
      tracks: [{ id: 'curve', from: cycloid(begin), to: [{ through }] }],
      contacts: [{ between: ['bead', 'curve'] }],
      stations: [
        {
          id: 'down',
          when: {
            crosses: {
              point: { of: 'bead', at: cycloid(begin) },
              line: [
                [0.99, -2],
                [0.99, 0],
              ],
            },
          },
        },
      ],
      run: { until: { station: 'down' }, atMost: 1 },
    });
    // On a cycloid the parameter runs evenly: t = √(r/g) θ.
    let theta = last;
    for (let k = 0; k < 50; k += 1) theta -= (r * (theta - Math.sin(theta)) - 0.99) / (r * (1 - Math.cos(theta)));
    expectWithin('time [s]', ran.endTime, Math.sqrt(r / 9.81) * (theta - begin), 1e-4);
    expectWithin('whole time [s]', Math.sqrt(r / 9.81) * last, 0.582895463154743, 1e-12);
  });
});
