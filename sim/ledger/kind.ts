import type { AccountSpec } from '../recording/index.js';
import type { EntryKind } from './ledger.js';

/**
 * What kind of entry an account makes, seen from a boundary.
 *
 * - `impact` and `numerical` are what they are, wherever the boundary runs.
 * - `stored`: the account keeps what it takes and gives it back, and all bodies it works on are inside. A spring whose
 *   other end is on the ground is stored inside, since the ground does not move and takes no work. A spring, or a compliant contact, whose
 *   other end is on a moving body outside is `external`: that body works on the spring too, so what the spring gives the
 *   inside is not what it stored.
 * - `internal`: it acts between bodies that are all inside (friction between two of them, a pin that joins them).
 * - `external`: anything else acts across the boundary, from the ground, a track, a field or a body outside.
 */
export function entryKind(account: AccountSpec, inside: ReadonlySet<string>): EntryKind {
  if (account.account === 'impact' || account.account === 'numerical') return account.account;
  const allInside = account.bodies.every((body) => inside.has(body));
  if (account.columns.stored !== undefined) return allInside ? 'stored' : 'external';
  return allInside && account.bodies.length > 1 ? 'internal' : 'external';
}
