import type { Figure, FigureLayer } from '../../sim/drawing/figure.js';
import type { DrawOperation } from '../../sim/drawing/operations.js';
import type { Colours } from '../theme/apply.js';

/** A symbol that is drawn once and moved with its part. */
export type RigidFigure = Extract<Figure, { on: string }>;

/** Size of the sheet's field and where the paper's origin lies in it [px], and device pixels for a pixel. */
export interface Viewport {
  width: number;
  height: number;
  originX: number;
  originY: number;
  ratio: number;
}

/**
 * Puts draw operations on the screen. There is one on WebGL and one on a 2D canvas; both are told the same things, in
 * any order, and show them at `render`.
 */
export interface SheetExecutor {
  readonly canvas: HTMLCanvasElement;
  readonly kind: 'webgl' | 'canvas';
  setViewport(viewport: Viewport): void;
  setColours(colours: Colours): void;
  /** Replaces all rigid figures. */
  setFigures(figures: readonly RigidFigure[]): void;
  /** Replaces the live operations under a key; an empty list takes them away. */
  setLive(key: string, layer: FigureLayer, operations: readonly DrawOperation[]): void;
  /** Moves a part: paper position [px] and clockwise turn [rad]. */
  pose(part: string, x: number, y: number, turn: number): void;
  render(): void;
  destroy(): void;
}

/** Typeface of a text on the sheet, as CSS has it. */
export const families = {
  text: '"Sofia Sans Semi Condensed", "Arial Narrow", sans-serif',
  symbol: '"STIX Two Text", "Times New Roman", serif',
} as const;
