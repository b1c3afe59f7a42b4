import { describe, expect, it } from 'vitest';
import { runAuditor } from '../../sim/auditor/index.js';
import { runStepper } from '../../sim/stepper/index.js';
import { machines } from '../support/machines.js';
import { mechanismOf, Run, type Parts } from '../support/run.js';

/** What the contract lets two runs that agree differ by: of a speed, of the extent, of the turnover. */
const AGREES = 5e-3;

/** Stops the clock of a machine a little into its run, where impacts have not yet magnified what the step leaves. */
const upTo = (parts: Parts, until: number): Parts => ({ ...parts, run: { until, step: 2e-4 } });

/** Machines whose outcome hangs on the order of impacts, and until when the two can be expected to agree. */
const SHORT: Record<string, number> = {
  'polygons, one of them not convex, that fall in a heap': 0.3,
  'rounded bars that roll and topple': 0.3,
};

describe.each(Object.entries(machines))('stepper and auditor on %s', (name, parts) => {
  const until = SHORT[name] ?? 0.8;
  const mechanism = mechanismOf(upTo(parts, until));
  const stepper = new Run(mechanism, runStepper(mechanism));
  const auditor = new Run(mechanism, runAuditor(mechanism));
  const ids = mechanism.bodies.map(({ id }) => id);

  it('end with their bodies at the same places and speeds', () => {
    expect(auditor.recording.end).toBe('reachedEnd');
    const fastest = Math.max(...ids.flatMap((id) => auditor.motions(id).map(({ speed }) => speed)), 1e-3);
    let [place, speed] = [0, 0];
    for (const id of ids) {
      const [one, other] = [stepper.motion(id), auditor.motion(id)];
      place = Math.max(place, Math.hypot(one.x - other.x, one.y - other.y) / mechanism.extent);
      speed = Math.max(speed, Math.hypot(one.vx - other.vx, one.vy - other.vy) / fastest);
    }
    console.log(`${name}: places ${place.toExponential(1)} of the extent, speeds ${speed.toExponential(1)}`);
    expect(place).toBeLessThan(AGREES);
    expect(speed).toBeLessThan(AGREES);
  });

  it('book the same work and heat on every account', () => {
    const [one, other] = [stepper.ledger(), auditor.ledger()];
    const turnover = Math.max(other.turnover, 1e-12);
    for (const entry of other.entries) {
      if (entry.kind === 'numerical') continue;
      const twin = one.entries.find(
        ({ account, of }) => account === entry.account && [of].flat().join() === [entry.of].flat().join(),
      );
      expect(
        Math.abs((twin?.work ?? 0) - entry.work) / turnover,
        `${entry.account} ${[entry.of].flat().join('/')}`,
      ).toBeLessThan(AGREES);
      expect(Math.abs((twin?.heat ?? 0) - entry.heat) / turnover).toBeLessThan(AGREES);
    }
  });
});
