import type { Vec } from '../../core/vec.js';
import {
  buildTrack,
  nearestOnRun,
  newFoot,
  pointAt,
  type Piece,
  type SmoothRun,
  type TrackPath,
} from '../../geometry/index.js';
import type { Track } from '../../mechanism/kinds/track.js';
import type { Mechanism } from '../../mechanism/model.js';
import type { AccountName, AccountSpec, ContactSpec, Recording } from '../../recording/recording.js';
import { contactOf, valueAt } from '../../recording/reader.js';

/** Joules lost along one segment of a track by one pair, between two rows of a run. */
export interface LossBand {
  account: AccountName;
  pair: [string, string];
  track: string;
  segment: number;
  name: string | undefined;
  joules: number;
  /** Along the track's surface, in order: sheet point [m], unit vector into the solid, and loss there [J/m]. */
  places: { at: Vec; into: Vec; density: number }[];
}

/** How finely a track is divided [share of the mechanism's extent]. */
const cell = 1 / 80;

/**
 * Where on the tracks friction and rolling resistance took energy between two rows: the growth of each pair's heat, laid
 * down where the pair touched, then spread evenly over cells of the track.
 */
export function lossMap(mechanism: Mechanism, recording: Recording, [from, to]: [number, number]): LossBand[] {
  const lossy = recording.layout.accounts.filter(
    ({ account, columns }) =>
      (account === 'friction' || account === 'rolling-resistance') && columns.heat !== undefined,
  );
  return lossy.flatMap((account) => {
    if (!Array.isArray(account.of)) return [];
    const contact = contactOf(recording, account.of);
    const track = mechanism.tracks.find(({ id }) => account.of?.includes(id));
    if (!contact || !track) return [];
    const path = buildTrack(track);
    const tally = new Tally(path, mechanism.extent * cell);
    for (let row = from + 1; row <= to; row++) addLoss(tally, recording, account, contact, row);
    const { of: pair, account: cause } = account;
    return tally.bands(track).map((band) => ({ ...band, pair, account: cause }));
  });
}

function addLoss(tally: Tally, recording: Recording, account: AccountSpec, contact: ContactSpec, row: number): void {
  const { heat } = account.columns;
  const joules = heat === undefined ? 0 : valueAt(recording, row, heat) - valueAt(recording, row - 1, heat);
  if (joules === 0) return;
  const place = (at: number): Vec => [
    valueAt(recording, at, contact.columns.x),
    valueAt(recording, at, contact.columns.y),
  ];
  const touches = (at: number) => valueAt(recording, at, contact.columns.points) > 0;
  const end = place(row);
  tally.add(touches(row - 1) ? place(row - 1) : end, end, joules);
}

/** A stretch of a run within one drawn segment: what was lost in it, and over which part of it. */
interface Cell {
  segment: number;
  from: number;
  to: number;
  joules: number;
  /** Arc lengths between which it was passed; low > high while it was not. */
  low: number;
  high: number;
}

/** Heat by cells of a track's runs. */
class Tally {
  private readonly cells: Cell[][];
  private readonly foot = newFoot();

  constructor(
    private readonly path: TrackPath,
    size: number,
  ) {
    this.cells = path.runs.map((run) => run.pieces.flatMap((piece) => cellsOf(piece, size)));
  }

  /** Spreads joules evenly along the track between two contact places; on two runs, all goes to the second. */
  add(start: Vec, end: Vec, joules: number): void {
    const b = this.nearest(end);
    const a = this.nearest(start);
    const from = a.run === b.run ? a.s : b.s;
    const [low, high] = [Math.min(from, b.s), Math.max(from, b.s)];
    const cells = this.cells[b.run];
    if (high - low < 1e-12) {
      const cell = cells.find(({ to }) => to >= b.s) ?? cells[cells.length - 1];
      cell.joules += joules;
      return;
    }
    for (const cell of cells) {
      const [first, last] = [Math.max(low, cell.from), Math.min(high, cell.to)];
      if (last <= first) continue;
      cell.joules += (joules * (last - first)) / (high - low);
      cell.low = Math.min(cell.low, first);
      cell.high = Math.max(cell.high, last);
    }
  }

  private nearest([x, y]: Vec): { run: number; s: number } {
    let best = { run: 0, s: 0, distance: Infinity };
    this.path.runs.forEach((each, run) => {
      const { s, distance } = nearestOnRun(each, x, y, this.foot);
      if (Math.abs(distance) < best.distance) best = { run, s, distance: Math.abs(distance) };
    });
    return best;
  }

  /** Neighbouring cells of a segment make one band. */
  bands({ segments }: Track): Omit<LossBand, 'pair' | 'account'>[] {
    const bands: Omit<LossBand, 'pair' | 'account'>[] = [];
    this.path.runs.forEach((run, index) => {
      let before: Cell | null = null;
      for (const cell of this.cells[index]) {
        const isPassed = cell.high > cell.low && cell.joules !== 0;
        const last = bands[bands.length - 1];
        const goesOn = before !== null && before.segment === cell.segment;
        if (isPassed && goesOn && last) {
          last.joules += cell.joules;
          last.places.push(...cellPlaces(run, this.path.side, cell));
        } else if (isPassed) {
          const { segment, joules } = cell;
          const places = cellPlaces(run, this.path.side, cell);
          bands.push({ track: this.path.id, segment, name: segments[segment].name, joules, places });
        }
        before = isPassed ? cell : null;
      }
    });
    return bands;
  }
}

function cellsOf({ from, length, segment }: Piece, size: number): Cell[] {
  const count = Math.max(1, Math.ceil(length / size));
  return Array.from({ length: count }, (_, i) => ({
    segment,
    from: from + (length * i) / count,
    to: from + (length * (i + 1)) / count,
    joules: 0,
    low: Infinity,
    high: -Infinity,
  }));
}

function cellPlaces(run: SmoothRun, side: TrackPath['side'], { low, high, joules }: Cell): LossBand['places'] {
  const density = joules / (high - low);
  return [0, 0.5, 1].map((share) => {
    const { x, y, tx, ty } = pointAt(run, low + share * (high - low));
    const into: Vec = side === 'right' ? [-ty, tx] : [ty, -tx];
    return { at: [x, y], into, density };
  });
}
