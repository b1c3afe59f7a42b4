import {
  flag,
  list,
  measure,
  number,
  optional,
  record,
  required,
  text,
  withDefault,
  type Read,
} from '../fields/spec.js';

/** How one value of the document varies. Sizes are in SI, of the dimension of what `at` points to. */
export type Variation = { at: string } & (
  | { kind: 'plusMinus'; half: number; relative: boolean }
  | { kind: 'uniform'; from: number; to: number }
  | { kind: 'normal'; sigma: number; relative: boolean }
  | { kind: 'values'; values: number[] }
);

/** A tolerance study. */
export interface Spread {
  vary: Variation[];
  trials: number;
  seed: number;
  /** Run all extremes too. */
  corners: boolean;
}

const variation = record(
  'a variation',
  {
    at: required(text, 'JSON pointer to the value that varies.'),
    plusMinus: optional(measure, 'Either way by so much, as a quantity or in per cent of its value.'),
    from: optional(measure, 'Evenly from here'),
    to: optional(measure, 'to here.'),
    normal: optional(
      record('a normal distribution', {
        sigma: required(measure, 'Standard deviation, as a quantity or in per cent of its value.'),
      }),
      'Normally distributed about its value.',
    ),
    values: optional(list(measure, 1), 'One of these.'),
  },
  { alternatives: [{ groups: [['plusMinus'], ['from', 'to'], ['normal'], ['values']] }] },
);

/** Field table of the tolerance study. */
export const spreadFields = record('a tolerance study', {
  vary: required(list(variation, 1), 'What varies.'),
  trials: withDefault(number({ atLeast: 1, whole: true }), 200, 'enough for a first look', 'Number of random trials.'),
  seed: withDefault(number({ atLeast: 0, whole: true }), 1, 'the same trials every time', 'Seed of the random trials.'),
  corners: withDefault(flag, false, 'random trials only', 'Run all extremes too.'),
});

export type SpreadDocument = Read<typeof spreadFields>;
