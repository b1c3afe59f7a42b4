import { compensatedSum } from '../../core/sum.js';
import type { AccountSpec } from '../../recording/index.js';
import type { Entry, Ledger } from '../../ledger/index.js';
import { labelOf } from '../accounts.js';
import { figure, listed, percent } from '../figure.js';
import type { CriterionOf, MeasureKind, Measurement, Measured } from '../measurement.js';
import type { CriterionPart } from '../result.js';
import type { Rows, RunView } from '../run-view.js';
import { sourcesBeside } from '../sources.js';
import { inputOf, ofDrive, outputOf } from './drive-output.js';

/**
 * The largest efficiency that the ledger allows a drive, which refutes a claim above it:
 *
 *     (output − heat that nothing else paid for) / input
 *
 * Everything the drive put out counts as useful, whatever it did, but for heat: friction, damping and impacts turn energy
 * into it for good. The boundary is around all bodies. Of that heat, as much as stores and other sources gave is theirs, in favour of the claim. It is never
 * above 1: whoever measures more has counted what a store gave up, and the finding says which.
 */
export const claimedEfficiency: MeasureKind<'claimedEfficiency'> = {
  unit: '',
  take: (criterion, view) =>
    view.over(criterion, (rows) => ofDrive(view, criterion.of, (drive) => allowed(criterion, view, rows, drive))),
};

function allowed(
  { of, value: claimed }: CriterionOf<'claimedEfficiency'>,
  view: RunView,
  rows: Rows,
  drive: AccountSpec,
): Measurement {
  const [input, output] = [inputOf(view, drive, rows), outputOf(view, drive, rows)];
  if (input <= 0) return { reason: `the drive ${of} takes in no energy between its two ends` };
  const ledger = view.ledger(
    rows,
    view.recording.layout.bodies.map(({ id }) => id),
  );
  const own = ledger.entries.filter((entry) => entry.account === 'drive' && entry.of === of);
  const sources = sourcesBeside(ledger, own);
  const losses = lossesOf(ledger);
  const unpaid = sum(losses) - sum(sources);
  const share = Math.min(Math.max(0, unpaid), Math.max(0, output));
  const value = Math.min(1, Math.max(0, output - share) / input);
  const ownLoss: CriterionPart = { side: 'takes', label: `Loss in ${of}`, amount: input - output };
  const parts: CriterionPart[] = [
    { side: 'gives', label: `Input of ${of}`, amount: input },
    ...sources,
    ownLoss,
    ...losses,
  ];
  const excess = (claimed - value) * input;
  return {
    value,
    claimed,
    parts,
    ...(excess > 1e-9 * input ? refuted(of, claimed, value, excess, sources, parts) : {}),
  };
}

const sum = (parts: readonly CriterionPart[]): number => compensatedSum(parts.map(({ amount }) => amount));

/** What was turned into heat, as the bodies see it. */
function lossesOf({ entries }: Ledger): CriterionPart[] {
  return entries.filter(isLoss).map((entry) => ({ side: 'takes', label: labelOf(entry), amount: -entry.work }));
}

/** A belt's friction that carries bodies along gives them energy: then it is a source. */
const isLoss = ({ account, work }: Entry): boolean =>
  work < 0 && ['friction', 'joint-friction', 'rolling-resistance', 'damper', 'impact'].includes(account);

function refuted(
  of: string,
  claimed: number,
  value: number,
  excess: number,
  sources: readonly CriterionPart[],
  parts: readonly CriterionPart[],
): Pick<Measured, 'warning'> {
  const head = `Claimed for ${of}: ${percent(claimed)}. The ledger allows ${percent(value)} at the most: `;
  return {
    warning: { code: 'claim-refuted', text: `${head}${claimed > 1 ? forgets(excess, sources) : losesIn(parts)}` },
  };
}

function forgets(excess: number, sources: readonly CriterionPart[]): string {
  if (sources.length === 0) return `no store gave up energy, and the ${figure(excess)} J too many came from nowhere.`;
  const gave = listed(sources.map(({ label, amount }) => `${label} gave up ${figure(amount)} J`));
  const missing = excess - sum(sources);
  return `it forgets that ${gave}${missing > 0 ? `; even so, ${figure(missing)} J came from nowhere` : ''}.`;
}

function losesIn(parts: readonly CriterionPart[]): string {
  const losses = parts.filter(({ side, amount }) => side === 'takes' && amount > 0);
  return `it forgets ${listed(losses.map(({ label, amount }) => `${label} (${figure(amount)} J)`))}.`;
}
