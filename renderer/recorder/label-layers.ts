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

/** Puts each layer's name where the layer is thickest, else beside it with a leader, and no two on top of each other. */
export function labelLayers(
  xs: Float64Array,
  bands: readonly Band[],
  names: readonly string[],
  widthOf: (text: string) => number,
  layout: ChartLayout,
): LayerLabel[] {
  const taken: Box[] = [];
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

  const inside = (text: string, band: Band): LayerLabel | null => {
    const width = widthOf(text);
    let best: { x: number; y: number; room: number } | null = null;
    const stride = Math.max(1, Math.floor(xs.length / 160));
    for (let i = 0; i < xs.length; i += stride) {
      const { top, bottom } = clearance(xs, band, xs[i] - width / 2, xs[i] + width / 2);
      const [x, y, room] = [xs[i], (top + bottom) / 2, bottom - top];
      const box = around(x, y, width);
      if (room > (best?.room ?? height + 3) && isOnPaper(box) && isFree(box)) best = { x, y, room };
    }
    if (!best) return null;
    taken.push(around(best.x, best.y, width));
    return { text, at: [best.x, best.y] };
  };

  const beside = (text: string, band: Band): LayerLabel | null => {
    const i = thickest(band);
    if (band.lower[i] - band.upper[i] < least) return null;
    const from: [number, number] = [xs[i], (band.lower[i] + band.upper[i]) / 2];
    const width = widthOf(text);
    const offsets = [22, -22, 40, -40].flatMap((dy) => [1, -1].map((side) => [side * (width / 2 + 26), -dy]));
    const spot = offsets
      .map(([dx, dy]) => [from[0] + dx, from[1] + dy])
      .find(([x, y]) => {
        const box = around(x, y, width);
        return isOnPaper(box) && isFree(box);
      });
    if (!spot) return null;
    taken.push(around(spot[0], spot[1], width));
    return { text, at: [spot[0], spot[1]], from };
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

function thickest({ lower, upper }: Band): number {
  let best = 0;
  for (let i = 1; i < lower.length; i++) if (lower[i] - upper[i] > lower[best] - upper[best]) best = i;
  return best;
}
