import type { Ledger } from '../ledger/index.js';
import { consecutiveLedgers } from '../ledger/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Recording } from '../recording/index.js';

/** A run with its accounts. */
export interface BookedRun {
  recording: Recording;
  /** As `consecutiveLedgers` books them around the system. */
  ledgers: Ledger[];
}

export function bookedRun({ system }: Mechanism, recording: Recording): BookedRun {
  return { recording, ledgers: consecutiveLedgers(recording, system) };
}
