import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import type { StationWatch } from '../recording/station-watch.js';

/** Times that the document fixes and a step must not run over, in units of `time` [s], ascending. */
export function momentsOf(mechanism: Mechanism, stations: StationWatch, time: number): number[] {
  const { loads, drives, latches, run, tracks } = mechanism;
  const of = (moment: Moment | undefined): number[] => (moment && 'time' in moment ? [moment.time] : []);
  const seconds = [
    ...stations.times(),
    ...[...loads, ...drives].flatMap(({ from, until }) => [...of(from), ...of(until)]),
    ...drives.flatMap(({ law }) =>
      law.kind === 'effortCurve' && law.over === 'time' ? law.curve.map(([x]) => x) : [],
    ),
    ...drives.flatMap(({ law }) =>
      law.kind === 'speed' && typeof law.value !== 'number' ? law.value.map(([x]) => x) : [],
    ),
    ...tracks.flatMap(({ surfaceSpeed }) => (typeof surfaceSpeed === 'number' ? [] : surfaceSpeed.map(([x]) => x))),
    ...latches.flatMap(({ releasesAt }) => ('time' in releasesAt ? [releasesAt.time] : [])),
    ...('time' in run.until ? [run.until.time] : []),
    run.atMost,
  ];
  return seconds.map((moment) => moment / time).sort((a, b) => a - b);
}

/** Whether a moment has come at a time [s]. */
export function hasCome(moment: Moment, seconds: number, stations: StationWatch): boolean {
  if ('time' in moment) return seconds >= moment.time * (1 - 1e-12) - 1e-15;
  return stations.isReached(moment.station);
}
