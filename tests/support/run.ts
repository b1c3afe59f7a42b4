import { bookLedger, stationRows, type Entry, type Ledger, type StationRow } from '../../sim/ledger/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import {
  bodyAtRow,
  bodyOf,
  contactOf,
  timeOfRow,
  valueAt,
  type BodyState,
  type Recording,
  type RunEvent,
} from '../../sim/recording/index.js';
import { runStepper, type StepperOptions } from '../../sim/stepper/index.js';

/** Standard gravity [m/s²], as a document has it that names none (3rd CGPM 1901). */
export const G = 9.80665;

/** A mechanism document without what every one of them has. */
export type Parts = Record<string, unknown>;

/** A body at an instant, with its speed [m/s]. */
export interface Motion extends BodyState {
  time: number;
  speed: number;
}

/** Reads a document given as parts; stations at its start and its end are there unless it has its own. */
export function mechanismOf(parts: Parts): Mechanism {
  const stations = [
    { id: 'start', when: { start: true } },
    { id: 'end', when: { end: true } },
  ];
  const { mechanism, problems } = readMechanism(JSON.stringify({ format: 'joulewright/1', stations, ...parts }));
  if (!mechanism) throw new Error(problems.map(({ pointer, text }) => `${pointer}: ${text}`).join('\n'));
  return mechanism;
}

/** Runs a document on the stepper. */
export function run(parts: Parts, options: StepperOptions = {}): Run {
  const mechanism = mechanismOf(parts);
  return new Run(mechanism, runStepper(mechanism, options));
}

/** A finished run, asked for figures. */
export class Run {
  constructor(
    readonly mechanism: Mechanism,
    readonly recording: Recording,
  ) {}

  get lastRow(): number {
    return this.recording.rowCount - 1;
  }

  get endTime(): number {
    return timeOfRow(this.recording, this.lastRow);
  }

  /** A body's motion at a row, or at the last row. */
  motion(id: string, row = this.lastRow): Motion {
    const body = bodyOf(this.recording, id);
    if (!body) throw new Error(`no body ${id}`);
    const state = bodyAtRow(this.recording, body, row);
    return { ...state, time: timeOfRow(this.recording, row), speed: Math.hypot(state.vx, state.vy) };
  }

  /** A body's motion at every row. */
  motions(id: string): Motion[] {
    return Array.from({ length: this.recording.rowCount }, (_, row) => this.motion(id, row));
  }

  get stations(): StationRow[] {
    return stationRows(this.recording);
  }

  station(id: string): StationRow {
    const found = this.stations.find((station) => station.id === id);
    if (!found) throw new Error(`station ${id} was not reached`);
    return found;
  }

  events<Kind extends RunEvent['kind']>(kind: Kind): (RunEvent & { kind: Kind })[] {
    return this.recording.events.filter((event): event is RunEvent & { kind: Kind } => event.kind === kind);
  }

  /** A column of a contact pair at a row. */
  contact(a: string, b: string, column: 'points' | 'normal' | 'friction' | 'slip', row = this.lastRow): number {
    const found = contactOf(this.recording, [a, b]);
    if (!found) throw new Error(`no contact ${a}/${b}`);
    return valueAt(this.recording, row, found.columns[column]);
  }

  /** The ledger between two stations, or of the whole run; its boundary is around all bodies unless told. */
  ledger(from?: string, to?: string, system?: readonly string[]): Ledger {
    const fromRow = from === undefined ? 0 : this.station(from).row;
    const toRow = to === undefined ? this.lastRow : this.station(to).row;
    const inside = system ?? this.recording.layout.bodies.map(({ id }) => id);
    return bookLedger(this.recording, { from: from ?? '', to: to ?? '', fromRow, toRow }, inside);
  }

  /** Σ|work| of the numerical entries over the turnover. */
  numericalShare(): number {
    const ledger = this.ledger();
    const made = ledger.entries.filter(({ kind }) => kind === 'numerical').map(({ work }) => Math.abs(work));
    return made.reduce((sum, work) => sum + work, 0) / (ledger.turnover || 1);
  }

  /** |unbooked| over the turnover, the worst of all bodies together and of each alone. */
  openShare(): number {
    const whole = this.ledger();
    const ids = this.recording.layout.bodies.map(({ id }) => id);
    const alone = ids.map((id) => this.ledger(undefined, undefined, [id]).unbooked);
    return Math.max(...[whole.unbooked, ...alone].map(Math.abs)) / (whole.turnover || 1);
  }

  entry(account: string, of: string, ledger = this.ledger()): Entry {
    const found = ledger.entries.find((entry) => entry.account === account && [entry.of].flat().join('/') === of);
    if (!found) throw new Error(`no entry ${account} ${of}`);
    return found;
  }

  /** Σ of an account over all that it is of. */
  total(account: string, field: 'work' | 'heat' = 'work', ledger = this.ledger()): number {
    return ledger.entries.filter((entry) => entry.account === account).reduce((sum, entry) => sum + entry[field], 0);
  }
}
