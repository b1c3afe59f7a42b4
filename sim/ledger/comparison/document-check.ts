import type { AccountSpec, Recording } from '../../recording/index.js';
import { bodyOf, valueAt } from '../../recording/index.js';
import { potentialAt } from '../potentials.js';
import { accountKey } from './between.js';
import type { CommonSpan } from './common.js';
import type { AccountFigure, Role } from './figures.js';
import { compareFigures, ROLES } from './figures.js';
import type { Compared } from './scales.js';

/** Something a run worked with that is not what the document says: where two runs differ, the cause and the culprit. */
export interface OffDocument {
  by: Role;
  what: 'mass' | 'inertia' | 'gravity' | 'spring';
  of: string;
  /** Mass [kg], inertia [kg m²], or work from station `from` to `to` [J]. */
  found: number;
  expected: number;
  from?: string;
  to?: string;
}

/**
 * Hold both runs to the document, each by itself: mass and inertia of its bodies, and the work of gravity and of springs
 * by the document's data at the places the run itself recorded. What is off there is no matter of steps or tolerances.
 */
export function offDocument(compared: Compared, spans: readonly CommonSpan[]): OffDocument[] {
  return ROLES.flatMap((by) => [...offBodies(compared, by), ...offStores(compared, by, spans)]);
}

/** Recorded masses are the document's to rounding, or they are others. */
const SAME = 1e-9;

function offBodies(compared: Compared, by: Role): OffDocument[] {
  return compared.mechanism.bodies.flatMap((body) => {
    const spec = bodyOf(compared[by], body.id);
    if (!spec) return [];
    const off = (['mass', 'inertia'] as const).filter(
      (what) => !compareFigures(spec[what], body[what], 0, SAME).within,
    );
    return off.map((what) => ({ by, what, of: body.id, found: spec[what], expected: body[what] }));
  });
}

/** One for each account, at the first span it is off in. */
function offStores(compared: Compared, by: Role, spans: readonly CommonSpan[]): OffDocument[] {
  return compared[by].layout.accounts.flatMap((account) => {
    const first = spans.find((span) => !followsDocument(compared, by, account, span));
    if (!first || typeof account.of !== 'string') return [];
    const { booked = 0, lawful = 0 } = worksOf(compared, by, account, first) ?? {};
    const what = account.account === 'gravity' ? 'gravity' : 'spring';
    return [{ by, what, of: account.of, found: booked, expected: lawful, from: first.from.id, to: first.to.id }];
  });
}

function followsDocument(compared: Compared, by: Role, account: AccountSpec, span: CommonSpan): boolean {
  const works = worksOf(compared, by, account, span);
  if (!works) return true;
  const { scales, least, tolerance } = compared;
  const floor = least * Math.max(least * scales.turnover, works.held);
  return compareFigures(works.booked, works.lawful, floor, tolerance).within;
}

/** Work on all its bodies as booked, as the document's law has it, and what it holds at most [J]. */
function worksOf({ mechanism, ...runs }: Compared, by: Role, account: AccountSpec, { from, to }: CommonSpan) {
  const recording = runs[by];
  const held = [from, to].map((station) => potentialAt(mechanism, recording, account, station[by].row));
  if (held[0] === undefined || held[1] === undefined) return undefined;
  const booked = workSoFar(recording, account, to[by].row) - workSoFar(recording, account, from[by].row);
  return { booked, lawful: held[0] - held[1], held: Math.max(...held.map((value) => Math.abs(value ?? 0))) };
}

function workSoFar(recording: Recording, { columns }: AccountSpec, row: number): number {
  return columns.work.reduce((sum, column) => sum + valueAt(recording, row, column), 0);
}

/** Whether both runs' work of an account is what the document gives it: then it only follows from where they went. */
export function onlyFollows(compared: Compared, { account, of }: AccountFigure, span: CommonSpan): boolean {
  return ROLES.every((by) => {
    const spec = compared[by].layout.accounts.find((each) => accountKey(each) === accountKey({ account, of }));
    const isKnown = spec && potentialAt(compared.mechanism, compared[by], spec, 0) !== undefined;
    return isKnown === true && followsDocument(compared, by, spec, span);
  });
}
