import {
  accountPage,
  bookLedger,
  scaleOf,
  stationRows,
  type AccountPage,
  type Ledger,
  type PageLine,
  type StationRow,
} from '../../sim/ledger/index.js';
import { lineKey } from '../account/line-key.js';
import { mergeEntries } from '../account/merge-entries.js';
import { isOf } from '../auditor/compare-lines.js';
import { nameStations, type StationName } from '../../sim/drawing/stations.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Recording } from '../../sim/recording/recording.js';

/** Two stations that an account lies between. */
export interface Page {
  from: StationRow;
  to: StationRow;
}

/** The account book: which page is open, what is on it, and which entry is picked. */
export class Account {
  private chosen = $state.raw<{ from: string; to: string } | null>(null);
  pickedKey = $state<string | null>(null);

  readonly stations: readonly StationRow[] = $derived.by(() => reachedStations(this.recording()));
  /** Each pair of consecutive stations, and first to last. */
  readonly pages: readonly Page[] = $derived(pagesOf(this.stations));
  readonly page: Page | null = $derived.by(() => this.openPage());
  readonly ledger: Ledger | null = $derived.by(() => this.book(this.page));
  readonly printed: AccountPage | null = $derived.by(() => this.print());
  readonly picked: PageLine | null = $derived(
    [...(this.printed?.received ?? []), ...(this.printed?.paidOut ?? [])].find(
      (line) => lineKey(line) === this.pickedKey,
    ) ?? null,
  );

  constructor(
    private readonly recording: () => Recording | null,
    private readonly mechanism: () => Mechanism | null,
    private readonly given: () => ReadonlyMap<string, string>,
  ) {}

  /** Names of the stations on the sheet and in the account. */
  readonly names: ReadonlyMap<string, StationName> = $derived.by(() => {
    const documented = this.mechanism()?.stations ?? [];
    const implied = this.stations.filter(({ id }) => documented.every((station) => station.id !== id));
    const known = implied.map(({ id }) => ({ id, when: { kind: id === 'start' ? 'start' : 'end' } as const }));
    return nameStations(
      implied[0]?.id === 'start' ? [...known, ...documented] : [...documented, ...known],
      this.given(),
    );
  });

  /** The reached station with this mark in its pennant. */
  stationMarked(mark: string): StationRow | null {
    return this.stations.find(({ id }) => this.mark(id) === mark) ?? null;
  }

  mark(id: string): string {
    return this.names.get(id)?.mark ?? id;
  }

  word(id: string): string {
    return this.names.get(id)?.word ?? '';
  }

  /** Opens the page between two stations, whichever was reached first. */
  open(a: string, b: string): void {
    const order = (id: string) => this.stations.findIndex((station) => station.id === id);
    const [from, to] = order(a) <= order(b) ? [a, b] : [b, a];
    if (from === to) return;
    this.chosen = { from, to };
  }

  pick(line: PageLine | null): void {
    const key = line && lineKey(line);
    this.pickedKey = key === this.pickedKey ? null : key;
  }

  /** Picks the greatest line of an account on the open page. */
  pickAccount(account: PageLine['account'], of: PageLine['of']): void {
    const lines = [...(this.printed?.received ?? []), ...(this.printed?.paidOut ?? [])]
      .filter((line) => line.role === 'entry' && line.account === account && isOf(line, of))
      .sort((a, b) => b.amount - a.amount);
    this.pickedKey = lines.length > 0 ? lineKey(lines[0]) : null;
  }

  reset(): void {
    this.chosen = null;
    this.pickedKey = null;
  }

  private openPage(): Page | null {
    const find = (id: string | undefined) => this.stations.find((station) => station.id === id);
    const [from, to] = [find(this.chosen?.from), find(this.chosen?.to)];
    return from && to ? { from, to } : (this.pages[0] ?? null);
  }

  private book(page: Page | null): Ledger | null {
    const [recording, mechanism] = [this.recording(), this.mechanism()];
    if (!page || !recording || !mechanism) return null;
    const span = { from: page.from.id, to: page.to.id, fromRow: page.from.row, toRow: page.to.row };
    return bookLedger(recording, span, mechanism.system);
  }

  /** All pages in one unit, so that what one carries forward is printed as the next brings it forward. */
  private print(): AccountPage | null {
    if (!this.ledger) return null;
    const ledgers = this.pages.map((page) => this.book(page)).filter((ledger) => ledger !== null);
    return accountPage(mergeEntries(this.ledger), { scale: scaleOf([...ledgers, this.ledger]), split: true });
  }
}

/** Stations of a run; a run without any is one page from its first row to its last. */
export function reachedStations(recording: Recording | null): StationRow[] {
  if (!recording || recording.rowCount === 0) return [];
  const reached = stationRows(recording);
  if (reached.length > 1) return reached;
  const at = (id: string, row: number): StationRow => ({ id, row, time: recording.rows[row * recording.layout.width] });
  const end = at('end', recording.rowCount - 1);
  return reached.length === 1 && reached[0].row < end.row ? [reached[0], end] : [at('start', 0), end];
}

function pagesOf(stations: readonly StationRow[]): Page[] {
  const pairs = stations.slice(1).map((to, i) => ({ from: stations[i], to }));
  const [first, last] = [stations.at(0), stations.at(-1)];
  return first && last && stations.length > 2 ? [...pairs, { from: first, to: last }] : pairs;
}
