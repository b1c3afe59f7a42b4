import { describe, expect, it } from 'vitest';
import type { Recording, RunEvent } from '../../../../sim/recording/index.js';
import { evenly, judged, pairOf, reasonOf, runOf, stationAt, touchAt, valueOf } from '../support.js';

const pair: [string, string] = ['upper', 'lower'];
const ground = (x: number) => ({ of: 'ground', at: [x, 0] as const });

/** Over two seconds, rows every 0.1 s from 0.03 s on: forces whose greatest value, at 1 s, falls between two rows. */
function run(events: readonly RunEvent[] = []): Recording {
  return runOf(
    {
      bodies: [{ id: 'upper', mass: 2, inertia: 0 }],
      accounts: [],
      contacts: [{ between: pair }],
      joints: [{ id: 'pin' }],
      springs: [
        { id: 'coil', between: [ground(0), ground(1)] },
        { id: 'wound', between: ['upper', 'ground'] },
      ],
      dampers: [{ id: 'oil', between: [ground(0), ground(1)] }],
    },
    evenly(19, 1.9).map((time) => time + 0.03),
    (time, { contacts: [{ columns }], joints: [joint], springs: [coil, wound], dampers: [oil] }) => {
      const hump = 100 - 40 * (time - 1) ** 2;
      return [
        [columns.points, 2],
        [columns.normal, 0.8 * hump],
        [columns.friction, -0.6 * hump],
        [joint.columns.fx, 0.6 * hump],
        [joint.columns.fy, -0.8 * hump],
        [coil.columns.force, -hump],
        [wound.columns.force, hump],
        [oil.columns.force, -hump],
      ];
    },
    events,
  );
}

describe('peak force', () => {
  it.each([[pair], ['pin'], ['coil'], ['oil']] as const)(
    'of %s is the greatest magnitude, also between two rows',
    (of) => {
      const { result, findings } = judged(
        { measure: 'peakForce', of: of as string | [string, string], atMost: 120 },
        run(),
      );
      expect(result.value).toBeCloseTo(100, 10);
      expect(result.at).toBeCloseTo(1, 10);
      expect(result).toMatchObject({ unit: 'N', passes: true });
      expect(findings).toEqual([]);
    },
  );

  it('is that of its span, up to the row of its last station', () => {
    const events = [stationAt('2', 4, 0.43), stationAt('3', 6, 0.63)];
    const asked = { measure: 'peakForce', of: 'coil', from: '2', to: '3', atMost: 200 } as const;
    expect(valueOf(asked, run(events))).toBeCloseTo(100 - 40 * 0.37 ** 2, 12);
  });

  it('leaves rigid impacts out, and says so', () => {
    const hit = run([touchAt(pair, 3, 0.33), touchAt(['upper', 'wall'], 5, 0.53)]);
    const one = judged({ measure: 'peakForce', of: pair, atMost: 120 }, hit);
    expect(one.result.value).toBeCloseTo(100, 10);
    expect(one.findings).toMatchObject([{ severity: 'note', of: ['q'] }]);
    expect(one.result.note).toBe('1 rigid impact has no force, and is left out.');
    // A joint is loaded by every impact, a spring by none.
    const joints = [{ id: 'pin', kind: 'pin', between: ['upper', 'ground'], at: [0, 0] }] as const;
    expect(
      judged({ measure: 'peakForce', of: 'pin', atMost: 120 }, hit, { joints: [...joints] as never }).result.note,
    ).toBe('2 rigid impacts have no force, and are left out.');
    expect(judged({ measure: 'peakForce', of: 'coil', atMost: 120 }, hit).findings).toEqual([]);
  });

  it('counts the touches of a compliant pair as forces', () => {
    const hit = run([touchAt(pair, 3, 0.33)]);
    expect(
      judged({ measure: 'peakForce', of: pair, atMost: 120 }, hit, { contacts: [pairOf(pair, 1e4)] }).findings,
    ).toEqual([]);
  });

  it('does not count an impact at its last station, which comes after it', () => {
    const hit = run([touchAt(pair, 6, 0.63), stationAt('3', 6, 0.63)]);
    expect(judged({ measure: 'peakForce', of: pair, to: '3', atMost: 120 }, hit).findings).toEqual([]);
  });

  it('is none of a pair that met in rigid impacts only', () => {
    const hit = run([touchAt(pair, 3, 0.33)]);
    const { width, contacts } = hit.layout;
    for (let row = 0; row < hit.rowCount; row++) {
      hit.rows[row * width + contacts[0].columns.normal] = 0;
      hit.rows[row * width + contacts[0].columns.friction] = 0;
    }
    expect(reasonOf({ measure: 'peakForce', of: pair, atMost: 1 }, hit)).toContain('a rigid impact has no force');
  });

  it('is nil for a pair that never met', () => {
    expect(valueOf({ measure: 'peakForce', of: ['lower', 'wall'], atMost: 1 }, run())).toBe(0);
  });

  it('is none of a torsion spring, which gives a torque', () => {
    expect(reasonOf({ measure: 'peakForce', of: 'wound', atMost: 1 }, run())).toContain('wound gives a torque');
  });
});
