import { describe, expect, it } from 'vitest';
import { consecutiveLedgers, stationRows } from '../../../sim/ledger/index.js';
import type { Recording, RunEvent } from '../../../sim/recording/index.js';
import { twoCrates } from './two-crates.js';

function withStations(...events: RunEvent[]): Recording {
  return { ...twoCrates(), events };
}
const station = (id: string, row: number): RunEvent => ({ kind: 'station', station: id, time: row, row });

describe('stationRows', () => {
  it('lists the stations by the time reached, with the touch where one falls on an impact', () => {
    const touch = { approachSpeed: 2, effectiveMass: 1.5 };
    const run = withStations(
      { kind: 'touch', pair: ['lower', 'chute'], time: 1, row: 1, at: [0, 0], ...touch },
      { kind: 'station', station: 'hit', time: 1, row: 1, touch },
      station('start', 0),
    );
    expect(stationRows(run)).toEqual([
      { id: 'start', row: 0, time: 0 },
      { id: 'hit', row: 1, time: 1, touch },
    ]);
  });
});

describe('consecutiveLedgers', () => {
  const spans = (run: Recording): string[] => consecutiveLedgers(run, ['upper']).map(({ from, to }) => `${from}→${to}`);

  it('books each pair of consecutive stations, and first to last where there are more than two', () => {
    expect(spans(withStations(station('1', 0), station('2', 1), station('3', 2)))).toEqual(['1→2', '2→3', '1→3']);
    expect(spans(withStations(station('1', 0), station('2', 1)))).toEqual(['1→2']);
  });

  it('books nothing where fewer than two stations were reached', () => {
    expect(spans(withStations(station('1', 0)))).toEqual([]);
    expect(spans(withStations())).toEqual([]);
  });
});
