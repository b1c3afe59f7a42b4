import type { Recording } from '../../recording/index.js';
import { stationRows, type StationRow } from '../stations.js';
import type { Role } from './figures.js';

/** A station that both runs reached. */
export interface CommonStation {
  id: string;
  stepper: StationRow;
  auditor: StationRow;
}

/** A station that one run reached and the other did not. */
export interface OneSided {
  station: string;
  reachedBy: Role;
  /** [s] */
  time: number;
}

/** Two common stations between which accounts are compared. */
export interface CommonSpan {
  from: CommonStation;
  to: CommonStation;
}

/** The stations that both runs reached, by the auditor's time. */
export function commonStations(stepper: Recording, auditor: Recording): CommonStation[] {
  const first = new Map(stationRows(stepper).map((station) => [station.id, station]));
  return stationRows(auditor).flatMap((station) => {
    const other = first.get(station.id);
    return other ? [{ id: station.id, stepper: other, auditor: station }] : [];
  });
}

export function oneSidedStations(stepper: Recording, auditor: Recording): OneSided[] {
  const only = (run: Recording, other: Recording, reachedBy: Role): OneSided[] => {
    const there = new Set(stationRows(other).map(({ id }) => id));
    return stationRows(run)
      .filter(({ id }) => !there.has(id))
      .map(({ id, time }) => ({ station: id, reachedBy, time }));
  };
  return [...only(stepper, auditor, 'stepper'), ...only(auditor, stepper, 'auditor')].sort((a, b) => a.time - b.time);
}

/** Each pair of consecutive common stations, and first to last where there are more than two. */
export function commonSpans(stations: readonly CommonStation[]): CommonSpan[] {
  const spans = stations.slice(1).map((to, i) => ({ from: stations[i], to }));
  const [from, to] = [stations.at(0), stations.at(-1)];
  return from && to && stations.length > 2 ? [...spans, { from, to }] : spans;
}
