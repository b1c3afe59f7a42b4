import type { Place } from '../../core/problem.js';
import { distance, unit } from '../../core/vec.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Station, StationDocument, StationWhen } from '../kinds/station.js';

/** A station in SI. */
export function resolveStation(station: StationDocument, place: Place, reading: Reading): Station | undefined {
  const when = resolveWhen(station.when, inside(place, 'when'), reading);
  return when && { id: station.id, when, ...(station.after !== undefined && { after: station.after }) };
}

function resolveWhen(when: StationDocument['when'], place: Place, reading: Reading): StationWhen | undefined {
  if ('start' in when || 'end' in when) return endOfRun(when, place, reading);
  if ('time' in when) return { kind: 'time', time: when.time };
  if ('rests' in when) return { kind: 'rests', of: when.rests };
  const { count } = when;
  if ('touch' in when) return { kind: 'touch', pair: when.touch, count };
  if ('parts' in when) return { kind: 'parts', pair: when.parts, count };
  if ('sticks' in when) return { kind: 'sticks', pair: when.sticks, count };
  if ('slips' in when) return { kind: 'slips', pair: when.slips, count };
  if ('turns' in when) return { kind: 'turns', of: when.turns.of, along: unit(when.turns.along), count };
  if ('angle' in when) return { kind: 'angle', of: when.angle.of, passes: when.angle.passes, count };
  const { point, line } = when.crosses;
  if (distance(line[0], line[1]) > 0) return { kind: 'crosses', point, line, count };
  const values = { found: 'a line of no length', accepted: 'two points apart' };
  reading.report('no-line', inside(inside(place, 'crosses'), 'line'), values);
  return undefined;
}

function endOfRun(
  when: { start: boolean } | { end: boolean },
  place: Place,
  reading: Reading,
): StationWhen | undefined {
  const kind = 'start' in when ? 'start' : 'end';
  if ('start' in when ? when.start : when.end) return { kind };
  reading.report('wrong-choice', inside(place, kind), { found: 'false', accepted: 'true, or another form of when' });
  return undefined;
}

/** Stations that wait for each other in a ring are never reached. */
export function checkOrder(
  stations: readonly Pick<Station, 'id' | 'after'>[],
  places: ReadonlyMap<string, Place>,
  reading: Reading,
): void {
  const after = new Map(stations.map((station) => [station.id, station.after]));
  const told = new Set<string>();
  for (const { id } of stations) {
    const ring = ringFrom(id, after);
    if (!ring || ring.some((each) => told.has(each))) continue;
    ring.forEach((each) => told.add(each));
    const place = { pointer: `${places.get(id)?.pointer ?? ''}/after`, of: ring };
    const found = [...ring, id].join(' after ');
    reading.report('station-ring', place, { found, accepted: 'stations that begin with one that waits for none' });
  }
}

/** The stations a chain of `after` passes before it comes back to `id`; undefined where it does not. */
function ringFrom(id: string, after: ReadonlyMap<string, string | undefined>): string[] | undefined {
  const ring = [id];
  for (let next = after.get(id); next !== undefined && ring.length <= after.size; next = after.get(next)) {
    if (next === id) return ring;
    ring.push(next);
  }
  return undefined;
}
