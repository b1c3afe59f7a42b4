export type * from './ledger.js';
export type { AccountLine, AccountView } from './account-lines.js';
export type { AccountPage, PageLine, PageOptions, PrintScale } from './account-page.js';
export type { StationRow } from './stations.js';
export { CLOSURE_LIMIT, NUMERICAL_LIMIT, closes, ledgerFindings, numericalShare } from './findings.js';
export { accountPage, scaleOf } from './account-page.js';
export { asStored, asWork, splitBySegment } from './account-lines.js';
export { bookLedger, kineticEnergy } from './book.js';
export { consecutiveLedgers, stationRows, stationSpans } from './stations.js';
export { entryKind } from './kind.js';
export { ACCOUNT_NAMES, CAUSE_NAMES, lineLabel, ofLabel } from './names.js';
export { AGREEMENT, compareRuns, mayBeSensitive } from './comparison.js';
export type { Comparison, ComparisonOptions, Verdict } from './comparison.js';
export type {
  AccountFigure,
  Figure,
  Quantity,
  SpanComparison,
  StationComparison,
  StationFigure,
} from './comparison/figures.js';
export { compareFigures } from './comparison/figures.js';
export { nudge, sensitivityOf } from './comparison/sensitivity.js';
export type { Sensitivity } from './comparison/sensitivity.js';
export { QUANTITIES } from './comparison/words.js';
export {
  handCheck,
  plainText,
  speedByHand,
  type Expression,
  type HandCheck,
  type Operator,
  type Token,
} from './hand-check/index.js';
