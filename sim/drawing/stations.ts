import type { Station } from '../mechanism/kinds/station.js';
import type { Vec } from '../core/vec.js';
import { dashed, dashes } from './dash.js';
import { pennant } from './kinds/station.js';
import { narrow, segments, type DrawOperation } from './operations.js';

/** How a station is named on the sheet: the figure in its pennant, and a word beside it. */
export interface StationName {
  mark: string;
  word: string;
}

const words: Record<Station['when']['kind'], string> = {
  start: 'start',
  end: 'end',
  time: 'time',
  touch: 'touch',
  parts: 'parting',
  sticks: 'sticking',
  slips: 'slipping',
  crosses: 'crossing',
  turns: 'turn-round',
  angle: 'angle',
  rests: 'rest',
};

/**
 * Names the stations: ids of one or two characters stand in the pennants, else the pennants count. Beside them stands
 * the document's name, else what is awaited or the longer id.
 */
export function nameStations(
  stations: readonly { id: string; when: { kind: Station['when']['kind'] } }[],
  names: ReadonlyMap<string, string> = new Map(),
): Map<string, StationName> {
  const areShort = stations.every(({ id }) => id.length <= 2);
  return new Map(
    stations.map(({ id, when }, i) => {
      const word = names.get(id) ?? (areShort ? words[when.kind] : id);
      return [id, { mark: areShort ? id : String(i + 1), word }];
    }),
  );
}

/** A station to be marked on the sheet: at a place [px], on the open page or not. */
export interface StationPlace extends StationName {
  at: Vec;
  open: boolean;
}

/** Half-width that a letter takes at the size of the words, near enough to keep them apart [px]. */
const letter = 6.2;

/** Pennants on one base line, each under the place of its station; where they are crowded they stand in rows. */
export function stationMarks(places: readonly StationPlace[], baseLine: number): DrawOperation[] {
  const set = setOut(places, baseLine);
  const poles = set.map(({ at: [x, y], top }) => segments(dashed([[x, Math.min(y, top)], [x, top]], dashes.chain), { ...narrow, tone: 'control' })); // prettier-ignore
  return [...poles, ...set.flatMap(flagAndWord)];
}

type SetPlace = StationPlace & { top: number; side: 1 | -1 };

/** Gives each station the first free place: to the right of its pole, to the left, then a row lower. */
function setOut(places: readonly StationPlace[], baseLine: number): SetPlace[] {
  const taken: { left: number; right: number; row: number }[] = [];
  const spots = [0, 1, 2, 3].flatMap((row) => ([1, -1] as const).map((side) => ({ row, side })));
  return [...places]
    .sort((a, b) => a.at[0] - b.at[0])
    .map((place) => {
      const [x] = place.at;
      const reach = 32 + place.word.length * letter;
      const box = ({ row, side }: { row: number; side: 1 | -1 }) =>
        side === 1 ? { left: x + 0.5, right: x + reach, row } : { left: x - reach, right: x - 0.5, row };
      const isFree = (spot: { row: number; side: 1 | -1 }) => {
        const { left, right, row } = box(spot);
        return taken.every((other) => other.row !== row || right < other.left || left > other.right);
      };
      const spot = spots.find(isFree) ?? spots[spots.length - 1];
      taken.push(box(spot));
      return { ...place, side: spot.side, top: baseLine + spot.row * 20 };
    });
}

function flagAndWord({ at: [x], mark, word, open, top, side }: SetPlace): DrawOperation[] {
  const anchor: Vec = [side === 1 ? 0 : 1, 0.5];
  return [
    ...pennant([x, top], mark, open, side),
    { kind: 'text', at: [x + side * 26, top + 7.5], text: word, size: 13.5, tone: 'ink', anchor, ground: 'paper' },
  ];
}
