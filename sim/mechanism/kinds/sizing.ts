import { choice, measure, record, ref, required, text, withDefault, type Read } from '../fields/spec.js';

/** What to solve for. `from` and `to` are in SI, of the dimension of what `solve` points to. */
export interface Sizing {
  solve: string;
  from: number;
  to: number;
  for: string;
  with: 'nominal' | 'worst';
}

/** Field table of sizing. */
export const sizingFields = record('a sizing', {
  solve: required(text, 'JSON pointer to the value to be found.'),
  from: required(measure, 'Search from here'),
  to: required(measure, 'to here.'),
  for: required(ref('criterion'), 'The criterion that shall just pass.'),
  with: withDefault(
    choice('nominal', 'worst'),
    'nominal',
    'with all values as drawn',
    'With nominal values, or with the worst of the tolerance study.',
  ),
});

export type SizingDocument = Read<typeof sizingFields>;
