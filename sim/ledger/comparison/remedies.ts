import { isSamePair } from '../../recording/station-watch.js';
import type { Recording, RunEvent } from '../../recording/index.js';
import type { CommonStation } from './common.js';
import type { Parting } from './parting.js';
import type { Compared } from './scales.js';

/** What to do about a difference. */
export type Remedy =
  | { do: 'smaller-step'; /** [s] */ step: number; /** Of the run [s]. */ now: number }
  | { do: 'compliant-stop'; pair: [string, string] }
  | ({ do: 'contact-order' } & Together);

/** Pairs that strike at one instant. */
export interface Together {
  pairs: [string, string][];
  /** [s] */
  at: number;
}

/** The next step to try, as a share of the last: aimed at half of what is allowed, and no further than a tenth. */
const [LEAST_STEP, GREATEST_STEP] = [0.1, 0.5];

/** Impacts this near each other, as a share of the run's duration, are at one instant. */
const INSTANT = 1e-6;

/**
 * What to do where two runs part, or where the stepper's method itself makes or loses too much, though both runs have
 * what the document says.
 *
 * @param found.numerical what the stepper's method made or lost, in units of its limit
 * @param found.together the first impacts at one instant
 */
export function remediesFor(
  compared: Compared,
  stations: readonly CommonStation[],
  parting: Parting | null,
  { numerical, together }: { numerical: number; together: Together | null },
): Remedy[] {
  const worst = Math.max(parting?.figure?.share ?? 0, parting?.account?.share ?? 0) / compared.tolerance;
  const step = smallerStep(compared.stepper, Math.max(worst, numerical));
  if (!parting) return step;
  const until = stations.find(({ id }) => id === parting.station)?.auditor.time ?? Infinity;
  const order: Remedy[] = together && together.at <= until ? [{ do: 'contact-order', ...together }] : [];
  return [...step, ...compliantStop(compared, parting), ...order];
}

/** @param excess how many times what is allowed; the error with contacts is of first order in the step */
function smallerStep({ step }: Recording, excess: number): Remedy[] {
  if (step === undefined || excess <= 1) return [];
  const factor = Math.min(GREATEST_STEP, Math.max(LEAST_STEP, GREATEST_STEP / excess));
  return [{ do: 'smaller-step', step: roundDown(factor * step), now: step }];
}

/** To one digit of 1, 2 or 5. */
function roundDown(value: number): number {
  const decade = 10 ** Math.floor(Math.log10(value));
  const digit = [5, 2, 1].find((each) => each * decade <= value * (1 + 1e-9)) ?? 1;
  return Number((digit * decade).toPrecision(1));
}

/** How bodies rebound from a rigid stop hangs on the instant of each impact; a compliant one spreads it over a time. */
function compliantStop({ mechanism }: Compared, { account }: Parting): Remedy[] {
  if (account?.account !== 'impact' || !Array.isArray(account.of)) return [];
  const { of } = account;
  const pair = mechanism.contacts.find(({ between }) => isSamePair(between, of));
  return pair && !pair.compliant ? [{ do: 'compliant-stop', pair: pair.between }] : [];
}

/** The first instant at which several pairs strike at once, in either run. */
export function impactsTogether({ stepper, auditor, scales }: Compared): Together | null {
  const within = INSTANT * scales.duration;
  const first = [auditor, stepper].map((run) => firstTogether(run.events.filter(isTouch), within));
  return first[0] ?? first[1];
}

/** @param touches in order of time */
function firstTogether(touches: readonly Touch[], within: number): Together | null {
  for (const [i, { time, pair }] of touches.entries()) {
    const pairs = [pair];
    for (let j = i + 1; j < touches.length && touches[j].time - time <= within; j += 1) pairs.push(touches[j].pair);
    const different = distinct(pairs);
    if (different.length > 1) return { pairs: different, at: time };
  }
  return null;
}

const isTouch = (event: RunEvent): event is Touch => event.kind === 'touch';

type Touch = RunEvent & { kind: 'touch' };

function distinct(pairs: [string, string][]): [string, string][] {
  return pairs.filter((pair, i) => pairs.findIndex((other) => isSamePair(pair, other)) === i);
}
