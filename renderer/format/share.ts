import { figures } from './quantity.js';

/** Shares below this are not told apart. */
const least = 1e-5;

/** A share as a bound: rounded up to two figures, so that it holds. */
export function boundText(share: number): string {
  return `${roundedUp(Math.max(share, least))} %`;
}

/** A share as a figure of a list. */
export function shareText(share: number): string {
  if (!Number.isFinite(share)) return '–';
  if (share === 0) return '0 %';
  return share < least ? '< 0.001 %' : `${roundedUp(share)} %`;
}

function roundedUp(share: number): string {
  const percent = 100 * share;
  const digit = 10 ** (Math.floor(Math.log10(percent)) - 1);
  // What rounding leaves of a whole number of digits is not a digit more.
  return figures(Math.ceil(percent / digit - 1e-9) * digit, 3);
}
