import type { Vec } from '../../sim/core/vec.js';
import { fittingScales, type Box, type DrawingScale } from '../../sim/drawing/paper.js';

/** How the drawing lies in its field. */
export interface Fit {
  scale: DrawingScale;
  /** Paper's origin in the field [px], at whole pixels. */
  origin: Vec;
}
export interface Size {
  width: number;
  height: number;
}
export interface Margins {
  top: number;
  bottom: number;
  side: number;
  /** Room below the drawing that is used where there is some to spare: for the loss map and the pennants. */
  below: number;
}

const gapToEdge = 12;
/** Distances of the ink from the readings [px]: the first leaves room for balloons between. */
export const clearances = [46, 10] as const;

/**
 * Lays the drawing in its field at the largest standard scale that leaves a corner free for the readings: in the middle,
 * else moved to a side or down. How much of the ink is in the way decides, so a flat ramp may reach below the box.
 *
 * @param box around everything drawn [m]
 * @param ink points of what is drawn [m], close enough together to tell whether a corner is free
 */
export function fitDrawing(box: Box, ink: readonly Vec[], field: Size, margins: Margins, readings: Size): Fit {
  const { top, bottom, side } = margins;
  const scales = fittingScales(box, field.width - 2 * side, field.height - top - bottom);
  const corners = readingsCorners(field, readings);
  for (const scale of scales.slice(0, 2))
    for (const clear of clearances) {
      const isGood = (place: Fit) => corners.some((corner) => isFree(corner, readings, ink, place, clear));
      const fit = places(box, scale, field, margins, readings).find(isGood);
      if (fit) return fit;
    }
  return places(box, scales[0], field, margins, readings)[0];
}

/** Where the drawing may lie at a scale: in the middle of the field or of what the readings leave, high or low. */
function places(
  box: Box,
  scale: DrawingScale,
  field: Size,
  { top, bottom, side, below }: Margins,
  readings: Size,
): Fit[] {
  const width = (box.right - box.left) * scale.pixels;
  const spare = field.height - top - bottom - (box.high - box.low) * scale.pixels;
  const rest = field.width - readings.width - 2 * gapToEdge;
  const beside = Math.max(side, (rest - width) / 2);
  const lefts = [(field.width - width) / 2, beside, field.width - beside - width];
  const room = Math.max(0, spare - below);
  const tops = [top + room / 2, top + room];
  return tops.flatMap((y) =>
    lefts.map((x) => ({
      scale,
      origin: [Math.round(x - box.left * scale.pixels), Math.round(y + box.high * scale.pixels)] as Vec,
    })),
  );
}

/** Upper left corners of a box of readings, the wanted one first [px]. */
export function readingsCorners(field: Size, readings: Size): Vec[] {
  return [
    [field.width - readings.width - gapToEdge, gapToEdge],
    [gapToEdge, gapToEdge],
  ];
}

/** Whether the drawing leaves a box free. */
export function isFree(
  [left, top]: Vec,
  size: Size,
  ink: readonly Vec[],
  { scale, origin }: Fit,
  clear: number,
): boolean {
  return !ink.some(([x, y]) => {
    const [px, py] = [origin[0] + x * scale.pixels, origin[1] - y * scale.pixels];
    return px > left - clear && px < left + size.width + clear && py > top - clear && py < top + size.height + clear;
  });
}
