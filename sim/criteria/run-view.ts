import { bookLedger, stationRows, type Ledger, type StationRow } from '../ledger/index.js';
import type { ContactPair } from '../mechanism/kinds/contact.js';
import type { Mechanism } from '../mechanism/model.js';
import { timeOfRow, valueAt, type Recording, type RunEvent } from '../recording/index.js';
import type { Measurement } from './measurement.js';

/** The rows of a span; both are in it. */
export interface Rows {
  fromRow: number;
  toRow: number;
}

/** The stations a criterion names, each optional: from the start, to the end. */
export interface Ends {
  from?: string;
  to?: string;
}

/** What measures ask of a run. */
export class RunView {
  private readonly stations: ReadonlyMap<string, StationRow>;

  constructor(
    readonly mechanism: Mechanism,
    readonly recording: Recording,
  ) {
    this.stations = new Map(stationRows(recording).map((station) => [station.id, station]));
  }

  /** Whether the run came to its end, so that what has not happened did not happen. */
  get isWhole(): boolean {
    return this.recording.end === 'reachedEnd';
  }

  station(id: string): StationRow | undefined {
    return this.stations.get(id);
  }

  /** A measure at a station, if it was reached. */
  at(id: string, take: (station: StationRow) => Measurement): Measurement {
    const station = this.station(id);
    return station ? take(station) : { reason: this.missed(id) };
  }

  /** A measure between two stations, if both were reached, in this order. */
  over({ from, to }: Ends, take: (rows: Rows) => Measurement): Measurement {
    if (to === undefined && !this.isWhole) return { reason: 'the run stopped before its end' };
    const missing = [from, to].find((id) => id !== undefined && !this.stations.has(id));
    if (missing !== undefined) return { reason: this.missed(missing) };
    const fromRow = this.rowOf(from, 0);
    const toRow = this.rowOf(to, this.recording.rowCount - 1);
    if (fromRow <= toRow) return take({ fromRow, toRow });
    return { reason: `station ${to} was reached before station ${from}` };
  }

  private rowOf(id: string | undefined, otherwise: number): number {
    return (id === undefined ? undefined : this.stations.get(id)?.row) ?? otherwise;
  }

  private missed(id: string): string {
    return `station ${id} was not reached${this.isWhole ? '' : ' before the run stopped'}`;
  }

  time(row: number): number {
    return timeOfRow(this.recording, row);
  }

  value(row: number, column: number): number {
    return valueAt(this.recording, row, column);
  }

  /** How much a column changes over a span. */
  change({ fromRow, toRow }: Rows, column: number): number {
    return this.value(toRow, column) - this.value(fromRow, column);
  }

  /** The account book of the bodies inside the boundary, or of others. */
  ledger({ fromRow, toRow }: Rows, system: readonly string[] = this.mechanism.system): Ledger {
    const span = { from: '', to: '', fromRow, toRow };
    return bookLedger(this.recording, span, system, { places: false });
  }

  /** The contact of a pair as the document has it, named in either order. */
  contactPair(pair: readonly [string, string]): ContactPair | undefined {
    return this.mechanism.contacts.find(({ between }) => isSameOf(between, pair));
  }

  /** The touches of a pair, by the row before each. */
  touches(pair: readonly [string, string]): (RunEvent & { kind: 'touch' })[] {
    return this.recording.events.filter(
      (event): event is RunEvent & { kind: 'touch' } => event.kind === 'touch' && isSameOf(event.pair, pair),
    );
  }
}

/** Whether two names of an element or pair mean the same; a pair is named in either order. */
export function isSameOf(
  a: string | readonly [string, string] | null,
  b: string | readonly [string, string] | null,
): boolean {
  if (typeof a === 'string' || typeof b === 'string' || a === null || b === null) return a === b;
  return (a[0] === b[0] && a[1] === b[1]) || (a[0] === b[1] && a[1] === b[0]);
}
