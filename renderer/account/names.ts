import { itemNumbers, type Item } from '../../sim/drawing/items.js';
import type { PageLine } from '../../sim/ledger/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { AccountName } from '../../sim/recording/recording.js';

const accountWords: Record<AccountName, string> = {
  gravity: 'Gravity',
  spring: 'Spring',
  friction: 'Friction',
  reaction: 'Reaction',
  damper: 'Damper',
  load: 'Load',
  drive: 'Drive',
  'joint-friction': 'Joint friction',
  'rolling-resistance': 'Rolling',
  impact: 'Impact',
  rope: 'Rope',
  numerical: 'Numerical',
};

export function accountWord(account: AccountName): string {
  return accountWords[account];
}

type Named = Pick<PageLine, 'account' | 'of'> &
  Partial<Pick<PageLine, 'on' | 'role'>> & { segment?: number | undefined };

/** An account by its cause and item numbers, "Friction 1/2 chute". */
export function lineName(line: Named, items: readonly Item[], mechanism: Mechanism, compact = false): string {
  const { role = 'entry', account, of } = line;
  if (account === null) return frameWords[role]?.[compact ? 1 : 0] ?? role;
  // There is one gravity, whichever bodies it works on.
  const numbers = account === 'gravity' ? '' : itemNumbers(items, of);
  const segment = segmentName(line, mechanism);
  const store = role === 'brought' ? ' b/f' : role === 'carried' ? ' c/f' : '';
  const word = compact && account === 'friction' && segment !== '' ? '' : accountWords[account];
  return [word, numbers, segment].filter((part) => part !== '').join(' ') + store;
}

const frameWords: Partial<Record<PageLine['role'], [full: string, compact: string]>> = {
  brought: ['Brought forward', 'Balance b/f'],
  carried: ['Carried forward', 'Balance c/f'],
  unbooked: ['Unbooked', 'Unbooked'],
  rounding: ['Rounding', 'Rounding'],
};

/** The document's name of the track segment a part of an entry is on; one without a name counts. */
function segmentName({ on, segment }: Named, { tracks }: Mechanism): string {
  if (segment === undefined) return '';
  const track = tracks.find(({ id }) => id === on);
  return track?.segments[segment]?.name ?? `part ${segment + 1}`;
}
