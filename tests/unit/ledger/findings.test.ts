import { describe, expect, it } from 'vitest';
import { bookLedger, consecutiveLedgers, ledgerFindings, numericalShare } from '../../../sim/ledger/index.js';
import type { Finding, Recording } from '../../../sim/recording/index.js';
import { startRun } from '../recording/synthetic.js';
import { twoCrates } from './two-crates.js';

const system = ['upper', 'lower', 'block'];

function findingsOf(run: Recording): Finding[] {
  return ledgerFindings(run, consecutiveLedgers(run, system), system);
}

/** A block that is moved by a load of 100 J and by the method itself, by these works of two causes. */
function blockRun(truncation: number, clamp: number, solver: Recording['solver'] = 'stepper'): Recording {
  const { writer, row } = startRun({
    bodies: [{ id: 'block', mass: 2, inertia: 0 }],
    accounts: [
      { account: 'load', of: 'push', bodies: ['block'] },
      { account: 'numerical', of: null, cause: 'force-truncation', bodies: ['block'] },
      { account: 'numerical', of: null, cause: 'clamp', bodies: ['block'] },
    ],
  });
  const works = writer.layout.accounts.map(({ columns }) => columns.work[0]);
  row(0);
  const amounts = [100, truncation, clamp];
  const speed = Math.sqrt(amounts.reduce((sum, work) => sum + work));
  row(1, [[writer.layout.bodies[0].columns.vx, speed], ...works.map((column, i) => [column, amounts[i]] as const)]);
  row(2, [[writer.layout.bodies[0].columns.vx, speed], ...works.map((column, i) => [column, amounts[i]] as const)]);
  writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
  writer.event({ kind: 'station', station: '2', time: 1, row: 1 });
  return { ...writer.finish('reachedEnd'), solver, step: 0.001 };
}

describe('ledgerFindings', () => {
  it('has nothing to say of a run that is booked', () => {
    expect(findingsOf(twoCrates())).toEqual([]);
    expect(findingsOf(blockRun(0.1, -0.1))).toEqual([]);
  });

  it('passes on what the solver found', () => {
    const run = twoCrates();
    const finding: Finding = { severity: 'note', code: 'x', text: 'x', of: ['upper'], at: 1 };
    expect(findingsOf({ ...run, findings: [finding] })).toEqual([finding]);
  });

  it('calls a ledger open, an error, above 1e-9 of its turnover', () => {
    const run = twoCrates();
    const cell = 2 * run.layout.width + run.layout.accounts[3].columns.work[0];
    run.rows[cell] += 35e-9;
    expect(findingsOf(run)).toEqual([]);
    run.rows[cell] += 2e-9;
    expect(findingsOf(run)).toMatchObject([{ severity: 'error', code: 'ledger-open', of: ['1', '2'] }]);
    expect(findingsOf(run)[0].text).toContain('-3.7e-8 J of 36 J');
  });

  it('warns of each numerical cause above 0.5 % of the turnover, with its share and what to do', () => {
    const findings = findingsOf(blockRun(0.1, -0.7));
    expect(findings).toMatchObject([{ severity: 'warning', code: 'numerical-over-limit', of: ['1', '2'] }]);
    expect(findings[0].text).toBe(
      'From station 1 to 2 the stepper itself lost 0.7 J by its limit on how far a body moves in a step: 0.704 % of the ' +
        'turnover, where 0.5 % is the limit. Take a smaller step; it is 0.001 s now.',
    );
  });

  it('warns of causes that are above the limit together only', () => {
    const findings = findingsOf(blockRun(0.4, -0.4));
    expect(findings).toHaveLength(1);
    expect(findings[0].text).toContain('made or lost 0.8 J by the length of its steps and its limit');
  });

  it('tells the user of the auditor to tighten its tolerance', () => {
    expect(findingsOf(blockRun(2, 0, 'auditor'))[0].text).toMatch(
      /auditor itself made 2 J .* Take a tighter tolerance\.$/,
    );
  });

  it('measures a span in which nearly nothing happens on the scale of the whole run', () => {
    const run = blockRun(0, 0);
    const { columns } = run.layout.accounts[1];
    run.rows[2 * run.layout.width + columns.work[0]] = 1e-9;
    for (const row of [1, 2]) run.rows[row * run.layout.width + run.layout.bodies[0].columns.vx] = 0;
    const span = { from: '2', to: '3', fromRow: 1, toRow: 2 };
    const quiet = bookLedger(run, span, system);
    expect(numericalShare(quiet)).toBeGreaterThan(1);
    expect(ledgerFindings(run, [quiet], system).filter(({ code }) => code === 'numerical-over-limit')).toEqual([]);
  });

  it('reports numbers that are not finite', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.accounts[0].columns.work[0]] = NaN;
    expect(findingsOf(run).map(({ code }) => code)).toContain('non-finite');
  });
});

describe('numericalShare', () => {
  it('adds up the causes without letting them cancel', () => {
    const run = blockRun(1, -1);
    const [ledger] = consecutiveLedgers(run, system);
    expect(numericalShare(ledger)).toBeCloseTo(2 / 100, 12);
  });

  it('is nil where nothing happens at all', () => {
    expect(numericalShare(bookLedger(twoCrates(), { from: '1', to: '1', fromRow: 0, toRow: 0 }, system))).toBe(0);
  });
});
