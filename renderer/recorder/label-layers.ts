import type { ChartLayout } from './chart-layout.js';

/** A layer's name on the chart [px]; with a leader from the layer where it is too thin to hold it. */
export interface LayerLabel {
  text: string;
  at: [number, number];
  from?: [number, number];
}

interface Band {
  lower: Float64Array;
  upper: Float64Array;
}
interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const height = 14;
/** A layer thinner than this [px] all along has no name on the chart; the Key has its look. */
const least = 2.5;

/**
 * Puts each layer's name where the layer is thickest, else beside it with a leader, and no two on top of each other.
 *
 * @param lines x of upright lines that no name may cross [px]
 */
export function labelLayers(
  xs: Float64Array,
  bands: readonly Band[],
  names: readonly string[],
  widthOf: (text: string) => number,
  layout: ChartLayout,
  lines: readonly number[] = [],
): LayerLabel[] {
  const taken: Box[] = lines.map((x) => ({ left: x - 1, right: x + 1, top: -Infinity, bottom: Infinity }));
  const isFree = (box: Box) =>
    taken.every((other) => box.right < other.left || box.left > other.right || box.bottom < other.top || box.top > other.bottom); // prettier-ignore
  const around = (x: number, y: number, width: number): Box => ({
    left: x - width / 2 - 4,
    right: x + width / 2 + 4,
    top: y - height / 2 - 1,
    bottom: y + height / 2 + 1,
  });
  const isOnPaper = ({ left, right, top, bottom }: Box) =>
    left >= layout.left && right <= layout.right && top >= layout.energy.top - 2 && bottom <= layout.energy.bottom + 2;

  const middle = (layout.left + layout.right) / 2;
  /** Room counts, up to what a name can use; of places with as much, one near the middle is better. */
  const worth = (x: number, room: number) =>
    Math.min(room, 44) - (6 * Math.abs(x - middle)) / (layout.right - layout.left);

  const inside = (text: string, band: Band): LayerLabel | null => {
    const width = widthOf(text);
    let best: { x: number; y: number; worth: number } | null = null;
    const stride = Math.max(1, Math.floor(xs.length / 160));
    for (let i = 0; i < xs.length; i += stride) {
      const { top, bottom } = clearance(xs, band, xs[i] - width / 2, xs[i] + width / 2);
      const [x, y, room] = [xs[i], (top + bottom) / 2, bottom - top];
      const isBetter = room > height + 3 && worth(x, room) > (best?.worth ?? -Infinity);
      if (isBetter && isOnPaper(around(x, y, width)) && isFree(around(x, y, width)))
        best = { x, y, worth: worth(x, room) };
    }
    if (!best) return null;
    taken.push(around(best.x, best.y, width));
    return { text, at: [best.x, best.y] };
  };

  const beside = (text: string, band: Band): LayerLabel | null => {
    const width = widthOf(text);
    const offsets = [22, -22, 40, -40].flatMap((dy) => [1, -1].map((side) => [side * (width / 2 + 26), -dy]));
    for (const i of thickPlaces(band)) {
      const from: [number, number] = [xs[i], (band.lower[i] + band.upper[i]) / 2];
      const spots = offsets.map(([dx, dy]): [number, number] => [from[0] + dx, from[1] + dy]);
      const spot = spots.find(([x, y]) => isOnPaper(around(x, y, width)) && isFree(around(x, y, width)));
      if (!spot) continue;
      taken.push(around(...spot, width));
      return { text, at: spot, from };
    }
    return null;
  };

  const placed = bands.map((band, i) => ({ band, text: names[i], label: inside(names[i], band) }));
  return placed.map(({ band, text, label }) => label ?? beside(text, band)).filter((label) => label !== null);
}

/** Highest lower and lowest upper edge of a band over a stretch: what a box must fit between. */
function clearance(
  xs: Float64Array,
  { lower, upper }: Band,
  left: number,
  right: number,
): { top: number; bottom: number } {
  let [top, bottom] = [-Infinity, Infinity];
  for (let i = firstAt(xs, left); i < xs.length && xs[i] <= right; i++) {
    top = Math.max(top, upper[i]);
    bottom = Math.min(bottom, lower[i]);
  }
  return { top, bottom };
}

function firstAt(xs: Float64Array, x: number): number {
  let [low, high] = [0, xs.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (xs[middle] < x) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Samples to lead from: where the layer is thickest, then others spread along it that are nearly as thick. */
function thickPlaces({ lower, upper }: Band): number[] {
  const thickness = (i: number) => lower[i] - upper[i];
  let best = 0;
  for (let i = 1; i < lower.length; i++) if (thickness(i) > thickness(best)) best = i;
  if (thickness(best) < least) return [];
  const spread = [0.5, 0.75, 0.25, 0.9, 0.1].map((share) => Math.floor(share * (lower.length - 1)));
  return [best, ...spread.filter((i) => thickness(i) > 0.6 * thickness(best))];
}
