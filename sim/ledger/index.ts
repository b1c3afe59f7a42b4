export { bookLedger } from './book.js';
export { CLOSURE_LIMIT, NUMERICAL_LIMIT, closes, ledgerFindings, numericalShare } from './findings.js';
export { entryKind } from './kind.js';
export type * from './ledger.js';
export { consecutiveLedgers, stationRows, stationSpans } from './stations.js';
export type { StationRow } from './stations.js';
