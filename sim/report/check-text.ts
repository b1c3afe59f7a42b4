import type { AccountView } from '../ledger/index.js';
import type { CheckResult } from './result.js';
import { accountsText } from './text/account-text.js';
import { comparisonText } from './text/comparison-text.js';
import { criteriaText } from './text/criteria-text.js';
import { findingsText } from './text/findings-text.js';
import { handText } from './text/hand-text.js';
import { fit, spread } from './text/layout.js';
import { lossesText } from './text/losses-text.js';
import { time } from './text/quantities.js';
import { stationsText } from './text/stations-text.js';
import { verdictText } from './text/verdict-text.js';

const NARROWEST = 72;
const WIDEST = 100;

export interface TextOptions {
  /** Columns of the terminal; the text keeps between 72 and 100. */
  width?: number;
  /** Gravity and springs by their work (default), or by what they hold at the stations. */
  view?: AccountView;
}

/**
 * A result for a person at a terminal: stations, the account between each two, the same by hand, where it was lost,
 * criteria, findings, and the verdict last, where the eye ends. Plain characters without colour or escape codes.
 */
export function checkText(result: CheckResult, { width = 88, view = 'work' }: TextOptions = {}): string {
  const columns = Math.min(WIDEST, Math.max(NARROWEST, width));
  // Where the stepper refused and the auditor did not, the auditor's run is the one to show.
  const shown = { ...result, stepper: result.stepper ?? result.auditor };
  const lines = [
    ...headText(result, columns),
    ...stationsText(shown, columns),
    ...accountsText(shown, view, columns),
    ...handText(result, columns),
    ...lossesText(shown, columns),
    ...comparisonText(result, columns),
    ...criteriaText(result, columns),
    ...findingsText(result, columns),
    ...verdictText(result, columns),
  ];
  return `${lines.join('\n')}\n`;
}

function headText({ title, file, stepper }: CheckResult, width: number): string[] {
  const step = stepper?.step === undefined ? '' : `step ${time(stepper.step)}`;
  return ['═'.repeat(width), fit(title, width), spread(file, step, width).trimEnd(), '═'.repeat(width)];
}
