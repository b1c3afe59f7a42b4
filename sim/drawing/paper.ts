import type { Vec } from '../core/vec.js';

/** Pixels of a metre of paper (96 dpi). */
export const pixelsPerMetre = 96 / 0.0254;

/** A drawing scale: `paper : model`, as ISO 5455 has them. */
export interface DrawingScale {
  label: string;
  /** Pixels on paper for a metre of the mechanism. */
  pixels: number;
}

/** The scales of ISO 5455, largest first: 1, 2 and 5 times powers of ten. */
export const drawingScales: readonly DrawingScale[] = [4, 3, 2, 1, 0, -1, -2, -3].flatMap((power) =>
  [5, 2, 1].map((mantissa) => scaleOf(mantissa, power)),
);

function scaleOf(mantissa: number, power: number): DrawingScale {
  const ratio = mantissa * 10 ** power;
  const label = ratio >= 1 ? `${Math.round(ratio)}:1` : `1:${Math.round(1 / ratio)}`;
  return { label, pixels: ratio * pixelsPerMetre };
}

/** An axis-parallel rectangle; of the sheet [m] with y up, or of paper [px] with y down. */
export interface Box {
  left: number;
  right: number;
  low: number;
  high: number;
}

/** Smallest box around points; null for none. */
export function boxAround(points: readonly Vec[]): Box | null {
  if (points.length === 0) return null;
  const box = { left: Infinity, right: -Infinity, low: Infinity, high: -Infinity };
  for (const [x, y] of points) {
    box.left = Math.min(box.left, x);
    box.right = Math.max(box.right, x);
    box.low = Math.min(box.low, y);
    box.high = Math.max(box.high, y);
  }
  return box;
}

/** The standard scales at which a box [m] fits a field [px], largest first; at least the smallest there is. */
export function fittingScales(box: Box, width: number, height: number): readonly DrawingScale[] {
  const fitting = drawingScales.filter(
    ({ pixels }) => (box.right - box.left) * pixels <= width && (box.high - box.low) * pixels <= height,
  );
  return fitting.length > 0 ? fitting : drawingScales.slice(-1);
}

/** Sheet coordinates [m], y up, to paper [px], y down; the paper's origin is the sheet's. */
export function toPaper([x, y]: Vec, pixels: number): Vec {
  return [x * pixels, -y * pixels];
}

/** Rounds up to a figure a scale may end with: finer than 1, 2, 5, so that a trace fills its field. */
export function scaleEnd(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value) + 1e-9);
  const mantissa = [1, 1.2, 1.6, 2, 2.4, 3, 4, 5, 6, 8, 10].find((each) => each * power >= value * (1 - 1e-9)) ?? 10;
  return mantissa * power;
}

/** Rounds up to 1, 2 or 5 times a power of ten. */
export function niceAtLeast(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value) + 1e-9);
  const mantissa = [1, 2, 5, 10].find((each) => each * power >= value * (1 - 1e-9)) ?? 10;
  return mantissa * power;
}
