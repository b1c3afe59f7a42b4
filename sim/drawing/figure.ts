import type { Mechanism } from '../mechanism/model.js';
import type { DrawOperation } from './operations.js';
import type { Poses } from './pose.js';

/** Order of drawing, lowest first. */
export const layers = ['stations', 'tracks', 'tracings', 'links', 'bodies', 'joints', 'forces', 'balloons'] as const;
export type FigureLayer = (typeof layers)[number];

/**
 * A symbol on the sheet. A rigid one is drawn once, in paper pixels around the origin of the part it is `on`, and then
 * only moved; a live one is drawn anew for each instant, in paper pixels of the sheet.
 */
export type Figure = { key: string; layer: FigureLayer; item?: string } & (
  { on: string; operations: DrawOperation[] } | { live: (now: Poses) => DrawOperation[] }
);

/** What a symbol is drawn for. */
export interface DrawingContext {
  mechanism: Mechanism;
  /** Paper pixels for a metre. */
  pixels: number;
  drawn: Poses;
}
