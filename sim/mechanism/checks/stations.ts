import type { Place } from '../../core/problem.js';
import { formatQuantity } from '../units/format.js';
import { placeOf, type Checked } from './checked.js';

/** Stations that can never be reached: of a pair that nothing lets touch, or after the run has ended. */
export function checkStations(checked: Checked): void {
  const { mechanism, draft, reading } = checked;
  for (const { id, when } of mechanism.stations) {
    if ('pair' in when) checkListed(when.pair, placeOf(checked, id, 'when', when.kind), checked);
    if (when.kind !== 'time' || !draft.run || when.time <= mechanism.run.atMost) continue;
    const found = `a station at ${formatQuantity(when.time, 'time')}`;
    const accepted = `a time within the run, which ends at ${formatQuantity(mechanism.run.atMost, 'time')}`;
    reading.report('after-the-run', placeOf(checked, id, 'when', 'time'), { found, accepted });
  }
}

/** A station or criterion about a pair that nothing lets touch will never be. */
export function checkListed(pair: readonly [string, string], place: Place, checked: Checked): void {
  const { mechanism, placed, paths, draft, reading } = checked;
  const [a, b] = pair;
  // Contacts that are wrong themselves, or of elements that are, might have listed it.
  const isKnown = pair.every((id) => paths.has(id) || placed.some((body) => body.id === id));
  if (!isKnown || draft.contacts?.some(({ value }) => value === undefined)) return;
  if (mechanism.contacts.some(({ between }) => between.includes(a) && between.includes(b))) return;
  const at = { ...place, of: [...new Set([...place.of, ...pair])] };
  reading.report('no-contact', at, { found: pair.join(' and '), accepted: 'a pair that contacts lets touch' });
}
