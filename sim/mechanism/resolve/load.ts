import type { Place } from '../../core/problem.js';
import type { Reading } from '../fields/reading.js';
import type { Load, LoadDocument } from '../kinds/load.js';
import { resolveSpan } from './moment.js';

/** A load in SI. */
export function resolveLoad(load: LoadDocument, place: Place, reading: Reading): Load {
  const { id } = load;
  const span = resolveSpan(load, place, reading);
  if ('torque' in load) return { id, kind: 'torque', on: load.on, torque: load.torque, ...span };
  return { id, kind: 'force', on: load.on, force: load.force, follows: load.follows, ...span };
}
