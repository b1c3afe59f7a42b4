import { handCheck, type HandCheck } from '../../../../sim/ledger/index.js';
import { run, type Parts, type Run } from '../../../support/run.js';

/** A run of a document and its hand checks. */
export interface Checked {
  ran: Run;
  checks: HandCheck[];
}

export function byHand(parts: Parts): Checked {
  const ran = run(parts);
  return { ran, checks: handCheck(ran.mechanism, ran.recording) };
}

/** The check of a body between two stations. */
export function checkOf({ checks }: { checks: readonly HandCheck[] }, of: string, from: string, to: string): HandCheck {
  const found = checks.find((check) => check.of === of && check.from === from && check.to === to);
  if (!found) throw new Error(`no hand check of ${of} from ${from} to ${to}`);
  return found;
}

/** Its speed; a check that gives none fails the test with its reason. */
export function speedOf(check: HandCheck): number {
  if (check.speed === null) throw new Error(check.reason);
  return check.speed;
}
