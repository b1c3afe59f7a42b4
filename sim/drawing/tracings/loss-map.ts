import type { Vec } from '../../core/vec.js';
import { buildTrack, nearestOnRun, newFoot, pointAt, type SmoothRun, type TrackPath } from '../../geometry/index.js';
import type { Mechanism } from '../../mechanism/model.js';
import type { AccountSpec, ContactSpec, Recording } from '../../recording/recording.js';
import { contactOf, valueAt } from '../../recording/reader.js';

/** Joules lost along one segment of a track by one pair, between two rows of a run. */
export interface LossBand {
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
    ({ account, columns }) => (account === 'friction' || account === 'rolling-resistance') && columns.heat !== undefined,
  );
  return lossy.flatMap((account) => {
    if (!Array.isArray(account.of)) return [];
    const contact = contactOf(recording, account.of);
    const track = mechanism.tracks.find(({ id }) => account.of?.includes(id));
    if (!contact || !track) return [];
    const path = buildTrack(track);
    const tally = new Tally(path, mechanism.extent * cell);
    for (let row = from + 1; row <= to; row++) addLoss(tally, recording, account, contact, row);
    return tally.bands(account.of, track.segments.map(({ name }) => name)); // prettier-ignore
  });
}

function addLoss(tally: Tally, recording: Recording, account: AccountSpec, contact: ContactSpec, row: number): void {
  const heat = account.columns.heat!;
  const joules = valueAt(recording, row, heat) - valueAt(recording, row - 1, heat);
  if (joules === 0) return;
  const place = (at: number): Vec => [
    valueAt(recording, at, contact.columns.x),
    valueAt(recording, at, contact.columns.y),
  ];
  const touches = (at: number) => valueAt(recording, at, contact.columns.points) > 0;
  const end = place(row);
  tally.add(touches(row - 1) ? place(row - 1) : end, end, joules);
}

/** Heat by cells of a track's runs. */
class Tally {
  private readonly cells: Float64Array[];
  private readonly foot = newFoot();

  constructor(
    private readonly path: TrackPath,
    private readonly size: number,
  ) {
    this.cells = path.runs.map((run) => new Float64Array(Math.max(1, Math.ceil(run.length / size))));
  }

  /** Spreads joules evenly along the track between two contact places; on two runs, all goes to the second. */
  add(start: Vec, end: Vec, joules: number): void {
    const b = this.nearest(end);
    const a = this.nearest(start);
    const from = a.run === b.run ? a.s : b.s;
    const cells = this.cells[b.run];
    const width = this.path.runs[b.run].length / cells.length;
    const index = (s: number) => Math.min(cells.length - 1, Math.max(0, Math.floor(s / width)));
    const [low, high] = [Math.min(from, b.s), Math.max(from, b.s)];
    if (high - low < 1e-12) cells[index(b.s)] += joules;
    else
      for (let i = index(low); i <= index(high); i++) {
        const covered = Math.min(high, (i + 1) * width) - Math.max(low, i * width);
        cells[i] += (joules * Math.max(0, covered)) / (high - low);
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

  bands(pair: [string, string], names: readonly (string | undefined)[]): LossBand[] {
    const bands: LossBand[] = [];
    this.path.runs.forEach((run, index) => {
      const cells = this.cells[index];
      const width = run.length / cells.length;
      cells.forEach((joules, i) => {
        if (joules === 0) return;
        const segment = pointAt(run, (i + 0.5) * width).segment;
        const last = bands[bands.length - 1];
        const places = cellPlaces(run, this.path.side, i * width, width, joules / width);
        if (last?.segment === segment && i > 0 && cells[i - 1] !== 0) {
          last.joules += joules;
          last.places.push(...places);
        } else bands.push({ pair, track: this.path.id, segment, name: names[segment], joules, places });
      });
    });
    return bands;
  }
}

function cellPlaces(run: SmoothRun, side: TrackPath['side'], from: number, width: number, density: number) {
  return [0, 0.5, 1].map((share) => {
    const { x, y, tx, ty } = pointAt(run, from + share * width);
    const into: Vec = side === 'right' ? [-ty, tx] : [ty, -tx];
    return { at: [x, y] as Vec, into, density };
  });
}
