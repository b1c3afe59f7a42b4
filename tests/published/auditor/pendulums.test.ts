import { describe, expect, it } from 'vitest';
import { audit, expectAudited } from '../../support/audit.js';
import { expectWithin } from '../../support/expect.js';
import { degrees, particle } from '../../support/parts.js';
import type { Parts, Run } from '../../support/run.js';

const earth = { gravity: [0, -9.81] };
const at = (id: string, time: number): Parts => ({ id, when: { time } });
const pin = (id: string, first: string, second: string, place: [number, number]): Parts => ({
  id,
  kind: 'pin',
  between: [first, second],
  at: place,
});

describe('the simple pendulum of the IFToMM collection (A01)', () => {
  // 1 kg on 1 m without mass, released level (lim.ii.udc.es/mbsbenchmark, A01); positions by Jacobi's elliptic functions.
  const times = [1, 2, 5, 10, 100];
  const ran = audit({
    ...earth,
    bodies: [particle('mass', [1, 0], 1)],
    joints: [pin('pin', 'mass', 'ground', [0, 0])],
    stations: [
      { id: 'start', when: { start: true } },
      ...times.map((time) => at(`t${time}`, time)),
      {
        id: 'bottom',
        when: {
          crosses: {
            point: { of: 'mass', at: [1, 0] },
            line: [
              [0, 0],
              [0, -2],
            ],
          },
        },
      },
    ],
    run: { until: 100 },
  });

  it.each([
    [1, -0.986291751131875, -0.165010853125541, 1e-11],
    [2, 0.793566195343322, -0.608483930443792, 1e-11],
    [5, 0.942305435043757, -0.334754338414001, 1e-10],
    [10, 0.275087462576117, -0.961419205099125, 1e-10],
    [100, 0.181513351427031, -0.983388480334058, 1e-7],
  ])('at t = %d s is at (%d, %d) m', (time, x, y, bound) => {
    const motion = ran.motion('mass', ran.station(`t${time}`).row);
    const off = Math.hypot(motion.x - x, motion.y - y);
    console.log(`A01 at ${time} s: off by ${off.toExponential(1)} m`);
    expect(off).toBeLessThan(bound);
  });

  it('passes its lowest point at 4.42944691807 m/s after a quarter of 2.36784194757624 s, and its pin does no work', () => {
    expectAudited(ran);
    const { row, time } = ran.station('bottom');
    expectWithin('quarter period [s]', time, 2.36784194757624 / 4, 1e-11);
    expectWithin('speed [m/s]', ran.motion('mass', row).speed, 4.42944691807002, 1e-11);
    expect(Math.abs(ran.entry('reaction', 'pin').work)).toBeLessThan(1e-9 * ran.ledger().turnover);
  });
});

describe('the period of a pendulum', () => {
  // T/T₀ = (2/π) K(sin²(A/2)).
  it.each([
    [10, 1.00190718814322],
    [30, 1.01740879759596],
    [60, 1.07318200714936],
    [90, 1.1803405990161],
    [120, 1.37288050061835],
    [170, 2.43936271967388],
  ])('at an amplitude of %d° is longer by the complete elliptic integral: %d', (amplitude, ratio) => {
    const place: [number, number] = [Math.sin(degrees(amplitude)), -Math.cos(degrees(amplitude))];
    const line = [
      [0, 0],
      [0, -2],
    ];
    const ran = audit({
      ...earth,
      bodies: [particle('mass', place, 1)],
      joints: [pin('pin', 'mass', 'ground', [0, 0])],
      stations: [1, 2].map((count) => ({
        id: `down${count}`,
        when: { crosses: { point: { of: 'mass', at: place }, line }, count },
      })),
      run: { until: { station: 'down2' }, atMost: 5 },
    });
    expectAudited(ran);
    const half = ran.station('down2').time - ran.station('down1').time;
    expectWithin('T/T₀', (2 * half) / (2 * Math.PI * Math.sqrt(1 / 9.81)), ratio, 1e-10);
  });
});

/** Two particles of 1 kg on massless links of 1 m, let go from angles to the downward vertical. */
function doublePendulum(first: number, second: number, until: number, stations: Parts[]): Parts {
  const knee: [number, number] = [Math.sin(first), -Math.cos(first)];
  const end: [number, number] = [knee[0] + Math.sin(second), knee[1] - Math.cos(second)];
  return {
    ...earth,
    bodies: [particle('upper', knee, 1), particle('lower', end, 1)],
    joints: [pin('hook', 'upper', 'ground', [0, 0]), pin('knee', 'lower', 'upper', knee)],
    stations,
    run: { until },
  };
}

/** (θ₁, θ₂, θ₁′, θ₂′) at a row. */
function angles(ran: Run, row: number): number[] {
  const [a, b] = [ran.motion('upper', row), ran.motion('lower', row)];
  const turn = (x: number, y: number, vx: number, vy: number): [number, number] => [Math.atan2(x, -y), x * vy - y * vx];
  const [first, firstRate] = turn(a.x, a.y, a.vx, a.vy);
  const [second, secondRate] = turn(b.x - a.x, b.y - a.y, b.vx - a.vx, b.vy - a.vy);
  return [first, second, firstRate, secondRate];
}

describe('a double pendulum let go from rest', () => {
  // 40-digit extrapolation of the equations of any text, two choices of step and order that agree to 2e-17.
  it.each([
    [
      90,
      [
        [1, -0.62508769980639, -1.034585085680012, -3.922279572887977, -1.303099248696331],
        [2, -0.482971534251754, -1.324048712302363, 3.065288192073401, 2.949271547571619],
        [5, -0.627186705066531, -1.301315550209812, 2.125408673842911, 3.881888727265607],
        [10, -0.56847466401595, -0.526393727932405, 6.078384885761965, -9.681360681708879],
      ],
    ],
    [
      30,
      [
        [1, -0.254551122872993, -0.546283476759551, -0.684575573367111, -1.149456509002356],
        [10, 0.0179208969251901, -0.00168507253891836, 0.584157079316901, 2.161505275305411],
      ],
    ],
  ])('at %d° has the angles and rates of the 40-digit table, to 1e-7 of a radian', (from, table) => {
    const start = degrees(from);
    const ran = audit(
      doublePendulum(
        start,
        start,
        10,
        table.map(([time]) => at(`t${time}`, time)),
      ),
    );
    expectAudited(ran);
    for (const [time, ...expected] of table) {
      const found = angles(ran, ran.station(`t${time}`).row);
      const off = Math.max(...found.map((value, i) => Math.abs(value - expected[i])));
      console.log(`${from}° at ${time} s: off by ${off.toExponential(1)}`);
      // The motion from 90° is chaotic: it magnifies what a tolerance leaves about tenfold every second or two.
      expect(off).toBeLessThan(time < 10 ? 1e-9 : 1e-7);
    }
  });
});
