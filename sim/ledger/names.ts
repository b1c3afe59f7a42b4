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

/** What a line of an account is called: `Friction crate/chute`, `Height crate b/f`, `Carried forward`, `Unbooked`. */
export function lineLabel({ role, account, of, cause, segment }: Omit<AccountLine, 'amount'>): string {
  if (role === 'unbooked') return 'Unbooked';
  if (role === 'rounding') return 'Rounding';
  if (role === 'entry') return entryLabel(account, of, cause, segment);
  if (account === null) return role === 'brought' ? 'Brought forward' : 'Carried forward';
  const store = account === 'gravity' ? 'Height' : ACCOUNT_NAMES[account];
  return `${store} ${ofLabel(of)} ${role === 'brought' ? 'b/f' : 'c/f'}`;
}

function entryLabel(
  account: AccountName | null,
  of: AccountLine['of'],
  cause: string | undefined,
  segment: number | undefined,
): string {
  const name = account === null ? '' : ACCOUNT_NAMES[account];
  if (cause !== undefined) return `${name}, ${CAUSE_NAMES[cause as NumericalCause]}`;
  return [name, ofLabel(of), segment === undefined ? '' : `segment ${segment + 1}`].filter(Boolean).join(' ');
}
