import type { Bounds, Measure } from '../mechanism/kinds/criterion.js';
import type { Finding, Recording } from '../recording/index.js';

/** One line of the sum behind a ratio. */
export interface CriterionPart {
  /** Whether it is on the side of what is there, or of what is wanted from it. */
  side: 'gives' | 'takes';
  label: string;
  /** [J]; below nil where it works the other way round, such as a fall among what is to be lifted. */
  amount: number;
}

/** A criterion, judged on a run. All numbers are SI, in `unit`. */
export interface CriterionResult extends Bounds {
  id: string;
  /** What people call it, where the document says so. */
  name?: string;
  measure: Measure;
  /** SI unit of `value`, of the limits and of `margin`; empty for a plain number. */
  unit: string;
  value: number | null;
  /** What somebody claims the value to be (`claimedEfficiency`). */
  claimed?: number;
  /** How far the value is within its limit; below nil where it fails. Absent where there is no limit or no value. */
  margin?: number;
  /** The margin as a share of that limit. Absent where the limit is nil. */
  marginShare?: number;
  /** When the greatest value was [s], for a peak. */
  at?: number;
  /** How far the recorded rows leave the value open, where it was found between them. */
  resolution?: number;
  /** null: could not be evaluated, which counts as failed. */
  passes: boolean | null;
  /** Whose run it was judged on; null where there was none. */
  by: Recording['solver'] | null;
  /** What a ratio is made of. */
  parts?: CriterionPart[];
  note?: string;
}

export interface CriteriaResult {
  criteria: CriterionResult[];
  findings: Finding[];
}
