import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../sim/ledger/index.js';
import type { Recording } from '../../../sim/recording/index.js';
import { checkResult, checkText, type CheckResult } from '../../../sim/report/index.js';
import { twoCrates } from '../ledger/two-crates.js';
import { cratesMechanism } from './crates.js';

/** The mechanism of the run `twoCrates`, whose gravity is what its accounts say of bodies that stay where they are. */
const mechanism = { ...cratesMechanism(), gravity: [0, 0] as const };

/** The run, with works of gravity that no document gives booked to a load. */
function run(change: (copy: Recording) => void = () => undefined): Recording {
  const copy = twoCrates();
  for (const account of copy.layout.accounts) if (account.account === 'gravity') account.account = 'load';
  change(copy);
  return copy;
}

function resultOf(stepper: Recording, auditor = run()): CheckResult {
  const audit = {
    run: { ...auditor, solver: 'auditor' as const },
    comparison: compareRuns(mechanism, stepper, auditor),
  };
  return checkResult({ file: 'crates.json', title: 'Crates', mechanism, stepper, audit });
}

const slower = (copy: Recording): void => {
  copy.rows[2 * copy.layout.width + copy.layout.bodies[0].columns.vx] *= 0.99;
};
const section = (result: CheckResult, width = 88): string[] => {
  const lines = checkText(result, { width }).split('\n');
  const from = lines.findIndex((line) => line.includes('Compared'));
  return lines.slice(from, lines.includes('Findings') ? lines.indexOf('Findings') : undefined);
};

describe('the text of a comparison', () => {
  it('has each figure of both runs, their difference in the unit and in percent', () => {
    const lines = section({ ...resultOf(run(slower)), handCheck: [] });
    expect(lines[0]).toMatch(/At +Compared, tolerance 0.5 % +Stepper +Auditor +Hand +Difference +%$/);
    expect(lines).toContainEqual(expect.stringMatching(/^≠ +speed upper, m\/s +4\.2002 +4\.2426 +– +−0\.0424 +1$/));
    expect(lines).toContainEqual(expect.stringMatching(/^ +speed lower, m\/s +4\.2426 +4\.2426 +– +0\.0000 +0$/));
    expect(lines).toContainEqual(expect.stringMatching(/^ +Friction lower\/chute, J +−10\.000 +−10\.000 +0\.000 +0$/));
  });

  it('leaves places and spins out while they are within tolerance', () => {
    const moved = (copy: Recording): void => {
      copy.rows[2 * copy.layout.width + copy.layout.bodies[0].columns.x] = 0.5;
    };
    expect(section(resultOf(run())).join()).not.toMatch(/ x upper/);
    expect(section(resultOf(run(moved)))).toContainEqual(
      expect.stringMatching(/^≠ +x upper, mm +500\.0 +0\.0 +– +500 +100$/),
    );
  });

  it('has the speed by hand beside the two', () => {
    const result = resultOf(run());
    const [hand] = checkResult({ file: '', title: '', mechanism, stepper: run() }).handCheck;
    const given = { ...hand, from: '1', to: '2', of: 'upper', speed: 4.25 };
    expect(section({ ...result, handCheck: [given] })).toContainEqual(
      expect.stringMatching(/speed upper, m\/s +4\.2426 +4\.2426 +4\.2500/),
    );
  });

  it('is not there where nothing was compared', () => {
    expect(checkText(checkResult({ file: '', title: '', mechanism, stepper: run() }))).not.toContain('Compared');
  });

  it.each([72, 100])('keeps within %d columns', (width) => {
    expect(Math.max(...section(resultOf(run(slower)), width).map((line) => line.length))).toBeLessThanOrEqual(width);
  });
});

describe('the result of an audited check', () => {
  it('has the auditor’s run and the criteria by it', () => {
    const speed = { id: 'q', measure: 'speed', of: 'upper', at: '2', atMost: 5 } as const;
    const stepper = run();
    const auditor = { ...run(), solver: 'auditor' as const };
    const judged = (end: Recording['end']): CheckResult => {
      const audited = { ...auditor, end };
      const audit = { run: audited, comparison: compareRuns(mechanism, stepper, audited) };
      return checkResult({ file: '', title: '', mechanism: { ...mechanism, criteria: [speed] }, stepper, audit });
    };
    expect(judged('reachedEnd').criteria).toMatchObject([{ by: 'auditor', passes: true }]);
    expect(judged('timeBudget')).toMatchObject({ verdict: 'unaudited', criteria: [{ by: 'stepper', passes: true }] });
    expect(judged('timeBudget').findings.map(({ code }) => code)).toContain('unaudited');
  });

  it('says once what both runs missed', () => {
    const missed = resultOf(run()).findings.filter(({ code }) => code === 'station-not-reached');
    expect(missed).toMatchObject([{ of: ['3'] }]);
  });

  it('shows the auditor’s run where the stepper refused', () => {
    const audit = { run: { ...run(), solver: 'auditor' as const }, comparison: null };
    const text = checkText(checkResult({ file: '', title: '', mechanism, stepper: null, audit }));
    expect(text).toContain('Account 1 to 2');
    expect(text).toContain('Unaudited, the auditor alone');
  });
});
