import * as v from 'valibot';
import type { Comparison } from '../ledger/index.js';

const number = (what: string) => v.pipe(v.number(), v.finite(), v.description(what));
const id = v.string();
const role = v.picklist(['stepper', 'auditor']);
const each = <Value extends v.GenericSchema>(value: Value) => v.strictObject({ stepper: value, auditor: value });

const figureEntries = {
  stepper: v.nullable(number('SI')),
  auditor: v.nullable(number('SI')),
  difference: number('stepper − auditor, SI'),
  share: number('Of the greater, and no less than 1e-3 of the scale'),
  within: v.boolean(),
};

const stationFigure = v.strictObject({
  quantity: v.picklist(['time', 'x', 'y', 'angle', 'speed', 'spin', 'approachSpeed', 'effectiveMass']),
  of: v.pipe(v.string(), v.description('The body, or a pair as first/second; empty for the time')),
  ...figureEntries,
});

const accountEntries = {
  account: v.string(),
  of: v.nullable(v.union([id, v.strictTuple([id, id])])),
  ...figureEntries,
};

const parting = v.strictObject({
  station: v.pipe(id, v.description('The first at which the runs part')),
  figure: v.nullable(stationFigure),
  account: v.pipe(
    v.nullable(v.strictObject({ ...accountEntries, from: id, to: id })),
    v.description('The account that parts most'),
  ),
});

/** The runs of the two solvers beside each other, as a result has them. */
export const comparison = v.strictObject({
  tolerance: number('Greatest share that counts as agreement'),
  stations: v.array(v.strictObject({ station: id, figures: v.array(stationFigure) })),
  spans: v.array(v.strictObject({ from: id, to: id, accounts: v.array(v.strictObject(accountEntries)) })),
  oneSided: v.pipe(
    v.array(v.strictObject({ station: id, reachedBy: role, time: number('[s]') })),
    v.description('Stations that one run alone reached'),
  ),
  closed: v.pipe(each(v.boolean()), v.description('Whether its accounts close')),
  numerical: v.pipe(
    each(number('Share of the turnover')),
    v.description('What its method itself made or lost, at worst'),
  ),
  parting: v.nullable(parting),
});

export type ResultComparison = v.InferOutput<typeof comparison>;
export type ResultFigure = v.InferOutput<typeof stationFigure>;
export type ResultAccount = ResultComparison['spans'][number]['accounts'][number];

/** What of a comparison goes into the result; verdict and findings have places of their own there. */
export function comparisonResult(found: Comparison): ResultComparison {
  const { tolerance, stations, spans, oneSided, closed, numerical, parting: first } = found;
  return { tolerance, stations, spans, oneSided, closed, numerical, parting: first };
}
