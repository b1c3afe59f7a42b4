import * as v from 'valibot';
import { comparison } from './comparison-result.js';
import { handCheckSchema } from './hand-schema.js';

const joules = (what: string) => v.pipe(v.number(), v.finite(), v.description(`${what} [J]`));
const si = (what: string) => v.pipe(v.number(), v.finite(), v.description(what));
const id = v.string();
const point = v.pipe(v.strictTuple([si('x [m]'), si('y [m]')]), v.description('On the sheet'));

const finding = v.strictObject({
  severity: v.picklist(['error', 'warning', 'note']),
  code: v.string(),
  text: v.string(),
  of: v.array(id),
  at: v.optional(si('When [s]')),
  pointer: v.optional(
    v.pipe(v.string(), v.description('JSON pointer into the mechanism file, where it is about the file')),
  ),
});

const bodyState = v.strictObject({
  x: si('Of the centre of mass [m]'),
  y: si('Of the centre of mass [m]'),
  angle: si('Unwrapped [rad]'),
  vx: si('Of the centre of mass [m/s]'),
  vy: si('Of the centre of mass [m/s]'),
  spin: si('[rad/s]'),
  speed: si('Of the centre of mass [m/s]'),
});

const energy = v.pipe(
  v.strictObject({
    kinetic: joules('½ m v² + ½ I ω²'),
    gravity: joules('Nil for a centre of mass at the origin of the sheet'),
    spring: joules('Stored in springs and compliant contacts that act on bodies inside only'),
    total: joules('The sum of the three'),
  }),
  v.description('Of the bodies inside the boundary'),
);

const reachedStation = v.strictObject({
  id,
  time: si('[s]'),
  reached: v.literal(true),
  bodies: v.record(id, bodyState),
  touch: v.optional(v.strictObject({ approachSpeed: si('[m/s]'), effectiveMass: si('[kg]') })),
  error: v.optional(
    v.pipe(
      v.strictObject({ time: si('[s]'), position: si('[m]'), speed: si('[m/s]') }),
      v.description('The auditor’s own estimate: the greatest of any body'),
    ),
  ),
  energy,
});
const missedStation = v.strictObject({ id, reached: v.literal(false) });

const place = v.strictObject({
  on: v.pipe(id, v.description('Track, body, joint or damper')),
  segment: v.optional(v.pipe(v.number(), v.integer(), v.description('Of the track, from 0'))),
  name: v.optional(v.pipe(v.string(), v.description('Of the segment'))),
  at: point,
  work: joules('Done there on the bodies inside'),
  heat: joules('Lost there'),
});

const account = v.picklist([
  'gravity',
  'spring',
  'friction',
  'reaction',
  'damper',
  'load',
  'drive',
  'joint-friction',
  'rolling-resistance',
  'impact',
  'rope',
  'numerical',
]);

const entry = v.strictObject({
  account,
  of: v.nullable(v.union([id, v.strictTuple([id, id])])),
  cause: v.optional(v.pipe(v.string(), v.description('Of the account numerical'))),
  kind: v.picklist(['stored', 'external', 'internal', 'impact', 'numerical']),
  work: joules('Done on the bodies inside'),
  byBody: v.record(id, joules('Done on this body')),
  heat: joules('Lost at the interface'),
  places: v.array(place),
  stored: v.optional(v.strictObject({ from: joules('At the first station'), to: joules('At the second') })),
  input: v.optional(joules('Taken in by a drive with an efficiency')),
});

const ledger = v.strictObject({
  from: id,
  to: id,
  entries: v.array(entry),
  kineticFrom: joules('Inside, at the first station'),
  kineticTo: joules('Inside, at the second'),
  kineticChange: joules('Σ work + unbooked'),
  turnover: joules('max(½ Σ|work|, greatest kinetic energy in the interval)'),
  unbooked: joules('What no account explains'),
});

const solverRun = v.strictObject({
  stations: v.array(v.variant('reached', [reachedStation, missedStation])),
  ledgers: v.array(ledger),
  step: v.optional(si('[s]')),
});

const part = v.strictObject({
  side: v.pipe(v.picklist(['gives', 'takes']), v.description('What is there, or what is wanted from it')),
  label: v.string(),
  amount: joules('Below nil where it works the other way round'),
});

const criterion = v.strictObject({
  id,
  name: v.optional(v.string()),
  measure: v.string(),
  unit: v.pipe(v.string(), v.description('SI unit of the value, its limits and its margin')),
  value: v.nullable(si('Measured, SI; for a station to be reached, when it was')),
  claimed: v.optional(si('What somebody claims the value to be')),
  margin: v.optional(si('How far the value is within its limit, SI; below nil outside')),
  marginShare: v.optional(si('The margin as a share of that limit')),
  at: v.optional(si('When the greatest value was [s]')),
  resolution: v.optional(si('How far the recorded rows leave the value open, SI')),
  atMost: v.optional(si('Limit, SI')),
  atLeast: v.optional(si('Limit, SI')),
  between: v.optional(v.strictTuple([si('Limit, SI'), si('Limit, SI')])),
  passes: v.pipe(v.nullable(v.boolean()), v.description('null: not evaluated, which counts as failed')),
  by: v.nullable(v.picklist(['stepper', 'auditor'])),
  parts: v.optional(v.pipe(v.array(part), v.description('What a ratio is made of'))),
  note: v.optional(v.string()),
});

/**
 * The result of a check, version 1, as one JSON object. All numbers are SI and finite. This schema is the source of the
 * types below and of the JSON Schema beside the examples.
 */
export const resultSchema = v.pipe(
  v.strictObject({
    format: v.literal('joulewright-result/1'),
    file: v.string(),
    title: v.string(),
    verdict: v.picklist(['agrees', 'differs', 'unaudited']),
    findings: v.array(finding),
    stepper: v.nullable(solverRun),
    auditor: v.nullable(solverRun),
    comparison: v.pipe(v.nullable(comparison), v.description('Of the two, where both ran')),
    handCheck: v.array(handCheckSchema),
    criteria: v.array(criterion),
  }),
  v.title('Joulewright result, version 1'),
);

export type CheckResult = v.InferOutput<typeof resultSchema>;
export type ResultFinding = v.InferOutput<typeof finding>;
export type ResultRun = v.InferOutput<typeof solverRun>;
export type ResultStation = ResultRun['stations'][number];
export type ReachedStation = v.InferOutput<typeof reachedStation>;
export type ResultLedger = v.InferOutput<typeof ledger>;
export type ResultPlace = v.InferOutput<typeof place>;
export type ResultCriterion = v.InferOutput<typeof criterion>;
