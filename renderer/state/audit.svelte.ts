import {
  type AccountFigure,
  bookLedger,
  compareRuns,
  handCheck,
  type Comparison,
  type HandCheck,
  type Ledger,
  type StationFigure,
  type Verdict,
} from '../../sim/ledger/index.js';
import { evaluateCriteria, type CriteriaResult } from '../../sim/criteria/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Recording } from '../../sim/recording/recording.js';
import { compareLines, type ComparedLine } from '../auditor/compare-lines.js';
import { reachedStations, type Account } from './account.svelte.js';
import type { Run } from './run.svelte.js';

const nothing: ReadonlyMap<string, ComparedLine> = new Map();

/** A figure that was compared, and where: at a station, or between two. */
export type PlacedFigure =
  { station: string; figure: StationFigure } | { from: string; to: string; figure: AccountFigure };

/** What the second solver and the hand say to the run: the verdict, line by line and figure by figure. */
export class Audit {
  /** Both runs, once neither goes on. */
  private readonly both: { stepper: Recording; auditor: Recording } | null = $derived.by(() => {
    const [stepper, auditor] = [settled(this.run), settled(this.second)];
    return stepper && auditor ? { stepper, auditor } : null;
  });
  readonly comparison: Comparison | null = $derived.by(() => {
    const mechanism = this.mechanism();
    return mechanism && this.both ? compareRuns(mechanism, this.both.stepper, this.both.auditor) : null;
  });
  readonly verdict: Verdict = $derived(this.comparison?.verdict ?? 'unaudited');
  /** All that was compared. */
  readonly figures: readonly PlacedFigure[] = $derived.by(() => {
    const { stations = [], spans = [] } = this.comparison ?? {};
    return [
      ...stations.flatMap(({ station, figures }) => figures.map((figure) => ({ station, figure }))),
      ...spans.flatMap(({ from, to, accounts }) => accounts.map((figure) => ({ from, to, figure }))),
    ];
  });
  /** What differs most, over the whole of the run. */
  readonly worst: PlacedFigure | null = $derived.by(() =>
    this.figures.reduce<PlacedFigure | null>((a, b) => (a && a.figure.share >= b.figure.share ? a : b), null),
  );
  /** The station from which on the runs are not the same: the first that differs, or that one run alone reached. */
  readonly partingStation: string | null = $derived.by(() => {
    const { parting, oneSided = [] } = this.comparison ?? {};
    return parting?.station ?? oneSided[0]?.station ?? null;
  });
  /** The auditor's account of the open page. */
  readonly ledger: Ledger | null = $derived.by(() => this.book());
  /** What the whole run turns over [J]. */
  private readonly turnover: number = $derived.by(() => {
    const [mechanism, recording] = [this.mechanism(), settled(this.run)];
    if (!mechanism || !recording) return 0;
    const whole = { from: '', to: '', fromRow: 0, toRow: recording.rowCount - 1 };
    return bookLedger(recording, whole, mechanism.system, { places: false }).turnover;
  });
  /** Entries of the open page as both have them, by the key of their line; `numerical` is each method's own. */
  readonly lines: ReadonlyMap<string, ComparedLine> = $derived.by(() => this.compareLines());
  readonly worstLine: ComparedLine | null = $derived.by(() =>
    [...this.lines.values()].reduce<ComparedLine | null>((a, b) => (a && isAtLeast(a, b) ? a : b), null),
  );
  /** Judged on the auditor's run where it came to its end, on the stepper's otherwise. */
  readonly criteria: CriteriaResult = $derived.by(() => {
    const mechanism = this.mechanism();
    const [stepper, auditor] = [settled(this.run), settled(this.second)];
    const judge = auditor?.end === 'reachedEnd' ? auditor : stepper;
    return mechanism ? evaluateCriteria(mechanism, judge) : { criteria: [], findings: [] };
  });
  readonly handChecks: readonly HandCheck[] = $derived.by(() => {
    const [mechanism, recording] = [this.mechanism(), settled(this.run)];
    return mechanism && recording ? handCheck(mechanism, recording) : [];
  });

  constructor(
    private readonly run: Run,
    private readonly second: Run,
    private readonly account: Account,
    private readonly mechanism: () => Mechanism | null,
  ) {}

  private book(): Ledger | null {
    const [mechanism, recording, { page }] = [this.mechanism(), settled(this.second), this.account];
    if (!mechanism || !recording || !page) return null;
    const stations = reachedStations(recording);
    const [from, to] = [page.from.id, page.to.id].map((id) => stations.find((station) => station.id === id));
    if (!from || !to || from.row > to.row) return null;
    const span = { from: from.id, to: to.id, fromRow: from.row, toRow: to.row };
    return bookLedger(recording, span, mechanism.system);
  }

  private compareLines(): ReadonlyMap<string, ComparedLine> {
    const [mine, theirs, { printed }] = [this.account.ledger, this.ledger, this.account];
    if (!mine || !theirs || !printed) return nothing;
    const scales = { ofRun: this.turnover, tolerance: this.comparison?.tolerance ?? 0 };
    return compareLines([mine, theirs], printed, this.partedAccounts(), scales);
  }

  /** Accounts of the open page that differ. */
  private partedAccounts(): AccountFigure[] {
    const { page } = this.account;
    const span = this.comparison?.spans.find(({ from, to }) => from === page?.from.id && to === page.to.id);
    return span?.accounts.filter(({ within }) => !within) ?? [];
  }
}

/**
 * What a solver recorded, once its run goes on no more; nothing where that is nothing. What is still coming is not looked
 * at, so that nothing is worked out anew with each frame of it.
 */
function settled(run: Run): Recording | null {
  if (run.status === 'running') return null;
  return run.recording && run.recording.rowCount > 0 ? run.recording : null;
}

const isAtLeast = (a: ComparedLine, b: ComparedLine) => a.figure.share >= b.figure.share;
