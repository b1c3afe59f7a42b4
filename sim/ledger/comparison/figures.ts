import type { AccountName } from '../../recording/index.js';

/** The two answers that are compared: each run by the part it plays, whichever solver made it. */
export type Role = 'stepper' | 'auditor';
export const ROLES: readonly Role[] = ['stepper', 'auditor'];

/** What is compared at a station. */
export type Quantity = 'time' | 'x' | 'y' | 'angle' | 'speed' | 'spin' | 'approachSpeed' | 'effectiveMass';

/** One number of both runs. SI: s, m, rad, m/s, rad/s, kg, J. */
export interface Figure {
  /** Nothing where a run has no such figure. */
  stepper: number | null;
  auditor: number | null;
  /** stepper − auditor; a missing one counts as nil. */
  difference: number;
  /** |difference| over the scale of the contract. */
  share: number;
  within: boolean;
}

export interface StationFigure extends Figure {
  quantity: Quantity;
  /** The body; of a touch its pair as `first/second`; of the time nothing. */
  of: string;
}

export interface StationComparison {
  station: string;
  figures: StationFigure[];
}

export interface AccountFigure extends Figure {
  account: AccountName;
  of: string | [string, string] | null;
}

export interface SpanComparison {
  from: string;
  to: string;
  accounts: AccountFigure[];
}

/**
 * Compare two numbers on a scale.
 *
 * share = |a − b| / max(|a|, |b|, least)
 *
 * @param least below this, both are compared on it
 */
export function compareFigures(
  stepper: number | null,
  auditor: number | null,
  least: number,
  tolerance: number,
): Figure {
  const [a, b] = [stepper ?? 0, auditor ?? 0];
  const difference = a - b;
  const scale = Math.max(Math.abs(a), Math.abs(b), least);
  const share = difference === 0 ? 0 : Math.abs(difference) / scale;
  // Written so that what is not a number is never within.
  return { stepper, auditor, difference, share, within: share <= tolerance };
}
