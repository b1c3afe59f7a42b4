import type { Recording } from '../recording/index.js';
import { bookLedger } from './book.js';
import type { Ledger, Span } from './ledger.js';

/** A station that the run reached. */
export interface StationRow {
  id: string;
  row: number;
  /** [s] */
  time: number;
  /** Where the station falls on an impact: [m/s], [kg]. */
  touch?: { approachSpeed: number; effectiveMass: number };
}

/** The stations a run reached, by the time reached. */
export function stationRows({ events }: Recording): StationRow[] {
  const reached = events.flatMap((event): StationRow[] => {
    if (event.kind !== 'station') return [];
    const { station, row, time, touch } = event;
    return [{ id: station, row, time, ...(touch ? { touch } : {}) }];
  });
  return reached.sort((a, b) => a.time - b.time || a.row - b.row);
}

/** The spans a report shows: each pair of consecutive stations, and first to last where there are more than two. */
export function stationSpans(stations: readonly StationRow[]): Span[] {
  const pairs = stations.slice(1).map((to, i) => spanOf(stations[i], to));
  const [first, last] = [stations.at(0), stations.at(-1)];
  return first && last && stations.length > 2 ? [...pairs, spanOf(first, last)] : pairs;
}

function spanOf(from: StationRow, to: StationRow): Span {
  return { from: from.id, to: to.id, fromRow: from.row, toRow: to.row };
}

/** The ledgers of a run for a boundary: one for each of `stationSpans`. */
export function consecutiveLedgers(recording: Recording, system: readonly string[]): Ledger[] {
  return stationSpans(stationRows(recording)).map((span) => bookLedger(recording, span, system));
}
