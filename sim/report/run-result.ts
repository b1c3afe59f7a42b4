import { CompensatedSum } from '../core/sum.js';
import type { Vec } from '../core/vec.js';
import { entryKind, kineticEnergy, stationRows } from '../ledger/index.js';
import type { Ledger, StationRow } from '../ledger/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { BodyState, Recording } from '../recording/index.js';
import { bodyAtRow, storedAtRow } from '../recording/index.js';
import type { BookedRun } from './booked-run.js';
import type { ReachedStation, ResultLedger, ResultRun, ResultStation } from './result.js';

/** One solver's part of the result: its stations, its ledgers, its step. */
export function runResult(mechanism: Mechanism, { recording, ledgers }: BookedRun): ResultRun {
  return {
    stations: stationsOf(mechanism, recording),
    ledgers: ledgers.map((ledger) => ledgerResult(mechanism, ledger)),
    ...(recording.step === undefined ? {} : { step: recording.step }),
  };
}

/** The stations reached, by time, and then those that were not, in the order of the document. */
function stationsOf(mechanism: Mechanism, recording: Recording): ResultStation[] {
  const reached = stationRows(recording);
  const ids = new Set(reached.map(({ id }) => id));
  const missed = mechanism.stations.filter(({ id }) => !ids.has(id));
  return [
    ...reached.map((station) => reachedStation(mechanism, recording, station)),
    ...missed.map(({ id }): ResultStation => ({ id, reached: false })),
  ];
}

function reachedStation(
  mechanism: Mechanism,
  recording: Recording,
  { id, time, row, touch }: StationRow,
): ReachedStation {
  const bodies = recording.layout.bodies.map((body) => [body.id, withSpeed(bodyAtRow(recording, body, row))] as const);
  return {
    id,
    time,
    reached: true,
    bodies: Object.fromEntries(bodies),
    ...(touch ? { touch } : {}),
    ...errorAt(recording, id),
    energy: energyAt(mechanism, recording, row),
  };
}

/** What the solver itself says that its figures may be off by there. */
function errorAt({ errors }: Recording, id: string): Pick<ReachedStation, 'error'> {
  const found = errors?.find(({ station }) => station === id);
  if (!found) return {};
  const { time, position, speed } = found;
  return { error: { time, position, speed } };
}

function withSpeed(state: BodyState): BodyState & { speed: number } {
  return { ...state, speed: Math.hypot(state.vx, state.vy) };
}

/**
 * Energy inside the boundary at a row [J]. Height is counted from the origin of the sheet: a body's energy is −m g·r of
 * its centre of mass. A spring counts where it acts on bodies inside only, as its entry's kind `stored` says.
 */
function energyAt({ system, gravity }: Mechanism, recording: Recording, row: number): ReachedStation['energy'] {
  const inside = new Set(system);
  const bodies = recording.layout.bodies.filter(({ id }) => inside.has(id));
  const kinetic = kineticEnergy(recording, bodies, row);
  const height = new CompensatedSum();
  for (const body of bodies) height.add(-body.mass * along(gravity, bodyAtRow(recording, body, row)));
  const spring = new CompensatedSum();
  for (const account of recording.layout.accounts) {
    if (account.account !== 'spring' || entryKind(account, inside) !== 'stored') continue;
    spring.add(storedAtRow(recording, account, row) ?? 0);
  }
  // Adding nil makes −0 of no gravity a plain 0.
  const parts = { kinetic, gravity: height.value + 0, spring: spring.value };
  return { ...parts, total: parts.kinetic + parts.gravity + parts.spring };
}

function along([gx, gy]: Vec, { x, y }: BodyState): number {
  return gx * x + gy * y;
}

/** A ledger as the result has it, with the names of track segments beside their numbers. */
function ledgerResult(mechanism: Mechanism, ledger: Ledger): ResultLedger {
  const { resolution: _resolution, findings: _findings, ...figures } = ledger;
  const entries = figures.entries.map((entry) => ({
    ...entry,
    places: entry.places.map((place) => {
      const name = segmentName(mechanism, place.on, place.segment);
      return { ...place, at: [...place.at] as [number, number], ...(name === undefined ? {} : { name }) };
    }),
  }));
  return { ...figures, entries };
}

function segmentName({ tracks }: Mechanism, on: string, segment: number | undefined): string | undefined {
  if (segment === undefined) return undefined;
  return tracks.find(({ id }) => id === on)?.segments[segment]?.name;
}
