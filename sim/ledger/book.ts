import { CompensatedSum, compensatedSum } from '../core/sum.js';
import type { AccountSpec, BodySpec, Finding, Recording } from '../recording/index.js';
import { kineticEnergyOf, timeOfRow, valueAt } from '../recording/index.js';
import { entryKind } from './kind.js';
import type { Entry, Ledger, Span } from './ledger.js';
import { placesOf } from './places.js';

/** Roundings of the recorded figures that may add up before a ledger is called open. */
const ROUNDINGS = 16;

/**
 * Book the ledger of a boundary between two rows of a run.
 *
 * Account columns are cumulative, so each entry is a difference of two rows, and any boundary and any pair of rows can
 * be booked from the one recording. An account that works on no body inside the boundary has no entry; one that works
 * on bodies on both sides is booked with what it did on those inside.
 *
 *     kineticChange = T(to) − T(from) = Σ work + unbooked
 *
 * A number that is not finite is booked as nil and named in `findings`, never passed on.
 *
 * @param system ids of the bodies inside the boundary; ids that are no bodies of the run are left out
 * @param options.places false leaves out where things were lost, which takes most of the time
 * @throws RangeError when the rows are not in the recording or not in order
 */
export function bookLedger(
  recording: Recording,
  span: Span,
  system: readonly string[],
  options: { places?: boolean } = {},
): Ledger {
  checkRows(recording, span);
  const inside = new Set(system);
  const bodies = recording.layout.bodies.filter(({ id }) => inside.has(id));
  const guard = new FiniteGuard(span, timeOfRow(recording, span.toRow));
  const accounts = recording.layout.accounts.filter((account) => account.bodies.some((body) => inside.has(body)));
  const entries = accounts.map((account) => bookEntry(recording, account, span, inside, guard));
  if (options.places ?? true) addPlaces(recording, accounts, entries, span, guard);
  const kinetic = (row: number): number => guard.finite(kineticEnergy(recording, bodies, row), 'kinetic energy', []);
  const [kineticFrom, kineticTo] = [kinetic(span.fromRow), kinetic(span.toRow)];
  const greatest = Math.max(kineticFrom, kineticTo, greatestKinetic(recording, bodies, span));
  return {
    from: span.from,
    to: span.to,
    entries,
    kineticFrom,
    kineticTo,
    kineticChange: kineticTo - kineticFrom,
    turnover: Math.max(0.5 * compensatedSum(entries.map(({ work }) => Math.abs(work))), greatest),
    unbooked: compensatedSum([kineticTo, -kineticFrom, ...entries.map(({ work }) => -work)]),
    resolution: resolution(recording, span, inside, greatest),
    findings: guard.findings,
  };
}

function checkRows({ rowCount }: Recording, { fromRow, toRow }: Span): void {
  if (fromRow >= 0 && fromRow <= toRow && toRow < rowCount) return;
  throw new RangeError(`rows ${fromRow} to ${toRow} are not a span of a recording of ${rowCount} rows`);
}

function bookEntry(
  recording: Recording,
  account: AccountSpec,
  span: Span,
  inside: ReadonlySet<string>,
  guard: FiniteGuard,
): Entry {
  const { account: name, of, cause, columns } = account;
  const named = of === null ? [] : [of].flat();
  const read = (row: number, column: number): number => guard.finite(valueAt(recording, row, column), name, named);
  const change = (column: number): number => read(span.toRow, column) - read(span.fromRow, column);
  const byBody: Record<string, number> = {};
  account.bodies.forEach((body, i) => {
    if (inside.has(body)) byBody[body] = change(columns.work[i]);
  });
  const entry: Entry = {
    account: name,
    of,
    ...(cause === undefined ? {} : { cause }),
    kind: entryKind(account, inside),
    work: compensatedSum(Object.values(byBody)),
    byBody,
    heat: columns.heat === undefined ? 0 : change(columns.heat),
    places: [],
  };
  if (columns.input !== undefined) entry.input = change(columns.input);
  if (entry.kind === 'stored' && columns.stored !== undefined) {
    entry.stored = { from: read(span.fromRow, columns.stored), to: read(span.toRow, columns.stored) };
  }
  return entry;
}

function addPlaces(
  recording: Recording,
  accounts: readonly AccountSpec[],
  entries: readonly Entry[],
  span: Span,
  guard: FiniteGuard,
): void {
  placesOf(recording, accounts, entries, span).forEach((places, i) => {
    const { account, of } = entries[i];
    entries[i].places = places.filter(({ at, work, heat }) => {
      return guard.areFinite([...at, work, heat], `place of ${account}`, of === null ? [] : [of].flat());
    });
  });
}

/** Kinetic energy of several bodies at a row [J]. */
export function kineticEnergy(recording: Recording, bodies: readonly BodySpec[], row: number): number {
  const sum = new CompensatedSum();
  for (const body of bodies) sum.add(kineticEnergyOf(recording, body, row));
  return sum.value;
}

function greatestKinetic(recording: Recording, bodies: readonly BodySpec[], { fromRow, toRow }: Span): number {
  let greatest = 0;
  for (let row = fromRow; row <= toRow; row++) {
    let energy = 0;
    for (const body of bodies) energy += kineticEnergyOf(recording, body, row);
    if (energy > greatest && energy < Infinity) greatest = energy;
  }
  return greatest;
}

/**
 * The recorded sums are rounded to their own size, which may be far above what happens between two late rows; so are the
 * stores, whose differences solvers book as work.
 */
function resolution(recording: Recording, span: Span, inside: ReadonlySet<string>, kinetic: number): number {
  const sizes = new CompensatedSum();
  sizes.add(kinetic);
  for (const { bodies, columns } of recording.layout.accounts) {
    const works = columns.work.filter((_, i) => inside.has(bodies[i]));
    const stored = works.length > 0 && columns.stored !== undefined ? [columns.stored] : [];
    for (const column of [...works, ...stored]) {
      for (const row of [span.fromRow, span.toRow]) sizes.add(Math.abs(valueAt(recording, row, column)));
    }
  }
  return Number.isFinite(sizes.value) ? ROUNDINGS * Number.EPSILON * sizes.value : 0;
}

/** Lets finite numbers through, −0 as 0; any other is nil and leaves one finding for what it belongs to. */
class FiniteGuard {
  readonly findings: Finding[] = [];
  private readonly seen = new Set<string>();

  constructor(
    private readonly span: Span,
    private readonly time: number,
  ) {}

  finite(value: number, what: string, of: string[]): number {
    if (Number.isFinite(value)) return value + 0;
    const key = [what, ...of].join(' ');
    if (!this.seen.has(key)) this.findings.push(this.finding(what, of));
    this.seen.add(key);
    return 0;
  }

  areFinite(values: number[], what: string, of: string[]): boolean {
    for (const value of values) this.finite(value, what, of);
    return values.every((value) => Number.isFinite(value));
  }

  private finding(what: string, of: string[]): Finding {
    const { from, to } = this.span;
    const whose = of.length > 0 ? ` of ${of.join('/')}` : '';
    const text = `The ${what}${whose} between stations ${from} and ${to} is not a finite number, and is booked as nil.`;
    return {
      severity: 'error',
      code: 'non-finite',
      text,
      of,
      ...(Number.isFinite(this.time) ? { at: this.time } : {}),
    };
  }
}
