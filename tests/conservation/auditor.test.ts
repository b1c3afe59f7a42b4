import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { runAuditor } from '../../sim/auditor/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { expectAudited } from '../support/audit.js';
import { machines } from '../support/machines.js';
import { mechanismOf, Run } from '../support/run.js';

const folder = new URL('../../assets/examples/', import.meta.url);
const examples = readdirSync(folder)
  .filter((name) => name.endsWith('.json'))
  .map((name): [string, Mechanism] => {
    const { mechanism, problems } = readMechanism(readFileSync(new URL(name, folder), 'utf8'));
    if (!mechanism) throw new Error(problems.map(({ text }) => text).join('\n'));
    return [name, mechanism];
  });
const drawn = Object.entries(machines).map(([name, parts]): [string, Mechanism] => [name, mechanismOf(parts)]);

/**
 * What one machine shows beyond what every audit should: a corner that turns over another's edge is taken to be at it
 * although it is a little behind, and set back (see the auditor's README). Lower these where that is found in time.
 */
const beyond = new Map([['polygons, one of them not convex, that fall in a heap', { drift: 2e-8, numerical: 5e-9 }]]);

describe.each([...examples, ...drawn])('an audit of %s', (name, mechanism) => {
  const ran = new Run(mechanism, runAuditor(mechanism));

  it('closes to 1e-9 of its turnover, drifts less than 1e-10 of its size, and projects no energy away', () => {
    const { drift, evaluations } = ran.recording.counters;
    console.log(
      `${name}: open ${ran.openShare().toExponential(1)}, drift ${drift.toExponential(1)}, ${evaluations} evaluations`,
    );
    expectAudited(ran, beyond.get(name));
    expect(ran.recording.findings.filter(({ severity }) => severity === 'error')).toEqual([]);
  });

  it('gives as work of every store what the store has lost, and never creates energy in impacts or friction', () => {
    const ledger = ran.ledger();
    for (const { account, kind, work, heat, stored } of ledger.entries) {
      if (kind === 'stored' && stored) {
        expect(Math.abs(stored.from - stored.to - work)).toBeLessThanOrEqual(
          1e-9 * (Math.abs(stored.from) + ledger.turnover),
        );
      }
      if (['impact', 'friction', 'damper', 'joint-friction', 'rolling-resistance'].includes(account)) {
        expect(heat).toBeGreaterThanOrEqual(-1e-9 * ledger.turnover);
      }
    }
  });
});

describe.each(examples)('the stations of %s', (_, mechanism) => {
  it('move no further than their own error estimates say when the tolerance is halved', () => {
    const run = new Run(mechanism, runAuditor(mechanism));
    const finer = new Run(mechanism, runAuditor(mechanism, { tolerance: 5e-12 }));
    expect(finer.stations.map(({ id }) => id)).toEqual(run.stations.map(({ id }) => id));
    const ids = run.recording.layout.bodies.map(({ id }) => id);
    const said = new Map((run.recording.errors ?? []).map((error) => [error.station, error]));
    const fastest = Math.max(...ids.flatMap((id) => run.motions(id).map(({ speed }) => speed)));
    run.stations.forEach(({ id: station, row, time }, i) => {
      const [other, error] = [finer.stations[i], said.get(station)];
      if (!error) throw new Error(`no error estimate of station ${station}`);
      // Rounding is no matter of tolerance: 1e-12 of the run's time and speeds.
      expect(Math.abs(time - other.time)).toBeLessThanOrEqual(error.time + 1e-12 * run.endTime);
      for (const id of ids) {
        const [one, two] = [run.motion(id, row), finer.motion(id, other.row)];
        const apart = Math.hypot(one.vx - two.vx, one.vy - two.vy);
        expect(apart).toBeLessThanOrEqual(error.speed + 1e-12 * fastest);
      }
    });
  });
});
