import { describe, expect, it } from 'vitest';
import type { Entry, Ledger } from '../../sim/ledger/index.js';
import { bookLedger, consecutiveLedgers, stationRows } from '../../sim/ledger/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import type { Recording } from '../../sim/recording/index.js';
import { contactOf, valueAt } from '../../sim/recording/index.js';
import { runStepper } from '../../sim/stepper/index.js';

/** Run a document from its start to its end, with a station at each. */
function run(document: object): Recording {
  const stations = [
    { id: 'start', when: { start: true } },
    { id: 'end', when: { end: true } },
  ];
  const { mechanism, problems } = readMechanism(JSON.stringify({ format: 'joulewright/1', stations, ...document }));
  if (!mechanism) throw new Error(problems.map(({ text }) => text).join('\n'));
  return runStepper(mechanism);
}

/** The ledger of the whole run, which must close to 1e-12 of its turnover. */
function closedLedger(recording: Recording, system?: string[]): Ledger {
  const inside = system ?? recording.layout.bodies.map(({ id }) => id);
  const ledger = consecutiveLedgers(recording, inside).at(-1);
  if (!ledger) throw new Error('no ledger');
  expect(Math.abs(ledger.unbooked)).toBeLessThanOrEqual(1e-12 * ledger.turnover);
  return ledger;
}

function entryOf(ledger: Ledger, account: string, of: string): Entry {
  const found = ledger.entries.find((entry) => entry.account === account && [entry.of].flat().join('/') === of);
  if (!found) throw new Error(`no entry ${account} ${of} among ${ledger.entries.map((e) => e.account).join(', ')}`);
  return found;
}

const G = 9.80665;
const slope = (degrees: number): [number, number] => [
  Math.cos((degrees * Math.PI) / 180),
  -Math.sin((degrees * Math.PI) / 180),
];
const RAMP = { id: 'ramp', from: [0, 0], to: [{ to: slope(30).map((part) => 4 * part) }] };

describe('a block on a frictionless ramp', () => {
  const box = { id: 'block', shape: { kind: 'box', width: 0.2, height: 0.1 }, mass: 3, rest: { on: 'ramp', at: 0.5 } };
  const recording = run({
    bodies: [box],
    tracks: [RAMP],
    contacts: [{ between: ['block', 'ramp'] }],
    run: { until: 0.8 },
  });
  const ledger = closedLedger(recording);

  it('is pressed by a reaction that does no work', () => {
    const contact = contactOf(recording, ['block', 'ramp'])!;
    expect(valueAt(recording, recording.rowCount >> 1, contact.columns.normal)).toBeCloseTo(
      3 * G * Math.cos(Math.PI / 6),
      6,
    );
    expect(Math.abs(entryOf(ledger, 'reaction', 'block/ramp').work)).toBeLessThan(1e-9 * ledger.turnover);
  });

  it('turns all that gravity gives into motion: ½ m (g sin 30° t)²', () => {
    expect(ledger.kineticTo).toBeCloseTo(0.5 * 3 * (G * 0.5 * 0.8) ** 2, 6);
    expect(entryOf(ledger, 'gravity', 'block').work).toBeCloseTo(ledger.kineticTo, 6);
  });
});

describe('a disc that rolls without slip', () => {
  const disc = { id: 'disc', shape: { kind: 'disc', radius: 0.1 }, mass: 2, rest: { on: 'ramp', at: 0.5 } };
  const recording = run({
    bodies: [disc],
    tracks: [RAMP],
    contacts: [{ between: ['disc', 'ramp'], friction: 0.5 }],
    run: { until: 0.8 },
  });
  const ledger = closedLedger(recording);

  it('is held by friction that does no work: F = ⅓ m g sin 30°', () => {
    const contact = contactOf(recording, ['disc', 'ramp'])!;
    const force = valueAt(recording, recording.rowCount >> 1, contact.columns.friction);
    expect(Math.abs(force)).toBeCloseTo((2 * G * 0.5) / 3, 5);
    const friction = entryOf(ledger, 'friction', 'disc/ramp');
    expect(Math.abs(friction.work)).toBeLessThan(1e-6 * ledger.turnover);
    expect(Math.abs(friction.heat)).toBeLessThan(1e-6 * ledger.turnover);
  });
});

describe('a crate that slides on a sledge until both go on together', () => {
  const recording = run({
    bodies: [
      { id: 'sledge', shape: { kind: 'box', width: 4, height: 0.1 }, mass: 2, rest: { on: 'floor', at: 5 } },
      { id: 'crate', shape: { kind: 'box', width: 0.2, height: 0.1 }, mass: 1, at: [4, 0.15], velocity: [2, 0] },
    ],
    tracks: [{ id: 'floor', from: [0, 0], to: [{ to: [20, 0] }] }],
    contacts: [{ between: ['sledge', 'floor'] }, { between: ['crate', 'sledge'], friction: 0.3 }],
    run: { until: 1 },
  });
  // Momentum leaves both at 2/3 m/s; the crate loses ½ (4 − 4/9) J and the sledge gains ½ · 2 · 4/9 J.
  const [onCrate, onSledge] = [-16 / 9, 4 / 9];

  it('is slowed by friction that is internal work, and not nil', () => {
    const friction = entryOf(closedLedger(recording), 'friction', 'crate/sledge');
    expect(friction.kind).toBe('internal');
    expect(friction.byBody.crate).toBeCloseTo(onCrate, 4);
    expect(friction.byBody.sledge).toBeCloseTo(onSledge, 4);
    expect(friction.work).toBeCloseTo(onCrate + onSledge, 4);
    expect(friction.heat).toBeCloseTo(4 / 3, 4);
  });

  it('sees the same friction as external when the boundary is drawn around one of them, without a new run', () => {
    expect(entryOf(closedLedger(recording, ['sledge']), 'friction', 'crate/sledge')).toMatchObject({
      kind: 'external',
    });
    expect(entryOf(closedLedger(recording, ['sledge']), 'friction', 'crate/sledge').work).toBeCloseTo(onSledge, 4);
    expect(entryOf(closedLedger(recording, ['crate']), 'friction', 'crate/sledge').work).toBeCloseTo(onCrate, 4);
  });
});

describe('a particle that meets a corner of its track', () => {
  const [dx, dy] = slope(30);
  const track = (end: object): object => ({ id: 'chute', from: [0, 0], to: [{ to: [2 * dx, 2 * dy] }, end] });
  const particle = { id: 'bead', shape: { kind: 'particle' }, mass: 1, at: [0, 0] };
  const contacts = [{ between: ['bead', 'chute'] }];

  it('pays for the turn as an impact, at the corner: sin² 30° of its energy', () => {
    const flat = { to: [2 * dx + 4, 2 * dy] };
    const ledger = closedLedger(
      run({ bodies: [particle], tracks: [track(flat)], contacts, run: { until: 1.2, step: 1e-4 } }),
    );
    const impact = entryOf(ledger, 'impact', 'bead/chute');
    expect(impact.kind).toBe('impact');
    expect(impact.work).toBeCloseTo(-0.25 * G * 1, 3);
    expect(impact.heat).toBeCloseTo(-impact.work, 9);
    const [place] = impact.places;
    expect(place.on).toBe('chute');
    expect(Math.hypot(place.at[0] - 2 * dx, place.at[1] - 2 * dy)).toBeLessThan(1e-3);
  });

  it('pays nothing where the turn is an arc', () => {
    // An arc of radius 2 m that is tangent to the slope and turns into the level.
    const radius = 2;
    const arc = { to: [2 * dx + radius * 0.5, 2 * dy - radius * (1 - dx)], bulge: Math.tan(Math.PI / 24) };
    const ledger = closedLedger(run({ bodies: [particle], tracks: [track(arc)], contacts, run: { until: 1 } }));
    expect(Math.abs(entryOf(ledger, 'impact', 'bead/chute').work)).toBeLessThan(1e-9 * ledger.turnover);
  });
});

describe('a crate that is laid on a running belt', () => {
  const recording = run({
    bodies: [{ id: 'crate', shape: { kind: 'box', width: 0.2, height: 0.1 }, mass: 8, rest: { on: 'belt', at: 1 } }],
    tracks: [{ id: 'belt', from: [0, 0], to: [{ to: [5, 0] }], surfaceSpeed: 0.6 }],
    contacts: [{ between: ['crate', 'belt'], friction: 0.35 }],
    run: { until: 0.5 },
  });
  const friction = entryOf(closedLedger(recording), 'friction', 'crate/belt');

  it('is given its motion by friction, which does positive work and loses as much in slip', () => {
    expect(friction.work).toBeCloseTo(0.5 * 8 * 0.6 ** 2, 6);
    expect(friction.heat).toBeCloseTo(0.5 * 8 * 0.6 ** 2, 6);
  });

  it('has the place of that work on the belt', () => {
    expect(friction.places).toMatchObject([{ on: 'belt', segment: 0 }]);
    expect(friction.places[0].work).toBeCloseTo(friction.work, 9);
  });
});

describe('a particle that slides to rest on a still floor', () => {
  const recording = run({
    bodies: [{ id: 'bead', shape: { kind: 'particle' }, mass: 2, at: [1, 0], velocity: [2, 0] }],
    tracks: [{ id: 'floor', from: [0, 0], to: [{ to: [1.2, 0] }, { to: [5, 0] }] }],
    contacts: [{ between: ['bead', 'floor'], friction: 0.4 }],
    run: { until: 1 },
  });
  const friction = entryOf(closedLedger(recording), 'friction', 'bead/floor');

  it('loses as heat exactly what friction takes', () => {
    expect(friction.work).toBeCloseTo(-4, 6);
    expect(friction.heat).toBeCloseTo(-friction.work, 9);
  });

  it('loses it segment by segment: μ m g for each metre of each', () => {
    const works = friction.places.map(({ work }) => work);
    expect(friction.places.map(({ segment }) => segment)).toEqual([0, 1]);
    expect(works[0] / (-0.4 * 2 * G * 0.2)).toBeCloseTo(1, 2);
    expect(works[0] + works[1]).toBeCloseTo(friction.work, 9);
  });

  it('has the middle of each stretch as its place', () => {
    expect(friction.places[0].at[0]).toBeCloseTo(1.1, 2);
    expect(friction.places[1].at[0]).toBeCloseTo((1.2 + 1 + 4 / (2 * 0.4 * G)) / 2, 2);
  });
});

describe('two links that are pinned together', () => {
  const link = { shape: { kind: 'bar', length: 1, width: 0.05 }, mass: 1 };
  const recording = run({
    bodies: [
      { ...link, id: 'upper', at: [0.5, 0] },
      { ...link, id: 'lower', at: [1.5, 0] },
    ],
    joints: [
      { id: 'hook', kind: 'pin', between: ['upper', 'ground'], at: [0, 0] },
      { id: 'knee', kind: 'pin', between: ['lower', 'upper'], at: [1, 0] },
    ],
    run: { until: 0.4 },
  });
  const ledger = closedLedger(recording);

  it('pass work on through a pin that does none in all, and is external to one of them', () => {
    const knee = entryOf(ledger, 'reaction', 'knee');
    expect(knee.kind).toBe('internal');
    expect(Math.abs(knee.work)).toBeLessThan(1e-9 * ledger.turnover);
    expect(Math.abs(knee.byBody.lower)).toBeGreaterThan(1e-3 * ledger.turnover);
    const alone = entryOf(closedLedger(recording, ['lower']), 'reaction', 'knee');
    expect(alone).toMatchObject({ kind: 'external', work: knee.byBody.lower });
  });

  it('hang on a pin that does no work, since the ground stands still', () => {
    expect(Math.abs(entryOf(ledger, 'reaction', 'hook').work)).toBeLessThan(1e-9 * ledger.turnover);
  });
});

describe('any two rows of a run', () => {
  const recording = run({
    bodies: [{ id: 'ball', shape: { kind: 'disc', radius: 0.05 }, mass: 0.5, at: [0, 0.5] }],
    tracks: [{ id: 'floor', from: [-1, 0], to: [{ to: [1, 0] }] }],
    contacts: [{ between: ['ball', 'floor'], restitution: 0.7 }],
    run: { until: 1.5 },
  });

  it('are the ends of a ledger that closes, without a new run', () => {
    const step = Math.max(1, Math.floor(recording.rowCount / 17));
    const whole = closedLedger(recording);
    for (let row = 0; row + step < recording.rowCount; row += step) {
      const ledger = bookLedger(recording, { from: 'a', to: 'b', fromRow: row, toRow: row + step }, ['ball']);
      expect(Math.abs(ledger.unbooked)).toBeLessThanOrEqual(1e-12 * whole.turnover);
    }
  });

  it('show each bounce as a loss of its own at its place', () => {
    const bounces = recording.events.filter(({ kind }) => kind === 'touch');
    expect(bounces.length).toBeGreaterThan(3);
    const { places, work } = entryOf(closedLedger(recording), 'impact', 'ball/floor');
    expect(places.reduce((sum, place) => sum + place.work, 0)).toBeCloseTo(work, 9);
    // The first drop of 0.45 m gives m g h and keeps e² of it.
    expect(places[0].work).toBeCloseTo(-(1 - 0.49) * 0.5 * G * 0.45, 5);
    expect(places.every(({ on }) => on === 'floor')).toBe(true);
    expect(stationRows(recording).map(({ id }) => id)).toEqual(['start', 'end']);
  });
});
