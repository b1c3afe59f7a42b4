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
 * Names the stations: ids of one or two characters stand in the pennants and what is awaited stands beside them; longer
 * ids stand beside, and the pennants count.
 */
export function nameStations(stations: readonly { id: string; when: { kind: Station['when']['kind'] } }[]): Map<string, StationName> {
  const areShort = stations.every(({ id }) => id.length <= 2);
  return new Map(
    stations.map(({ id, when }, i) => {
      const name = areShort ? { mark: id, word: words[when.kind] } : { mark: String(i + 1), word: id };
      return [id, name];
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
  const sorted = [...places].sort((a, b) => a.at[0] - b.at[0]);
  const taken: [left: number, right: number, row: number][] = [];
  return sorted.flatMap((place) => {
    const [x, y] = place.at;
    const reach = 32 + place.word.length * letter;
    const spots = [0, 1, 2, 3].flatMap((row) => ([1, -1] as const).map((side) => ({ row, side })));
    const span = (side: 1 | -1): [number, number] => (side === 1 ? [x - 2, x + reach] : [x - reach, x + 2]);
    const isFree = ({ row, side }: { row: number; side: 1 | -1 }) =>
      taken.every(([left, right, at]) => at !== row || span(side)[1] < left || span(side)[0] > right);
    const { row, side } = spots.find(isFree) ?? spots[0];
    taken.push([...span(side), row]);
    const top = baseLine + row * 20;
    const pole: Vec[] = [[x, Math.min(y, top)], [x, top]]; // prettier-ignore
    return [
      segments(dashed(pole, dashes.chain), { ...narrow, tone: 'control' }),
      ...pennant([x, top], place.mark, place.open, side),
      { kind: 'text', at: [x + side * 26, top + 7.5], text: place.word, size: 13.5, tone: 'ink', anchor: [side === 1 ? 0 : 1, 0.5], ground: 'paper' } as const, // prettier-ignore
    ];
  });
}
