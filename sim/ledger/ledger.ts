import type { Vec } from '../core/vec.js';
import type { AccountName } from '../recording/recording.js';

export type EntryKind = 'stored' | 'external' | 'internal' | 'impact' | 'numerical';

/** Where an entry's joules were lost: on which element, on which of a track's segments, about where on the sheet. */
export interface Place {
  on: string;
  segment?: number;
  at: Vec;
  work: number;
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
  heat: number;
  places: Place[];
  /** Stored energy at the two ends [J], for kind 'stored'. */
  stored?: { from: number; to: number };
}

export interface Ledger {
  from: string;
  to: string;
  entries: Entry[];
  kineticFrom: number;
  kineticTo: number;
  kineticChange: number;
  turnover: number;
  unbooked: number;
}
