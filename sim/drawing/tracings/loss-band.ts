import type { Vec } from '../../core/vec.js';
import { polygon, type DrawOperation } from '../operations.js';
import { niceAtLeast, toPaper } from '../paper.js';
import { patternFill, type PatternName } from '../patterns.js';
import type { LossBand } from './loss-map.js';

/** Distance of a band from its track [px]: room for the surface's line. */
const gap = 4;

/** Loss that a pixel of depth stands for [J/m]: a round figure for `depth` pixels, so that the greatest fits. */
export function lossScale(bands: readonly LossBand[], depth = 40): { perPixel: number; round: number; length: number } {
  const greatest = Math.max(0, ...bands.flatMap(({ places }) => places.map(({ density }) => Math.abs(density))));
  const round = niceAtLeast(greatest / 2.5);
  const perPixel = Math.max(greatest, 1e-12) / depth;
  return { perPixel, round, length: round / perPixel };
}

/** A band beside its track in the account's pattern, deep as the loss per metre; it takes the place of the hatch. */
export function lossBand(
  { places }: LossBand,
  pattern: PatternName,
  pixels: number,
  perPixel: number,
): DrawOperation[] {
  const offset = (by: (density: number) => number): Vec[] =>
    places.map(({ at, into, density }) => {
      const [x, y] = toPaper(at, pixels);
      return [x + into[0] * by(density), y - into[1] * by(density)];
    });
  const near = offset(() => gap);
  const far = offset((density) => gap + Math.max(1.5, Math.abs(density) / perPixel));
  const cover = [...offset(() => 1.4), ...offset(() => 8).reverse()];
  return [polygon(cover, { fill: { tone: 'paper' } }), ...patternFill([...near, ...far.reverse()], pattern)];
}

/** Where a band's label goes: below its middle, and the way the track runs there [rad on paper]. */
export function bandLabel({ places }: LossBand, pixels: number, perPixel: number): { at: Vec; angle: number } {
  const middle = places[Math.floor(places.length / 2)];
  const [x, y] = toPaper(middle.at, pixels);
  const depth = gap + Math.abs(middle.density) / perPixel + 13;
  const [nx, ny] = [middle.into[0], -middle.into[1]];
  const angle = Math.atan2(-nx, ny);
  const readable = angle > Math.PI / 2 ? angle - Math.PI : angle < -Math.PI / 2 ? angle + Math.PI : angle;
  return { at: [x + nx * depth, y + ny * depth], angle: readable };
}
