import { isObject } from '../json/value.js';
import { either, quantity, record, ref, required, type Read } from '../fields/spec.js';
import { idEntry, nameEntry } from './common.js';

/** Holds a joint until it lets go; the joint is removed then. */
export interface Latch {
  id: string;
  joint: string;
  releasesAt: { time: number } | { station: string } | { force: number };
}

const releases = either(
  '{"time": "0.2 s"}, {"station": id} or {"force": "40 N"}',
  [
    record('a time', { time: required(quantity('time', 's', { atLeast: 0 }), 'When it lets go.') }),
    record('a station', { station: required(ref('station'), 'It lets go just after this instant.') }),
    record('a force', { force: required(quantity('force', 'N', { above: 0 }), 'Reaction at which it lets go.') }),
  ],
  (value) => (isObject(value) ? ['time', 'station', 'force'].findIndex((key) => Object.hasOwn(value, key)) : -1),
);

/** Field table of a latch. */
export const latchFields = record('a latch', {
  id: idEntry,
  name: nameEntry,
  joint: required(ref('joint'), 'The joint it holds, which is removed when it lets go.'),
  releasesAt: required(releases, 'When it lets go.'),
});

export type LatchDocument = Read<typeof latchFields>;
