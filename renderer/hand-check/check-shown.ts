import type { HandCheck } from '../../sim/ledger/index.js';
import { fixed } from '../format/quantity.js';

/** The check of the body that is looked at; else the first that says something. */
export function checkShown(checks: readonly HandCheck[], subject: string | null): HandCheck | null {
  const own = checks.find(({ of }) => of === subject);
  return own ?? checks.find(({ lines }) => lines.length > 1) ?? checks.at(0) ?? null;
}

/** How far hand and run are apart; where the station itself means rest, what the sum leaves. */
export function checkDifference({ speed, difference, spin, spinDifference, left }: HandCheck): string {
  if (left !== undefined) return `leaves ${fixed(left, 4)} J`;
  if (spin !== undefined && spinDifference !== undefined) return `difference ${fixed(spinDifference, 4)} rad/s`;
  return speed !== null && difference !== undefined ? `difference ${fixed(difference, 4)} m/s` : '';
}
