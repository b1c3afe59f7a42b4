import { describe, expect, it } from 'vitest';
import { compareRuns, type Comparison, type ComparisonOptions } from '../../../sim/ledger/index.js';
import type { Mechanism } from '../../../sim/mechanism/model.js';
import type { Recording } from '../../../sim/recording/index.js';
import { startRun, type Cells } from '../recording/synthetic.js';
import { cratesMechanism } from '../report/crates.js';

/** What a run of one sledge of 2 kg and 0.02 kg m² did, in the second between its two stations. */
interface Done {
  time?: number;
  x?: number;
  vx?: number;
  spin?: number;
  angle?: number;
  push?: number;
  rub?: number;
  made?: number;
  touch?: { approachSpeed: number; effectiveMass: number };
  of?: [string, string];
  end?: Recording['end'];
  step?: number;
  from?: number;
}

const MASS = 2;
const INERTIA = 0.02;
/** √(I/m) = 0.1 m */
const GYRATION = 0.1;

/** A run whose account closes whatever it does: a load gives all the energy that nothing else explains. */
function sledge({
  time = 1,
  x = 4,
  vx = 3,
  spin = 0,
  angle = 0,
  push,
  rub = -1,
  made = 0,
  ...more
}: Done = {}): Recording {
  const from = more.from ?? 0;
  const { writer, row } = startRun({
    bodies: [{ id: 'upper', mass: MASS, inertia: INERTIA }],
    accounts: [
      { account: 'load', of: 'push', bodies: ['upper'] },
      { account: 'friction', of: more.of ?? ['upper', 'chute'], bodies: ['upper'] },
      { account: 'numerical', of: null, cause: 'clamp', bodies: ['upper'] },
    ],
  });
  const { columns } = writer.layout.bodies[0];
  const [load, friction, numerical] = writer.layout.accounts.map(({ columns: { work } }) => work[0]);
  const kinetic = 0.5 * (MASS * vx * vx + INERTIA * spin * spin);
  row(0, [[columns.x, from]]);
  const cells: Cells = [
    [columns.x, from + x],
    [columns.vx, vx],
    [columns.spin, spin],
    [columns.angle, angle],
    [load, push ?? kinetic - rub - made],
    [friction, rub],
    [numerical, made],
  ];
  row(time, cells);
  writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
  writer.event({ kind: 'station', station: '2', time, row: 1, ...(more.touch ? { touch: more.touch } : {}) });
  return { ...writer.finish(more.end ?? 'reachedEnd'), ...(more.step === undefined ? {} : { step: more.step }) };
}

/** The two crates' mechanism with one of them, of an extent of 10 m, without gravity, that runs for 2 s. */
function mechanism(changes: Partial<Mechanism> = {}): Mechanism {
  const crates = cratesMechanism();
  const [upper] = crates.bodies;
  const bodies = [{ ...upper, mass: MASS, inertia: INERTIA }];
  return { ...crates, gravity: [0, 0], bodies, system: ['upper'], ...changes };
}

function compare(stepper: Done, auditor: Done = {}, options: ComparisonOptions = {}): Comparison {
  return compareRuns(mechanism(), sledge(stepper), sledge(auditor), options);
}

const figureOf = ({ stations }: Comparison, quantity: string) =>
  stations.at(-1)?.figures.find((figure) => figure.quantity === quantity);
const accountOf = ({ spans }: Comparison, account: string) =>
  spans.at(-1)?.accounts.find((each) => each.account === account);

describe('compareRuns', () => {
  it('agrees where the runs are the same, and has nothing to say', () => {
    expect(compare({})).toMatchObject({
      verdict: 'agrees',
      tolerance: 5e-3,
      parting: null,
      findings: [],
      remedies: [],
    });
  });

  it('gives both values, their difference in the unit, and it as a share of the greater', () => {
    expect(figureOf(compare({ vx: 2.94 }), 'speed')).toEqual({
      quantity: 'speed',
      of: 'upper',
      stepper: 2.94,
      auditor: 3,
      difference: expect.closeTo(-0.06, 12) as number,
      share: expect.closeTo(0.02, 12) as number,
      within: false,
    });
    expect(accountOf(compare({ rub: -1.1 }), 'friction')).toMatchObject({ stepper: -1.1, auditor: -1, within: false });
  });

  it('lets half a percent pass by default, and what the caller says otherwise', () => {
    const speeds = (vx: number, tolerance?: number) =>
      figureOf(compare({ vx }, {}, tolerance === undefined ? {} : { tolerance }), 'speed')?.within;
    expect([3 * (1 - 0.0049), 3 * (1 - 0.0051)].map((vx) => speeds(vx))).toEqual([true, false]);
    expect([speeds(3.02, 0.01), speeds(3.0001, 1e-6)]).toEqual([true, false]);
  });

  it('compares the time', () => {
    expect(compare({ time: 1.004 }).verdict).toBe('agrees');
    const { verdict, parting, findings } = compare({ time: 1.006 });
    expect({ verdict, station: parting?.station, quantity: parting?.figure?.quantity }).toEqual({
      verdict: 'differs',
      station: '2',
      quantity: 'time',
    });
    expect(findings[0].text).toBe(
      'The runs part at station 2: time 1.006 s by the stepper and 1 s by the auditor, 0.006 s or 0.6 % apart.',
    );
  });

  it('measures a position on the way the body has come, wherever on the sheet it is drawn', () => {
    for (const from of [0, 1000, -4]) {
      const off = compare({ x: 4.04, from }, { from });
      expect(figureOf(off, 'x')).toMatchObject({ share: expect.closeTo(0.04 / 4.04, 9) as number, within: false });
    }
  });

  it('measures the position of a body that has come less than 1e-3 of the extent on that', () => {
    // 1e-3 of 10 m is 10 mm; half a percent of that 50 µm.
    expect(figureOf(compare({ x: 1e-3 + 40e-6 }, { x: 1e-3 }), 'x')).toMatchObject({
      share: expect.closeTo(4e-3, 9) as number,
      within: true,
    });
    expect(figureOf(compare({ x: 1e-3 + 60e-6 }, { x: 1e-3 }), 'x')?.within).toBe(false);
  });

  it('measures a speed below 1e-3 of the greatest in the runs on that', () => {
    // The greatest is the turning: 0.1 m at 100 rad/s, 10 m/s; 1e-3 of it 10 mm/s, half a percent of that 50 µm/s.
    const slow = (vx: number) => figureOf(compare({ vx, spin: 100 }, { vx: 1e-3, spin: 100 }), 'speed')?.within;
    expect([slow(1e-3 + 40e-6), slow(1e-3 + 60e-6)]).toEqual([true, false]);
  });

  it('compares spin and angle, small ones on the radius of gyration', () => {
    expect(figureOf(compare({ spin: 10.1 }, { spin: 10 }), 'spin')?.within).toBe(false);
    // 1e-3 of 3 m/s at 0.1 m is 0.03 rad/s, and half a percent of that 0.15 mrad/s.
    const still = (spin: number) => figureOf(compare({ spin }), 'spin')?.within;
    expect([still(1.4e-4), still(1.6e-4)]).toEqual([true, false]);
    // 1e-3 of 10 m at 0.1 m is 0.1 rad, and half a percent of that 0.5 mrad.
    const turned = (angle: number) => figureOf(compare({ angle }), 'angle')?.within;
    expect([turned(4.9e-4), turned(5.1e-4)]).toEqual([true, false]);
    expect(GYRATION).toBe(Math.sqrt(INERTIA / MASS));
  });

  it('measures an account below 1e-3 of the turnover on that', () => {
    // Turnover ½ m v² = 9 J; 1e-3 of it 9 mJ, and half a percent of that 45 µJ.
    const small = (rub: number) => accountOf(compare({ rub }, { rub: -1e-3 }), 'friction')?.within;
    expect([small(-1e-3 - 40e-6), small(-1e-3 - 50e-6)]).toEqual([true, false]);
  });

  it('matches a pair named in the other order, and takes an account that a run lacks for nil', () => {
    const turned = compare({ of: ['chute', 'upper'] });
    expect(turned.verdict).toBe('agrees');
    expect(turned.spans[0].accounts.map(({ account }) => account)).toEqual(['load', 'friction']);
    const other = compare({ of: ['upper', 'lower'] });
    expect(other.verdict).toBe('differs');
    expect(other.spans[0].accounts).toContainEqual(
      expect.objectContaining({
        account: 'friction',
        of: ['upper', 'lower'],
        stepper: -1,
        auditor: null,
        difference: -1,
        share: 1,
      }),
    );
  });

  it('does not compare numerical, but differs where it is above its limit in either run', () => {
    // Limit half a percent of 9 J.
    expect(compare({ made: 0.04 })).toMatchObject({
      verdict: 'agrees',
      spans: [{ accounts: [{ account: 'load' }, { account: 'friction' }] }],
    });
    for (const [stepper, auditor] of [
      [{ made: 0.047 }, {}],
      [{}, { made: 0.047 }],
    ]) {
      const { verdict, parting, numerical } = compare(stepper, auditor);
      expect({ verdict, parting }).toEqual({ verdict: 'differs', parting: null });
      expect(Math.max(numerical.stepper, numerical.auditor)).toBeCloseTo(0.047 / 9, 9);
    }
  });

  it('differs where an account does not close, and says whose', () => {
    expect(compare({ push: 10.001 })).toMatchObject({
      verdict: 'differs',
      parting: null,
      closed: { stepper: false, auditor: true },
    });
    expect(compare({}, { push: 10.001 }).closed).toEqual({ stepper: true, auditor: false });
  });

  it('names the account that parts most', () => {
    const { parting, findings } = compare({ rub: -1.5 });
    expect(parting?.account).toMatchObject({ account: 'friction', from: '1', to: '2' });
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['account-parts', 'error']]);
    expect(findings[0].text).toBe(
      'From station 1 to 2 the account Friction upper/chute parts most: work −1.5 J by the stepper and −1 J by the auditor, 0.5 J or 33 % apart.',
    );
  });

  it('compares a touch where the station is one, and where both runs strike', () => {
    const when = { kind: 'touch' as const, pair: ['upper', 'chute'] as [string, string], count: 1 };
    const struck = mechanism({
      stations: [
        { id: '1', when: { kind: 'start' } },
        { id: '2', when },
      ],
    });
    const touch = { approachSpeed: 0.5, effectiveMass: 1.2 };
    const at = (document: Mechanism, a: Done, b: Done): Comparison => compareRuns(document, sledge(a), sledge(b));
    expect(at(struck, { touch }, { touch }).verdict).toBe('agrees');
    const faster = at(struck, { touch: { ...touch, approachSpeed: 0.51 } }, { touch });
    expect(faster.parting?.figure).toMatchObject({ quantity: 'approachSpeed', of: 'upper/chute' });
    expect(figureOf(at(struck, { touch: { ...touch, effectiveMass: 1.3 } }, { touch }), 'effectiveMass')?.within).toBe(
      false,
    );
    expect(figureOf(at(struck, {}, { touch }), 'approachSpeed')).toMatchObject({ stepper: null, within: false });
    expect(at(mechanism(), {}, { touch }).verdict).toBe('agrees');
  });

  it('says which run alone reached a station, unless that was about the end of the run', () => {
    const late = (time: number): Comparison => {
      const run = sledge();
      run.events.push({ kind: 'station', station: '3', time, row: 1 });
      return compareRuns(mechanism(), run, sledge());
    };
    const { verdict, oneSided, findings } = late(1.9);
    expect({ verdict, oneSided }).toEqual({
      verdict: 'differs',
      oneSided: [{ station: '3', reachedBy: 'stepper', time: 1.9 }],
    });
    expect(findings).toMatchObject([{ code: 'station-one-sided', severity: 'error', of: ['3'], at: 1.9 }]);
    expect(late(1.995).verdict).toBe('agrees');
  });

  it('is unaudited where a run stopped and what there is agrees, and differs where it does not', () => {
    expect(compare({}, { end: 'noSolution' }).verdict).toBe('unaudited');
    expect(compare({ end: 'stepTooSmall' }).verdict).toBe('unaudited');
    expect(compare({ vx: 4 }, { end: 'noSolution' }).verdict).toBe('differs');
  });

  it('is unaudited where no station was reached by both, and says so', () => {
    const none = { ...sledge(), events: [] };
    const { verdict, findings } = compareRuns(mechanism(), none, none);
    expect({ verdict, codes: findings.map(({ code }) => code) }).toEqual({
      verdict: 'unaudited',
      codes: ['nothing-compared'],
    });
  });

  it('never takes what is not a number for agreement', () => {
    const run = sledge();
    run.rows[run.layout.width + run.layout.bodies[0].columns.x] = NaN;
    expect(compareRuns(mechanism(), run, sledge()).verdict).toBe('differs');
  });

  it('names a mass that is not the document’s', () => {
    const heavy = mechanism({ bodies: [{ ...mechanism().bodies[0], mass: 2.02 }] });
    const { verdict, off } = compareRuns(heavy, sledge(), sledge());
    expect({ verdict, off }).toEqual({
      verdict: 'differs',
      off: (['stepper', 'auditor'] as const).map((by) => ({ by, what: 'mass', of: 'upper', found: 2, expected: 2.02 })),
    });
  });
});

describe('what to do about a difference', () => {
  it('is a smaller step by what is to be gained, to one digit, at least half and no less than a tenth', () => {
    // The load is off most: 1.79 % and 1.08 %, of which half a percent may be; 1e-3 × ½ × 0.5/1.79 is 0.14 ms.
    const step = (vx: number) => compare({ vx, step: 1e-3 }).remedies;
    expect(step(3 * 0.99)).toEqual([{ do: 'smaller-step', step: 1e-4, now: 1e-3 }]);
    expect(step(3 * 0.994)).toEqual([{ do: 'smaller-step', step: 2e-4, now: 1e-3 }]);
    expect(step(1)).toEqual([{ do: 'smaller-step', step: 1e-4, now: 1e-3 }]);
    expect(compare({ vx: 1, step: 1e-3 }).findings.at(-1)).toEqual({
      severity: 'note',
      code: 'try-smaller-step',
      text: 'Take a smaller step: 0.0001 s; it is 0.001 s now.',
      of: [],
    });
    expect(compare({ vx: 1 }).remedies).toEqual([]);
  });

  /** The sledge with an impact account in place of its friction, and touches at one instant. */
  function struck(rub: number, pairs: [string, string][] = []): Recording {
    const run = sledge({ rub });
    run.layout.accounts[1].account = 'impact';
    for (const pair of pairs) {
      run.events.unshift({ kind: 'touch', pair, time: 1, row: 0, at: [0, 0], approachSpeed: 1, effectiveMass: 1 });
    }
    return run;
  }
  const contact = {
    between: ['chute', 'upper'] as [string, string],
    ...{ staticFriction: 0, kineticFriction: 0, restitution: 0, rollingResistance: 0, restSpeed: 1e-3, pointer: '' },
  };

  it('is a compliant stop where the impact on a rigid one parts', () => {
    const of = (contacts: Mechanism['contacts']) =>
      compareRuns(mechanism({ contacts }), struck(-1.5), struck(-1)).remedies;
    expect(of([contact])).toEqual([{ do: 'compliant-stop', pair: ['chute', 'upper'] }]);
    expect(of([{ ...contact, compliant: { stiffness: 1e5, damping: 0 } }])).toEqual([]);
  });

  it('is to part impacts in time where several pairs strike at one instant', () => {
    const pairs: [string, string][] = [
      ['upper', 'chute'],
      ['chute', 'upper'],
      ['lower', 'upper'],
    ];
    const { remedies, findings } = compareRuns(mechanism(), struck(-1.5, pairs), struck(-1));
    expect(remedies).toEqual([
      {
        do: 'contact-order',
        pairs: [
          ['lower', 'upper'],
          ['chute', 'upper'],
        ],
        at: 1,
      },
    ]);
    expect(findings.at(-1)).toMatchObject({ code: 'contact-order', at: 1, of: ['lower', 'upper', 'chute'] });
    expect(compareRuns(mechanism(), struck(-1.5, pairs.slice(0, 2)), struck(-1)).remedies).toEqual([]);
  });
});
