import * as v from 'valibot';
import type { Token } from '../ledger/index.js';

const si = (what: string) => v.pipe(v.number(), v.finite(), v.description(what));
const operators = ['=', '+', '−', '×', '/', '(', ')', ',', 'cos'] as const;

/** One piece of a typeset line; fractions and roots hold further ones. */
const token: v.GenericSchema<Token> = v.variant('kind', [
  v.strictObject({
    kind: v.literal('symbol'),
    name: v.string(),
    sub: v.exactOptional(v.string()),
    power: v.exactOptional(v.number()),
    of: v.exactOptional(v.array(v.string())),
  }),
  v.strictObject({ kind: v.literal('number'), text: v.string(), unit: v.exactOptional(v.string()) }),
  v.strictObject({ kind: v.literal('operator'), text: v.picklist(operators) }),
  v.strictObject({ kind: v.literal('words'), text: v.string() }),
  v.strictObject({
    kind: v.literal('fraction'),
    over: v.array(v.lazy(() => token)),
    under: v.array(v.lazy(() => token)),
  }),
  v.strictObject({ kind: v.literal('root'), of: v.array(v.lazy(() => token)) }),
]);

/** A hand check as the result has it. */
export const handCheckSchema = v.strictObject({
  from: v.string(),
  to: v.string(),
  of: v.string(),
  with: v.pipe(v.array(v.string()), v.description('Bodies that move with it as one when it arrives')),
  equation: v.pipe(v.string(), v.description('In symbols, plain characters; empty where there is none')),
  lines: v.pipe(v.array(v.string()), v.description('Symbols, their values, the sum in numbers, the answer')),
  typeset: v.pipe(v.array(v.array(token)), v.description('The same lines, for typesetting')),
  speed: v.pipe(v.nullable(si('[m/s]')), v.description('null where no hand sum can be made')),
  spin: v.optional(si('Of a body on a fixed pin, without sign [rad/s]')),
  left: v.optional(si('What the sum leaves where the body is at rest by the station itself [J]')),
  reason: v.optional(v.pipe(v.string(), v.description('Which assumption of a hand sum fails'))),
  difference: v.optional(si('This speed less the run’s [m/s]')),
  spinDifference: v.optional(si('This spin less the run’s [rad/s]')),
});
