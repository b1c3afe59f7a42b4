import type { CommonSpan } from './common.js';
import { onlyFollows } from './document-check.js';
import type { AccountFigure, SpanComparison, StationComparison, StationFigure } from './figures.js';
import type { Compared } from './scales.js';

/** An account that parts, and the stations between which it does. */
export interface PartedAccount extends AccountFigure {
  from: string;
  to: string;
}

/** Where two runs part, and by what. */
export interface Parting {
  /** The first station at which a figure, or the work since the station before it, is not within tolerance. */
  station: string;
  /** The figure that is furthest off there; nothing where only accounts part. */
  figure: StationFigure | null;
  /** The account that parts most in the first span in which one does. */
  account: PartedAccount | null;
}

/** Differences in joules this near each other are one. */
const SAME = 1e-6;

/** A span with what was compared over it. */
export interface ComparedSpan {
  span: CommonSpan;
  comparison: SpanComparison;
}

/**
 * Find the first difference of two runs, and its account.
 *
 * Most parted is the account with the greatest difference in joules; but gravity and springs that are, in both runs, what
 * the document makes of where the bodies went only follow another cause, and come last.
 */
export function partingOf(
  compared: Compared,
  stations: readonly StationComparison[],
  spans: readonly ComparedSpan[],
): Parting | null {
  // Spans follow the stations one by one, and the one from first to last comes behind them.
  const stationIndex = stations.findIndex(({ figures }) => figures.some(({ within }) => !within));
  const spanIndex = spans.findIndex(({ comparison }) => partedIn(comparison).length > 0);
  const firsts = [stationIndex, spanIndex < 0 ? -1 : spanIndex + 1].filter((index) => index >= 0);
  if (firsts.length === 0) return null;
  const { station, figures } = stations[Math.min(...firsts, stations.length - 1)];
  return {
    station,
    figure: furthest(figures.filter(({ within }) => !within)),
    account: spanIndex < 0 ? null : mostParted(compared, spans[spanIndex]),
  };
}

function partedIn({ accounts }: SpanComparison): AccountFigure[] {
  return accounts.filter(({ within }) => !within);
}

function furthest(figures: readonly StationFigure[]): StationFigure | null {
  return figures.reduce<StationFigure | null>((most, each) => (most && most.share >= each.share ? most : each), null);
}

function mostParted(compared: Compared, { span, comparison }: ComparedSpan): PartedAccount {
  const ranked = partedIn(comparison).map((account) => ({ account, follows: onlyFollows(compared, account, span) }));
  const [{ account }] = ranked.sort(
    (a, b) => Number(a.follows) - Number(b.follows) || byDifference(a.account, b.account),
  );
  return { ...account, from: comparison.from, to: comparison.to };
}

/** Greatest difference in joules first; where one cause feeds another joule by joule, the one that is further off. */
function byDifference(a: AccountFigure, b: AccountFigure): number {
  const [first, second] = [Math.abs(a.difference), Math.abs(b.difference)];
  return Math.abs(first - second) <= SAME * first ? b.share - a.share : second - first;
}
