import type { AccountName, AccountSpec, Recording } from '../recording/index.js';
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
 * Where each entry's joules were lost: one place for each segment of a track, for each body it rubbed on, for its joint
 * or damper, and for each impact that counts. What happens from one row to the next is put where the contact was between
 * them; `at` is the mean of those points, weighted with the joules. The works of the places add up to the entry's.
 *
 * All entries go through the rows together: a row is far longer than what one entry reads of it.
 *
 * @param entries of the accounts, in the same order
 * @returns places of each entry
 */
export function placesOf(
  recording: Recording,
  accounts: readonly AccountSpec[],
  entries: readonly Entry[],
  { fromRow, toRow }: Span,
): Place[][] {
  const searches = entries.map((entry, i) => searchFor(recording, accounts[i], entry));
  const active = searches.filter((search) => search !== null);
  for (let row = fromRow; row < toRow; row++) {
    for (const search of active) search.pass(row);
  }
  return searches.map((search) => search?.places() ?? []);
}

/** One entry on its way through the rows. */
interface Search {
  pass: (row: number) => void;
  places: () => Place[];
}

function searchFor(recording: Recording, account: AccountSpec, entry: Entry): Search | null {
  if (!DISSIPATING.has(account.account) || isIdle(entry)) return null;
  const locator = locatorOf(recording, account);
  if (!locator) return null;
  const tally = new PlaceTally(locator.on);
  const isImpact = account.account === 'impact';
  const works = account.columns.work.filter((_, i) => account.bodies[i] in entry.byBody);
  const { heat } = account.columns;
  const { rows } = recording;
  const { width } = recording.layout;
  const pass = (row: number): void => {
    const at = row * width;
    let worked = 0;
    for (const column of works) worked += rows[at + width + column] - rows[at + column];
    const lost = heat === undefined ? 0 : rows[at + width + heat] - rows[at + heat];
    if (worked === 0 && lost === 0) return;
    const instant = isImpact ? row : -1;
    locator.visit(row, (segment, x, y, share) => tally.add(instant, segment, x, y, share * worked, share * lost));
  };
  return { pass, places: () => (isImpact ? mergeSmall(tally.places(), locator.on) : tally.places()) };
}

function isIdle({ heat, byBody }: Entry): boolean {
  return heat === 0 && Object.values(byBody).every((work) => work === 0);
}

interface Sum {
  segment: number;
  work: number;
  heat: number;
  /** Σ (|work| + |heat|), and its moments about the axes. */
  weight: number;
  x: number;
  y: number;
}

/** Adds up joules by segment and by instant (−1: whenever). */
class PlaceTally {
  private readonly sums = new Map<string, Sum>();
  /** What was added to last: most additions follow one to the same place. */
  private last: { instant: number; sum: Sum } | null = null;

  constructor(private readonly on: string) {}

  add(instant: number, segment: number, x: number, y: number, work: number, heat: number): void {
    const sum = this.sumOf(instant, segment);
    const weight = Math.abs(work) + Math.abs(heat);
    sum.work += work;
    sum.heat += heat;
    sum.weight += weight;
    sum.x += weight * x;
    sum.y += weight * y;
  }

  places(): Place[] {
    return [...this.sums.values()].map(({ segment, work, heat, weight, x, y }) => {
      return { on: this.on, ...(segment < 0 ? {} : { segment }), at: [x / weight, y / weight], work, heat };
    });
  }

  private sumOf(instant: number, segment: number): Sum {
    if (this.last?.instant === instant && this.last.sum.segment === segment) return this.last.sum;
    const key = `${instant} ${segment}`;
    const sum = this.sums.get(key) ?? { segment, work: 0, heat: 0, weight: 0, x: 0, y: 0 };
    this.sums.set(key, sum);
    this.last = { instant, sum };
    return sum;
  }
}

function mergeSmall(places: Place[], on: string): Place[] {
  const size = ({ work, heat }: Place): number => Math.abs(work) + Math.abs(heat);
  const limit = SMALL_IMPACT * places.reduce((sum, place) => sum + size(place), 0);
  const tally = new PlaceTally(on);
  places.forEach((place, i) => {
    const [x, y] = place.at;
    tally.add(size(place) < limit ? -1 : i, place.segment ?? -1, x, y, place.work, place.heat);
  });
  return tally.places();
}
