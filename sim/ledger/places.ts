import type { Vec } from '../core/vec.js';
import type { AccountName, AccountSpec, Recording } from '../recording/index.js';
import { valueAt } from '../recording/index.js';
import type { Entry, Place, Span } from './ledger.js';
import { locatorOf } from './locate.js';

/** Accounts that turn motion into heat, and so have places in the loss map. */
const DISSIPATING: ReadonlySet<AccountName> = new Set([
  'friction',
  'rolling-resistance',
  'damper',
  'joint-friction',
  'impact',
]);

/** Impacts with less than this share of their entry are put together, segment by segment. */
const SMALL_IMPACT = 1e-3;

/**
 * Where an entry's joules were lost: one place for each segment of a track, for each body it rubbed on, for its joint or
 * damper, and for each impact that counts. What happens from one row to the next is put where the contact was between
 * them; `at` is the mean of those points, weighted with the joules. The works of the places add up to the entry's.
 */
export function placesOf(recording: Recording, account: AccountSpec, entry: Entry, span: Span): Place[] {
  if (!DISSIPATING.has(account.account) || isIdle(entry)) return [];
  const locate = locatorOf(recording, account);
  if (!locate) return [];
  const tally = new PlaceTally();
  const single = account.account === 'impact';
  for (let row = span.fromRow; row < span.toRow; row++) {
    const joules = betweenRows(recording, account, entry, row);
    if (!(joules.weight > 0)) continue;
    for (const spot of locate(row)) tally.add(spot, joules, spot.share, single ? row : -1);
  }
  return single ? mergeSmall(tally.places()) : tally.places();
}

function isIdle({ heat, byBody }: Entry): boolean {
  return heat === 0 && Object.values(byBody).every((work) => work === 0);
}

interface Joules {
  work: number;
  heat: number;
  weight: number;
}

/** What an entry did from a row to the next; nothing where a number is not finite. */
function betweenRows(recording: Recording, { bodies, columns }: AccountSpec, entry: Entry, row: number): Joules {
  const change = (column: number): number => valueAt(recording, row + 1, column) - valueAt(recording, row, column);
  let work = 0;
  columns.work.forEach((column, i) => {
    if (bodies[i] in entry.byBody) work += change(column);
  });
  const heat = columns.heat === undefined ? 0 : change(columns.heat);
  return { work, heat, weight: Math.abs(work) + Math.abs(heat) };
}

class PlaceTally {
  private readonly sums = new Map<string, Place & { weight: number; x: number; y: number }>();

  add(spot: { on: string; segment?: number; at: Vec }, joules: Joules, share: number, instant: number): void {
    const key = `${spot.on} ${spot.segment ?? ''} ${instant}`;
    const sum = this.sums.get(key) ?? {
      on: spot.on,
      ...segmentOf(spot),
      at: spot.at,
      work: 0,
      heat: 0,
      weight: 0,
      x: 0,
      y: 0,
    };
    const weight = share * joules.weight;
    sum.work += share * joules.work;
    sum.heat += share * joules.heat;
    sum.weight += weight;
    sum.x += weight * spot.at[0];
    sum.y += weight * spot.at[1];
    this.sums.set(key, sum);
  }

  places(): Place[] {
    return [...this.sums.values()].map(({ weight, x, y, ...place }) => ({ ...place, at: [x / weight, y / weight] }));
  }
}

function mergeSmall(places: Place[]): Place[] {
  const size = ({ work, heat }: Place): number => Math.abs(work) + Math.abs(heat);
  const limit = SMALL_IMPACT * places.reduce((sum, place) => sum + size(place), 0);
  const tally = new PlaceTally();
  places.forEach((place, i) => {
    tally.add(place, { ...place, weight: size(place) }, 1, size(place) < limit ? -1 : i);
  });
  return tally.places();
}

function segmentOf({ segment }: { segment?: number }): { segment?: number } {
  return segment === undefined ? {} : { segment };
}
