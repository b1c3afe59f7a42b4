import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { bookLedger, consecutiveLedgers, stationRows, type Entry, type Ledger } from '../../sim/ledger/index.js';
import { readMechanism, writeDocument } from '../../sim/mechanism/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Recording } from '../../sim/recording/recording.js';
import { runStepper, unsupported } from '../../sim/stepper/index.js';

const folder = resolve(import.meta.dirname, '../../assets/examples');
const names = readdirSync(folder).filter((name) => name.endsWith('.json'));
const textOf = (name: string): string => readFileSync(resolve(folder, name), 'utf8');

function mechanismOf(name: string): Mechanism {
  const { mechanism, problems } = readMechanism(textOf(name));
  if (!mechanism) throw new Error(problems.map(({ text }) => text).join('\n'));
  return mechanism;
}

const runs = new Map<string, { mechanism: Mechanism; recording: Recording }>();

/** One run of each example serves all tests. */
function runOf(name: string): { mechanism: Mechanism; recording: Recording } {
  const known = runs.get(name);
  if (known) return known;
  const mechanism = mechanismOf(name);
  const fresh = { mechanism, recording: runStepper(mechanism) };
  runs.set(name, fresh);
  return fresh;
}

function ledgerOf(name: string, from: string, to: string): Ledger {
  const { mechanism, recording } = runOf(name);
  const rows = new Map(stationRows(recording).map(({ id, row }) => [id, row]));
  const rowOf = (id: string): number => {
    const row = rows.get(id);
    if (row === undefined) throw new Error(`station ${id} was not reached`);
    return row;
  };
  return bookLedger(recording, { from, to, fromRow: rowOf(from), toRow: rowOf(to) }, mechanism.system);
}

function entry(ledger: Ledger, account: string, of: string): Entry {
  const found = ledger.entries.find((each) => each.account === account && [each.of].flat().join('/') === of);
  if (!found) throw new Error(`no entry ${account} ${of}`);
  return found;
}

/** What a reader of the drawing sees. */
interface Sheet {
  sheet: { owner: string };
  notes: string;
  bodies: { name?: string }[];
}

/** Within a part in a thousand: what four printed figures are good for. */
const near = (value: number, byHand: number): void => expect(Math.abs(value / byHand - 1)).toBeLessThan(1e-3);

const gravity = 9.80665;
const sin = (degrees: number): number => Math.sin((degrees * Math.PI) / 180);
const cos = (degrees: number): number => Math.cos((degrees * Math.PI) / 180);

describe.each(names)('the example %s', (name) => {
  it('opens without a problem and is written as the program writes it', () => {
    const { document, problems } = readMechanism(textOf(name));
    expect(problems).toEqual([]);
    expect(document && writeDocument(document)).toBe(textOf(name));
  });

  it('carries its sheet data, a caution and names for its parts', () => {
    const { sheet, notes, bodies } = JSON.parse(textOf(name)) as Sheet;
    expect(sheet.owner).toBe('Nordhall Works');
    expect(notes).toMatch(/Caution:/);
    for (const body of bodies) expect(body.name).toBeTruthy();
  });

  it('is simulated, and reaches every station', () => {
    const { mechanism, recording } = runOf(name);
    expect(unsupported(mechanism)).toEqual([]);
    expect(recording.end).toBe('reachedEnd');
    expect(stationRows(recording).map(({ id }) => id)).toEqual(mechanism.stations.map(({ id }) => id));
  });

  it('has ledgers that close, with numerical below half a percent of the turnover', () => {
    const { mechanism, recording } = runOf(name);
    const ledgers = consecutiveLedgers(recording, mechanism.system);
    expect(ledgers.length).toBeGreaterThan(0);
    const whole = Math.max(...ledgers.map(({ turnover }) => turnover));
    for (const ledger of ledgers) {
      const numerical = ledger.entries.filter(({ kind }) => kind === 'numerical');
      const made = numerical.reduce((sum, { work }) => sum + Math.abs(work), 0);
      expect(made).toBeLessThanOrEqual(0.005 * Math.max(ledger.turnover, 1e-3 * whole));
      expect(Math.abs(ledger.unbooked)).toBeLessThanOrEqual(1e-12 * whole);
    }
  });
});

describe('hand figures', () => {
  it('of the gravity feed: heights and friction to the touch, loss at the plate, travel of the spring', () => {
    const fall = ledgerOf('gravity-feed.json', '1', '2');
    near(entry(fall, 'gravity', 'crate').work, 4.2 * gravity * 0.42);
    near(entry(fall, 'friction', 'crate/chute').work, -0.11 * 4.2 * gravity * cos(20) * 1.1398344);
    near(entry(fall, 'friction', 'crate/run-out').work, -(2.614374 + 0.18 * 4.2 * gravity * 0.215));
    near(fall.kineticTo, 8.237808);
    const stop = ledgerOf('gravity-feed.json', '2', '3');
    near(entry(stop, 'impact', 'crate/plate').work, (-8.237808 * 0.35) / 4.55);
    // ½ k ((x + d)² − d²) + μ m g x = what is left: x = 71.254 mm from the fitted 5.75 mm.
    near(entry(stop, 'spring', 'stop-spring').work, -7.075866);
  });

  it('of the carriage: spring, lift and friction on the way home, and the speed at the stop', () => {
    const home = ledgerOf('spring-return-carriage.json', '1', '2');
    near(entry(home, 'spring', 'return-spring').work, 0.5 * 60 * (0.41 ** 2 - 0.17 ** 2));
    near(entry(home, 'gravity', 'carriage').work, -6.2 * gravity * 0.24 * sin(3));
    near(entry(home, 'joint-friction', 'guide').work, -0.08 * 6.2 * gravity * cos(3) * 0.24);
    // The damper's share by an integration of m x″ = k x − μ m g cos 3° − m g sin 3° − c x′ with steps of 1 µs.
    near(entry(home, 'damper', 'dashpot').work, -1.407748);
  });

  it('of the hammer: spring, gravity and pivot up to the blow', () => {
    const swing = ledgerOf('hammer-latch.json', '2', '3');
    near(
      entry(swing, 'spring', 'main-spring').work,
      0.8 * (((150 * Math.PI) / 180) ** 2 - ((80 * Math.PI) / 180) ** 2),
    );
    near(entry(swing, 'joint-friction', 'pivot').work, (-0.05 * 70 * Math.PI) / 180);
    near(swing.kineticTo, 4.466932);
    const { approachSpeed } = stationRows(runOf('hammer-latch.json').recording)[2].touch ?? { approachSpeed: NaN };
    near(approachSpeed, 0.16 * Math.sqrt((2 * 4.466932) / 0.0086726));
  });

  it('of the stack: the lower crate’s loss at the stop, and friction between the crates as internal work', () => {
    const down = ledgerOf('stacked-crates.json', '1', '2');
    const square = 2 * gravity * (sin(12) - 0.12 * cos(12)) * 0.45;
    near(down.kineticTo, 10 * square);
    const stop = ledgerOf('stacked-crates.json', '2', '3');
    near(entry(stop, 'impact', 'lower/stop').work, -7 * square);
    const slip = square / 2 / (gravity * (0.45 * cos(12) - sin(12)));
    const between = entry(stop, 'friction', 'upper/lower');
    near(between.work, -0.45 * 6 * gravity * cos(12) * slip);
    expect(between.kind).toBe('internal');
  });

  it('of the press: the flywheel’s store, and the motor’s work over a turn', () => {
    const turn = ledgerOf('slider-crank-press.json', '1', '5');
    // Flywheel, and the rod at 0.3 m/s and 2.5 rad/s.
    near(turn.kineticFrom, 12.8 + 0.5 * 1.1 * 0.3 ** 2 + 0.5 * rodInertia() * 2.5 ** 2);
    near(entry(turn, 'drive', 'motor').work, 1.2 * 2 * Math.PI);
  });

  it('of the drop: speed and loss at the touch, and a damped stroke', () => {
    const fall = ledgerOf('buffer-drop-test.json', '1', '2');
    near(fall.kineticTo, 12 * gravity * 0.25);
    const stroke = ledgerOf('buffer-drop-test.json', '2', '3');
    near(entry(stroke, 'impact', 'crate/head').work, (-12 * gravity * 0.25 * 0.8) / 12.8);
    // By an integration of M x″ = M g − k (x + d) − c x′ with steps of 1 µs.
    near(entry(stroke, 'damper', 'oil').work, -17.302217);
  });

  it('of the belt: as much heat as kinetic energy, and the run on the table', () => {
    const start = ledgerOf('belt-feed.json', '1', '2');
    near(entry(start, 'friction', 'crate/belt').work, 0.5 * 8 * 0.6 ** 2);
    near(entry(start, 'friction', 'crate/belt').heat, 0.5 * 8 * 0.6 ** 2);
    const { mechanism, recording } = runOf('belt-feed.json');
    const { x } = recording.layout.bodies[0].columns;
    const rest = recording.rows[(recording.rowCount - 1) * recording.layout.width + x];
    // The rear edge leaves the belt when the centre is half a length past it.
    near(rest, 0.2 + 0.6 ** 2 / (2 * 0.25 * gravity));
    expect(mechanism.bodies[0].shape).toMatchObject({ kind: 'box', width: 0.4 });
  });

  it('of the roller: rolling resistance along the dip, by an integration over the spline', () => {
    const crossing = ledgerOf('return-roller.json', '1', '2');
    near(entry(crossing, 'rolling-resistance', 'roller/dip').work, -2.056143);
    near(entry(crossing, 'gravity', 'roller').work, 2.056143);
    for (const { account, work } of crossing.entries) {
      if (account === 'friction' || account === 'impact') expect(Math.abs(work)).toBeLessThan(1e-6);
    }
  });
});

/** Of the press's rod about its middle: 240 mm between centres, 30 mm wide, by integration over its outline. */
function rodInertia(): number {
  const [length, width] = [0.24, 0.03];
  let area = 0;
  let moment = 0;
  const steps = 4000;
  for (let k = 0; k < steps; k += 1) {
    const y = (((k + 0.5) / steps) * 2 - 1) * (width / 2);
    const half = length / 2 + Math.sqrt((width / 2) ** 2 - y ** 2);
    area += 2 * half;
    moment += 2 * (half ** 3 / 3 + half * y ** 2);
  }
  return (1.1 * moment) / area;
}
