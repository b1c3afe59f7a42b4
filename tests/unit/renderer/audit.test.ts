import { describe, expect, it } from 'vitest';
import { limitText, measureWords, outcomeWord, valueText } from '../../../renderer/criteria/criterion-figures.js';
import { limitScale } from '../../../renderer/criteria/limit-scale.js';
import { bothFigures } from '../../../renderer/auditor/both-figures.js';
import { boundText, shareText } from '../../../renderer/format/share.js';
import { checkDifference, checkShown } from '../../../renderer/hand-check/check-shown.js';
import { isHalf, spacing } from '../../../renderer/hand-check/spacing.js';
import { Account } from '../../../renderer/state/account.svelte.js';
import { Audit } from '../../../renderer/state/audit.svelte.js';
import { Run } from '../../../renderer/state/run.svelte.js';
import type { CriterionResult } from '../../../sim/criteria/index.js';
import type { HandCheck, Token } from '../../../sim/ledger/index.js';
import { runAuditor } from '../../../sim/auditor/index.js';
import { runStepper } from '../../../sim/stepper/index.js';
import { disc, floor } from '../../support/parts.js';
import { mechanismOf } from '../../support/run.js';

const bouncing = (restitution: number) =>
  mechanismOf({
    bodies: [disc('ball', [0, 1], 0.1, 1)],
    tracks: [floor],
    contacts: [{ between: ['ball', 'floor'], restitution }],
    stations: [
      { id: '1', when: { start: true } },
      { id: '2', when: { touch: ['ball', 'floor'] } },
      { id: '3', when: { end: true } },
    ],
    criteria: [{ id: 'Q1', measure: 'approachSpeed', of: ['ball', 'floor'], at: '2', atMost: '5 m/s' }],
    run: { until: 0.6 },
  });
const mechanism = bouncing(0.5);

/** An audit of two runs that are in, the stepper's with another restitution if need be. */
function auditOf({ restitution = 0.5, halted = false } = {}) {
  const [first, second] = [new Run('run'), new Run('audit')];
  first.recording = runStepper(bouncing(restitution));
  const whole = runAuditor(mechanism);
  const half = {
    ...whole,
    rowCount: 20,
    events: whole.events.filter(({ row }) => row < 20),
    end: 'cancelled' as const,
  };
  second.recording = halted ? half : whole;
  first.status = second.status = 'ended';
  const given = () => new Map<string, string>();
  const account = new Account(() => first.recording, () => mechanism, given); // prettier-ignore
  return { audit: new Audit(first, second, account, () => mechanism), account, first, second };
}

describe('an audit', () => {
  it('of two runs that agree ticks every entry that both make up, and no numerical one', () => {
    const { audit, account } = auditOf();
    expect(audit.verdict).toBe('agrees');
    expect(audit.partingStation).toBeNull();
    const lines = [...audit.lines.values()];
    expect(lines.length).toBeGreaterThanOrEqual(3);
    expect(lines.every(({ figure }) => figure.within)).toBe(true);
    const printed = [...account.printed!.received, ...account.printed!.paidOut];
    expect(printed.some(({ account: cause }) => cause === 'numerical')).toBe(true);
    expect(lines.some(({ line }) => line.account === 'numerical')).toBe(false);
    expect(audit.worst!.figure.share).toBe(Math.max(...audit.figures.map(({ figure }) => figure.share)));
  });

  it('judges criteria on the auditor’s run where that is whole, on the stepper’s otherwise', () => {
    const by = (halted: boolean) => auditOf({ halted }).audit.criteria.criteria.map((each) => each.by);
    expect([by(false), by(true)]).toEqual([['auditor'], ['stepper']]);
  });

  it('of a run that is not whole is no verdict', () => {
    const { audit } = auditOf({ halted: true });
    expect(audit.verdict).toBe('unaudited');
  });

  it('says nothing while either run goes on', () => {
    const { audit, second } = auditOf();
    second.status = 'running';
    expect([audit.comparison, audit.lines.size, audit.verdict]).toEqual([null, 0, 'unaudited']);
    expect(audit.criteria.criteria[0].by).toBe('stepper');
  });

  it('of runs that part differs, with the station from which on, and marks what differs on the page', () => {
    const { audit, account } = auditOf({ restitution: 0.6 });
    expect(audit.verdict).toBe('differs');
    expect(audit.partingStation).toBe('3');
    account.open('2', '3');
    const differing = [...audit.lines.values()].filter(({ figure }) => !figure.within);
    expect(differing.map(({ line }) => line.account)).toContain('impact');
    expect(audit.worstLine!.figure.within).toBe(false);
    account.pickAccount('impact', ['floor', 'ball']);
    expect(account.picked?.account).toBe('impact');
  });
});

describe('shares', () => {
  it('are rounded up, so that what is said holds', () => {
    expect(boundText(0.000951)).toBe('0.096 %');
    expect(boundText(0.0012)).toBe('0.12 %');
    expect(boundText(0)).toBe('0.001 %');
    expect(boundText(0.0589)).toBe('5.9 %');
    expect([shareText(0), shareText(1e-9), shareText(0.0201), shareText(Infinity)]).toEqual(['0 %', '< 0.001 %', '2.1 %', '–']); // prettier-ignore
  });

  it('stand beside both figures to the same decimals', () => {
    expect(bothFigures([2.61531, 2.6158])).toBe('2.6153 against 2.6158');
    expect(bothFigures([2.1e-12, 4e-17])).toBe('0.000000000 against 0.000000000');
    expect(bothFigures([null, 184.8])).toBe('– against 184.80');
  });
});

const result = (more: Partial<CriterionResult>): CriterionResult => ({ id: 'Q1', measure: 'stroke', unit: 'm', value: 0.07125, passes: true, by: 'auditor', ...more }); // prettier-ignore

describe('a criterion', () => {
  it('prints its value and its limit in one unit', () => {
    expect([valueText(result({ atMost: 0.09 })), limitText(result({ atMost: 0.09 }))]).toEqual(['71.25 mm', '≤ 90']);
    const angle = result({ measure: 'angle', unit: 'rad', value: Math.PI / 6, between: [0, Math.PI / 2] });
    expect([valueText(angle), limitText(angle)]).toEqual(['30 °', '0 to 90']);
    const efficiency = result({ measure: 'efficiency', unit: '', value: 0.715, atLeast: 0.7 });
    expect([valueText(efficiency), limitText(efficiency)]).toEqual(['71.5 %', '≥ 70']);
  });

  it('prints as many figures as tell on which side of its limit it is', () => {
    expect(valueText(result({ unit: 'N', measure: 'peakForce', value: 220.004, atMost: 220 }))).toBe('220.004 N');
    expect(valueText(result({ unit: 'N', measure: 'peakForce', value: 220, atMost: 220 }))).toBe('220 N');
  });

  it('without a value or a run says so in words', () => {
    expect([valueText(result({ value: null })), outcomeWord(result({ value: null, passes: null }))]).toEqual(['–', 'no value']); // prettier-ignore
    expect(outcomeWord(result({ by: null, passes: null }))).toBe('not run');
    expect([outcomeWord(result({})), outcomeWord(result({ passes: false }))]).toEqual(['pass', 'fail']);
    expect(measureWords(result({ measure: 'peakForce' }))).toBe('Peak force');
  });

  it('is drawn on a scale that has the value on its side of the limit', () => {
    const sides = (value: number) => {
      const scale = limitScale(result({ value, atMost: 1 }), 50)!;
      return [scale.value! < scale.limits[0], scale.allowed[0][1] === scale.limits[0]];
    };
    expect([sides(0.9), sides(1.1)]).toEqual([[true, true], [false, true]]); // prettier-ignore
    for (const value of [-1e9, 0, 1e9]) {
      const at = limitScale(result({ value, atLeast: 1 }), 50)!.value!;
      expect(at).toBeGreaterThanOrEqual(0);
      expect(at).toBeLessThanOrEqual(50);
    }
    expect(limitScale(result({ measure: 'reached' }), 50)).toBeNull();
    const between = limitScale(result({ value: 0, between: [-2, -1] }), 50)!;
    expect(between.limits[0]).toBeLessThan(between.limits[1]);
    expect(between.value).toBeGreaterThan(between.limits[1]);
  });
});

describe('a line of a hand check', () => {
  const operator = (text: '=' | ',' | '(' | '−'): Token => ({ kind: 'operator', text });
  const m: Token = { kind: 'symbol', name: 'm' };
  const where: Token = { kind: 'words', text: 'where' };

  it('keeps factors close, and is broken before an operator only', () => {
    const line = [m, m, operator('='), m, operator('−'), m];
    expect(line.map((_, i) => spacing(line, i))).toEqual([['', ''], ['', ''], [' ', '\u00a0'], ['', ''], [' ', '\u00a0'], ['', '']]); // prettier-ignore
  });

  it('that lists values is broken between them', () => {
    const line = [where, m, operator('='), m, operator(','), m];
    expect(line.map((_, i) => spacing(line, i).join('|'))).toEqual(['| ', '|', '\u00a0|\u00a0', '|', '| ', '|']);
  });

  it('has a letter of its own for one half', () => {
    const number = (text: string): Token => ({ kind: 'number', text });
    expect(isHalf({ kind: 'fraction', over: [number('1')], under: [number('2')] })).toBe(true);
    expect(isHalf({ kind: 'fraction', over: [number('1')], under: [m] })).toBe(false);
  });

  it('is of the body looked at, with what it differs by', () => {
    const check = (of: string, more: Partial<HandCheck> = {}): HandCheck => ({ from: '1', to: '2', of, with: [], equation: '', lines: [], typeset: [], speed: 0, ...more }); // prettier-ignore
    const checks = [check('still'), check('crate', { lines: ['a', 'b'] })];
    expect(checkShown(checks, 'still')?.of).toBe('still');
    expect(checkShown(checks, null)?.of).toBe('crate');
    expect(checkShown([], 'crate')).toBeNull();
    expect(checkDifference(check('a', { difference: -0.00012 }))).toBe('difference −0.0001 m/s');
    expect(checkDifference(check('a', { left: 0.002, difference: 1 }))).toBe('leaves 0.0020 J');
    expect(checkDifference(check('a', { speed: null, reason: 'x.' }))).toBe('');
  });
});
