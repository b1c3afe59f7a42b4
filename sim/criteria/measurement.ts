import type { Criterion, Measure } from '../mechanism/kinds/criterion.js';
import type { CriterionPart } from './result.js';
import type { RunView } from './run-view.js';

/** What a measure found. */
export interface Measured {
  /** SI; null where a station that was asked for was never reached, which is an answer. */
  value: number | null;
  /** The verdict, for a measure that has no limit. */
  passes?: boolean;
  /** What the value is held against, for a measure that has no limit. */
  claimed?: number;
  /** When the greatest value was [s]. */
  at?: number;
  /** How far the recorded rows leave the value open. */
  resolution?: number;
  parts?: CriterionPart[];
  /** What a reader of the value must know. */
  note?: string;
  /** Why the verdict is what it is, where that is a finding. */
  warning?: { code: string; text: string };
}

/** Why there is no value: a clause to follow "it was not evaluated:". */
export interface Unmeasured {
  reason: string;
  parts?: CriterionPart[];
}

export type Measurement = Measured | Unmeasured;

/** The criteria of one measure. */
export type CriterionOf<M extends Measure> = Extract<Criterion, { measure: M }>;

/** How a measure is taken, and its SI unit. */
export interface MeasureKind<M extends Measure> {
  unit: string;
  take: (criterion: CriterionOf<M>, view: RunView) => Measurement;
}
