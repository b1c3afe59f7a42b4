import type { Vec } from '../core/vec.js';
import type { AccountName, Finding } from '../recording/recording.js';

export type EntryKind = 'stored' | 'external' | 'internal' | 'impact' | 'numerical';

/** Where an entry's joules were lost: on which element, on which of a track's segments, about where on the sheet. */
export interface Place {
  on: string;
  segment?: number;
  at: Vec;
  /** Work done there on the bodies inside the boundary [J]. */
  work: number;
  /** Lost there at the interface [J]. */
  heat: number;
}

/** One account's work between two stations, as in the result contract. */
export interface Entry {
  account: AccountName;
  of: string | [string, string] | null;
  cause?: string;
  kind: EntryKind;
  /** Work on the bodies inside the boundary [J]. */
  work: number;
  byBody: Record<string, number>;
  /** Lost at the interface (slip, damping, impact) [J]; on a belt it is not the work on the body. */
  heat: number;
  places: Place[];
  /** Stored energy at the two ends [J], for kind 'stored'. */
  stored?: { from: number; to: number };
  /** Energy the drive took in [J], where it has an efficiency. */
  input?: number;
}

/** The account book of a boundary between two stations. Every number in it is finite. */
export interface Ledger {
  /** Ids of the two stations. */
  from: string;
  to: string;
  entries: Entry[];
  /** Kinetic energy of the bodies inside the boundary at the two stations, and its change [J]. */
  kineticFrom: number;
  kineticTo: number;
  kineticChange: number;
  /** max(½ Σ|work|, greatest kinetic energy between the two) [J]: the scale that shares are of. */
  turnover: number;
  /** kineticChange − Σ work [J]: what no account explains. */
  unbooked: number;
  /** Rounding that the recorded figures themselves carry [J]: an `unbooked` below it says nothing. */
  resolution: number;
  /** What went wrong in booking: numbers that were not finite and were booked as nil. */
  findings: Finding[];
}

/** The figures of a ledger, as a result has them. */
export type BookedLedger = Omit<Ledger, 'resolution' | 'findings'>;

/** Two marked instants and the rows of a recording they are at. */
export interface Span {
  from: string;
  to: string;
  fromRow: number;
  toRow: number;
}
