import type { Vec } from '../../sim/core/vec.js';
import { fittingScale, type Box, type DrawingScale } from '../../sim/drawing/paper.js';

/** How the drawing lies in its field. */
export interface Fit {
  scale: DrawingScale;
  /** Paper's origin in the field [px], at whole pixels. */
  origin: Vec;
  /** Upper left corner of the readings box in the field [px]. */
  readings: Vec;
}
export interface Size {
  width: number;
  height: number;
}
export interface Margins {
  top: number;
  bottom: number;
  side: number;
}

export const gapToEdge = 12;

/**
 * Lays the drawing in its field at the largest standard scale, and the readings box in a corner that the drawing leaves
 * free. Where none is free, the drawing makes room below the box.
 *
 * @param box around everything drawn [m]
 * @param ink points of what is drawn [m], enough to tell whether a corner is free
 */
export function fitDrawing(box: Box, ink: readonly Vec[], field: Size, margins: Margins, readings: Size): Fit {
  const whole = layDown(box, field, margins, 0);
  const corners: Vec[] = [
    [field.width - readings.width - gapToEdge, gapToEdge],
    [gapToEdge, gapToEdge],
  ];
  const free = corners.find((corner) => isFree(corner, readings, ink, whole));
  if (free) return { ...whole, readings: free };
  return { ...layDown(box, field, margins, readings.height + gapToEdge), readings: corners[0] };
}

function layDown(box: Box, field: Size, { top, bottom, side }: Margins, strip: number): Omit<Fit, 'readings'> {
  const [width, height] = [field.width - 2 * side, field.height - Math.max(top, strip) - bottom];
  const scale = fittingScale(box, width, height);
  const left = side + (width - (box.right - box.left) * scale.pixels) / 2;
  const upper = Math.max(top, strip) + (height - (box.high - box.low) * scale.pixels) / 2;
  const origin: Vec = [Math.round(left - box.left * scale.pixels), Math.round(upper + box.high * scale.pixels)];
  return { scale, origin };
}

function isFree([left, top]: Vec, size: Size, ink: readonly Vec[], { scale, origin }: Omit<Fit, 'readings'>): boolean {
  const clear = 10;
  return !ink.some(([x, y]) => {
    const [px, py] = [origin[0] + x * scale.pixels, origin[1] - y * scale.pixels];
    return px > left - clear && px < left + size.width + clear && py > top - clear && py < top + size.height + clear;
  });
}
