import { describe, expect, it } from 'vitest';
import { twoCrates } from '../../ledger/two-crates.js';
import { judged, reasonOf, runOf, stationAt, valueOf } from '../support.js';

const spanned = { from: '1', to: '2' };
const inside = { system: ['upper', 'lower'] };

describe('heat', () => {
  it('is what the interface lost, the pair named in either order', () => {
    expect(valueOf({ measure: 'heat', of: ['chute', 'lower'], ...spanned, atMost: 99 }, twoCrates())).toBe(10);
    expect(valueOf({ measure: 'heat', of: ['upper', 'lower'], ...spanned, atMost: 99 }, twoCrates())).toBe(2);
  });

  it('is the same for every boundary, and takes in everything the pair lost', () => {
    const run = twoCrates();
    const between = run.layout.accounts.find(({ of }) => of?.[0] === 'upper' && of.length === 2)!;
    run.layout.accounts.push({ ...between, account: 'impact' });
    const asked = { measure: 'heat', of: ['upper', 'lower'] as [string, string], ...spanned, atMost: 99 } as const;
    expect(valueOf(asked, run, { system: ['upper'] })).toBe(4);
  });

  it('is nil for a pair that never met', () => {
    const { result, findings } = judged({ measure: 'heat', of: ['upper', 'wall'], atMost: 1 }, twoCrates());
    expect(result).toMatchObject({ value: 0, passes: true, note: 'the two never met.' });
    expect(findings).toMatchObject([{ severity: 'note' }]);
  });

  it('is none of an element without an account', () => {
    expect(reasonOf({ measure: 'heat', of: 'pin', atMost: 1 }, twoCrates())).toContain('pin has no account');
  });
});

describe('work', () => {
  const work = { measure: 'work', ...spanned, atLeast: -99 } as const;

  it('is that on the bodies inside the boundary, of one element or of all of a name', () => {
    expect(valueOf({ ...work, account: 'friction' }, twoCrates(), inside)).toBe(-12);
    expect(valueOf({ ...work, account: { account: 'friction', of: ['chute', 'lower'] } }, twoCrates(), inside)).toBe(
      -10,
    );
    expect(valueOf({ ...work, account: 'friction' }, twoCrates(), { system: ['upper'] })).toBe(-6);
    expect(valueOf({ ...work, account: { account: 'gravity', of: 'lower' } }, twoCrates(), inside)).toBe(24);
  });

  it('is nil, with a note, for an account that nothing has, and for a pair that never met', () => {
    const none = judged({ ...work, account: 'rope' }, twoCrates(), inside);
    expect(none.result).toMatchObject({ value: 0, passes: true });
    expect(none.result.note).toContain('account rope');
    expect(valueOf({ ...work, account: { account: 'friction', of: ['upper', 'wall'] } }, twoCrates(), inside)).toBe(0);
  });

  it('is not evaluated for an account of the outside, or of an element without it', () => {
    const lower = { ...work, account: { account: 'gravity', of: 'lower' } } as const;
    expect(reasonOf(lower, twoCrates(), { system: ['upper'] })).toContain('works on no body inside the boundary');
    expect(reasonOf({ ...work, account: { account: 'spring', of: 'lower' } }, twoCrates(), inside)).toContain(
      'this run has no account spring of lower',
    );
  });
});

/**
 * A hoist: the motor takes in 50 J and gives 40, 5 J go in the guide, 27 J lift the load, 2 J go into a spring; so the load
 * is 6 J faster, unless it started with `started` J of motion, which are used up then.
 */
function hoist({ lifted = 27, started = 0 }: { lifted?: number; started?: number } = {}) {
  return runOf(
    {
      bodies: [{ id: 'upper', mass: 2, inertia: 0 }],
      accounts: [
        { account: 'drive', of: 'motor', bodies: ['upper'], input: true },
        { account: 'joint-friction', of: 'guide', bodies: ['upper'], heat: true },
        { account: 'gravity', of: 'upper', bodies: ['upper'], stored: true },
        { account: 'spring', of: 'coil', bodies: ['upper'], stored: true },
      ],
    },
    [0, 1],
    (time, { bodies: [{ columns }], accounts }) => {
      const works = [40, -5, -lifted, -2].map((work) => work * time);
      const motion = started + works.reduce((sum, work) => sum + work, 0);
      return [
        [columns.vx, Math.sqrt(motion)],
        ...accounts.map((account, i) => [account.columns.work[0], works[i]] as const),
        [accounts[0].columns.input!, 50 * time],
        [accounts[1].columns.heat!, 5 * time],
        [accounts[3].columns.stored!, 2 * time],
      ];
    },
    [stationAt('1', 0, 0), stationAt('2', 1, 1)],
  );
}
const hoistInside = { system: ['upper'] };

describe('efficiency', () => {
  const asked = { measure: 'efficiency', useful: ['gravity'], input: ['drive'], ...spanned, atLeast: 0.5 } as const;
  const listed = (keys: typeof asked) => ({ ...keys, useful: [...keys.useful], input: [...keys.input] });

  it('is what the useful accounts took over what the drive took in, with both sums listed', () => {
    const { result, findings } = judged(listed(asked), hoist(), hoistInside);
    expect(result).toMatchObject({ value: 27 / 50, unit: '', passes: true });
    expect(result.parts).toEqual([
      { side: 'gives', label: 'Drive motor', amount: 50 },
      { side: 'takes', label: 'Gravity upper', amount: 27 },
    ]);
    expect(findings).toEqual([]);
  });

  it('says what gave energy beside the input that was named', () => {
    const { result } = judged(listed(asked), hoist({ lifted: 43, started: 12 }), hoistInside);
    expect(result.value).toBe(43 / 50);
    expect(result.note).toContain('energy came from Energy of motion (10 J) besides');
  });

  it('above 1 is none: it names what the input leaves out, and gives the efficiency with it', () => {
    const run = hoist({ lifted: 60, started: 40 });
    const text = reasonOf(listed(asked), run, hoistInside);
    expect(text).toContain('useful over input is 120 %, and no efficiency is above 100 %');
    expect(text).toContain('the input leaves out what came from Energy of motion (27 J), with which it is 77.92 %');
    expect(judged(listed(asked), run, hoistInside).result.parts?.map(({ side, label }) => [side, label])).toEqual([
      ['gives', 'Drive motor'],
      ['takes', 'Gravity upper'],
      ['gives', 'Energy of motion'],
    ]);
  });

  it('above 1 with nothing that could have given it names what is unbooked', () => {
    const run = hoist({ lifted: 60, started: 40 });
    run.rows[run.layout.width + run.layout.bodies[0].columns.vx] = Math.sqrt(40);
    expect(reasonOf(listed(asked), run, hoistInside)).toContain('no other account gave energy, and 27 J are unbooked');
  });

  it('is none of an input that put in nothing', () => {
    const text = reasonOf({ ...listed(asked), useful: ['drive'], input: ['gravity'] }, hoist(), hoistInside);
    expect(text).toContain('the input accounts put in −27 J');
  });

  it('counts an account that is named twice once', () => {
    const twice = { ...listed(asked), input: ['drive' as const, { account: 'drive' as const, of: 'motor' }] };
    expect(valueOf(twice, hoist(), hoistInside)).toBe(27 / 50);
  });
});

describe('return margin', () => {
  /** A spring gives up 10 J; lifting takes 3, the guide 2, another spring 1, an impact 0.5; the method lost 0.25. */
  const back = runOf(
    {
      bodies: [{ id: 'upper', mass: 2, inertia: 0 }],
      accounts: [
        { account: 'spring', of: 'return', bodies: ['upper'], stored: true },
        { account: 'gravity', of: 'upper', bodies: ['upper'], stored: true },
        { account: 'joint-friction', of: 'guide', bodies: ['upper'], heat: true },
        { account: 'spring', of: 'other', bodies: ['upper'], stored: true },
        { account: 'impact', of: ['upper', 'wall'], bodies: ['upper'], heat: true },
        { account: 'reaction', of: 'guide', bodies: ['upper'] },
        { account: 'numerical', of: null, cause: 'clamp', bodies: ['upper'] },
      ],
    },
    [0, 1],
    (time, { bodies: [{ columns }], accounts }) => [
      ...[10, -3, -2, -1, -0.5, 0, -0.25].map((work, i) => [accounts[i].columns.work[0], work * time] as const),
      [accounts[0].columns.stored!, 12 - 10 * time],
      [columns.vx, Math.sqrt(3.25 * time)],
    ],
    [stationAt('1', 0, 0), stationAt('2', 1, 1)],
  );
  const asked = {
    measure: 'returnMargin',
    spring: 'return',
    from: '1',
    to: '2',
    kineticEnergy: 0,
    atLeast: 1.25,
  } as const;

  it('is what the spring gave over what the path took, each thing it paid for listed', () => {
    const { result, findings } = judged(asked, back, hoistInside);
    expect(result.value).toBeCloseTo(10 / 6.5, 14);
    expect(result.parts).toEqual([
      { side: 'gives', label: 'Spring return', amount: 10 },
      { side: 'takes', label: 'Gravity upper', amount: 3 },
      { side: 'takes', label: 'Joint friction guide', amount: 2 },
      { side: 'takes', label: 'Spring other', amount: 1 },
      { side: 'takes', label: 'Impact upper/wall', amount: 0.5 },
      { side: 'takes', label: 'Motion required at 2', amount: 0 },
    ]);
    expect(findings).toEqual([]);
  });

  it('counts the kinetic energy required at the end', () => {
    const { result } = judged({ ...asked, kineticEnergy: 1.5 }, back, hoistInside);
    expect(result).toMatchObject({ value: 10 / 8, passes: true });
    expect(judged({ ...asked, kineticEnergy: 3.5 }, back, hoistInside).result).toMatchObject({
      value: 1,
      passes: false,
    });
  });

  it('is none where the path takes nothing, and the sum is shown', () => {
    const free = { ...back, layout: { ...back.layout, accounts: back.layout.accounts.slice(0, 1) } };
    expect(reasonOf(asked, free, hoistInside)).toContain('the path takes no energy');
    expect(judged(asked, free, hoistInside).result.parts).toHaveLength(2);
  });

  it('is none where the spring does not bring it there, or is not in the run', () => {
    expect(reasonOf({ ...asked, to: '3' }, back, hoistInside)).toContain('station 3 was not reached');
    expect(reasonOf({ ...asked, spring: 'missing' }, back, hoistInside)).toContain('the run has no spring missing');
  });
});

describe('claimed efficiency', () => {
  const claim = (value: number) => ({ measure: 'claimedEfficiency', of: 'motor', value, ...spanned }) as const;

  it('is allowed what the drive put out, less the heat that nothing else paid for', () => {
    // 40 J out, 5 J of them heat in the guide, of 50 J in.
    const { result, findings } = judged(claim(0.65), hoist());
    expect(result).toMatchObject({ claimed: 0.65, passes: true, unit: '' });
    expect(result.value).toBeCloseTo(0.7, 14);
    expect(result.margin).toBeCloseTo(0.05, 14);
    expect(findings).toEqual([]);
  });

  it('refutes a claim above it, and says what it forgets to lose', () => {
    const { result, findings } = judged(claim(0.78), hoist());
    expect(result.passes).toBe(false);
    expect(findings).toMatchObject([{ severity: 'warning', code: 'claim-refuted', of: ['q'] }]);
    expect(findings[0].text).toBe(
      'Claimed for motor: 78 %. The ledger allows 70 % at the most: it forgets Loss in motor (10 J) and Joint friction guide (5 J).',
    );
  });

  it('names the store that a claim above 100 % forgets', () => {
    // 60 J lifted of 50 J in look like 120 %; the load's own motion gave 27 J, and paid for the heat as well.
    const { result, findings } = judged(claim(1.2), hoist({ lifted: 60, started: 40 }));
    expect(result).toMatchObject({ value: 0.8, passes: false });
    expect(findings[0].text).toContain('it forgets that Energy of motion gave up 27 J.');
  });

  it('says of a claim above 100 % that no store gave anything, and of more than all stores gave', () => {
    expect(judged(claim(1.1), hoist()).findings[0].text).toContain(
      'no store gave up energy, and the 20 J too many came from nowhere',
    );
    expect(judged(claim(2), hoist({ lifted: 60, started: 40 })).findings[0].text).toContain(
      'gave up 27 J; even so, 33 J came from nowhere',
    );
  });

  it('is none of a drive that takes in nothing, or is not in the run', () => {
    const idle = hoist();
    idle.rows[idle.layout.width + idle.layout.accounts[0].columns.input!] = 0;
    expect(reasonOf(claim(0.5), idle)).toContain('takes in no energy');
    expect(reasonOf({ ...claim(0.5), of: 'other' }, idle)).toContain('the run has no drive other');
  });
});
