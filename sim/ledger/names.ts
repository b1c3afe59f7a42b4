import type { AccountName, NumericalCause } from '../recording/index.js';
import type { AccountLine } from './account-lines.js';

/** What each account is called wherever a person reads it. */
export const ACCOUNT_NAMES: Record<AccountName, string> = {
  gravity: 'Gravity',
  spring: 'Spring',
  friction: 'Friction',
  reaction: 'Reaction',
  damper: 'Damper',
  load: 'Load',
  drive: 'Drive',
  'joint-friction': 'Joint friction',
  'rolling-resistance': 'Rolling resistance',
  impact: 'Impact',
  rope: 'Rope',
  numerical: 'Numerical',
};

/** What each cause of the account `numerical` is called. */
export const CAUSE_NAMES: Record<NumericalCause, string> = {
  'force-truncation': 'step length',
  'solver-residual': 'solver rest',
  'velocity-projection': 'speed correction',
  'position-projection': 'position correction',
  clamp: 'clamped motion',
};

/** An element by its id, a pair as `first/second`. */
export function ofLabel(of: string | readonly [string, string] | null): string {
  return of === null ? '' : [of].flat().join('/');
}

/** What a line of an account is called: `Friction crate/chute`, `Brought forward, height crate`, `Unbooked`. */
export function lineLabel({ role, account, of, cause, segment }: AccountLine | Omit<AccountLine, 'amount'>): string {
  if (role === 'unbooked') return 'Unbooked';
  if (role === 'rounding') return 'Rounding';
  if (role !== 'entry') return `${role === 'brought' ? 'Brought' : 'Carried'} forward${storeLabel(account, of)}`;
  const name = account === null ? '' : ACCOUNT_NAMES[account];
  if (cause !== undefined) return `${name}, ${CAUSE_NAMES[cause as NumericalCause]}`;
  return [name, ofLabel(of), segment === undefined ? '' : `segment ${segment + 1}`].filter(Boolean).join(' ');
}

function storeLabel(account: AccountName | null, of: AccountLine['of']): string {
  if (account === null) return '';
  return `, ${account === 'gravity' ? 'height' : ACCOUNT_NAMES[account].toLowerCase()} ${ofLabel(of)}`;
}
