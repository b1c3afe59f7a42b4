import type { Vec } from '../../sim/core/vec.js';
import type { Figure } from '../../sim/drawing/figure.js';
import type { DrawOperation } from '../../sim/drawing/operations.js';
import type { PatternName } from '../../sim/drawing/patterns.js';
import { bandLabel, lossBand } from '../../sim/drawing/tracings/loss-band.js';
import type { LossBand } from '../../sim/drawing/tracings/loss-map.js';
import { toPaper } from '../../sim/drawing/paper.js';

/** A band with what stands beside it. */
export interface LabelledBand {
  band: LossBand;
  pattern: PatternName;
  label: string;
  figure: string;
  picked: boolean;
}

/** Width of a character of the labels, near enough to tell whether one fits along its band [px]. */
const character = 6.3;

/** The loss map beside the tracks, bands with their names and joules; and its lowest edge on paper [px]. */
export function lossFigure(
  bands: readonly LabelledBand[],
  pixels: number,
  perPixel: number,
): { figure: Figure; bottom: number } {
  const boxes: Vec[] = [];
  const labels = bands.flatMap((each) => labelOperations(each, pixels, perPixel, boxes));
  const operations = [...bands.flatMap(({ band, pattern }) => lossBand(band, pattern, pixels, perPixel)), ...labels];
  const edges = operations.flatMap((each) =>
    each.kind === 'line' ? each.points.map(([, y]) => y) : each.kind === 'text' ? [each.at[1] + 8] : [],
  );
  return { figure: { key: 'loss', layer: 'tracings', on: 'ground', operations }, bottom: Math.max(...edges) };
}

function labelOperations(
  { band, label, figure, picked }: LabelledBand,
  pixels: number,
  perPixel: number,
  placed: Vec[],
): DrawOperation[] {
  const { at, angle } = bandLabel(band, pixels, perPixel);
  const ground = picked ? 'marker' : 'paper';
  const style = { size: 12.5, weight: 500, tone: 'ink', ground } as const;
  const whole = `${label} ${figure}`;
  if (lengthOf(band, pixels) > whole.length * character + 30)
    return [{ kind: 'text', at, text: whole, angle, anchor: [0.5, 0.5], ...style }];
  // Too short for its label: two upright lines below it, with a leader from the band.
  const middle = band.places[Math.floor(band.places.length / 2)];
  const [x, y] = toPaper(middle.at, pixels);
  const down = middle.into[1] <= 0 ? 1 : -1;
  const top: Vec = [x - 26, at[1] + down * 16];
  while (placed.some(([px, py]) => Math.abs(px - top[0]) < 70 && Math.abs(py - top[1]) < 34))
    (top as [number, number])[1] += down * 36;
  placed.push(top);
  return [
    { kind: 'line', points: [[x, (y + at[1]) / 2 - down * 4], [x - 6, top[1] - down * 9]], stroke: { width: 0.95, tone: 'ink' } }, // prettier-ignore
    { kind: 'circle', at: [x, (y + at[1]) / 2 - down * 4], radius: 2, fill: { tone: 'ink' } },
    { kind: 'text', at: top, text: label, anchor: [0.5, 0.5], ...style },
    { kind: 'text', at: [top[0], top[1] + 16], text: figure, anchor: [0.5, 0.5], ...style },
  ];
}

function lengthOf({ places }: LossBand, pixels: number): number {
  const [first, last] = [places[0].at, places[places.length - 1].at];
  return Math.hypot(last[0] - first[0], last[1] - first[1]) * pixels;
}
