import { blend } from '../../sim/drawing/palette.js';
import { isDouble, patterns, type Pattern, type PatternName } from '../../sim/drawing/patterns.js';
import type { Colours } from '../theme/apply.js';

/** Fills the current clip with a cause's look: its ground and its hatch, over a rectangle. */
export function fillPattern(
  context: CanvasRenderingContext2D,
  name: PatternName,
  colours: Colours,
  box: { left: number; top: number; right: number; bottom: number },
): void {
  const pattern = patterns[name];
  context.fillStyle = pattern.fill
    ? blend(colours[pattern.fill.tone], colours.chart, pattern.fill.tint)
    : colours.chart;
  context.fillRect(box.left, box.top, box.right - box.left, box.bottom - box.top);
  context.strokeStyle = colours[pattern.tone];
  context.fillStyle = colours.ink;
  context.lineWidth = pattern.width;
  pattern.lines.forEach((lines, i) => hatch(context, lines, isDouble(pattern.lines) && i === 1 ? 2.6 : 0, box));
  if (pattern.mark) marks[pattern.mark](context, pattern, box);
}

type Box = Parameters<typeof fillPattern>[3];

function hatch(
  context: CanvasRenderingContext2D,
  { angle, spacing }: Pattern['lines'][number],
  shift: number,
  box: Box,
): void {
  const [ux, uy] = [Math.cos(angle), Math.sin(angle)];
  const corners = [box.left, box.right].flatMap((x) => [box.top, box.bottom].map((y) => y * ux - x * uy));
  const reach = Math.hypot(box.right - box.left, box.bottom - box.top);
  const [cx, cy] = [(box.left + box.right) / 2, (box.top + box.bottom) / 2];
  const middle = cx * ux + cy * uy;
  context.beginPath();
  for (let k = Math.floor(Math.min(...corners) / spacing); k * spacing < Math.max(...corners); k++) {
    const level = k * spacing + shift;
    const at = (s: number): [number, number] => [s * ux - level * uy, s * uy + level * ux];
    context.moveTo(...at(middle - reach));
    context.lineTo(...at(middle + reach));
  }
  context.stroke();
}

const marks: Record<
  NonNullable<Pattern['mark']>,
  (context: CanvasRenderingContext2D, pattern: Pattern, box: Box) => void
> = {
  zigzag: (context, _, { left, right, top, bottom }) => {
    context.beginPath();
    for (let y = Math.floor(top / 7) * 7; y < bottom + 7; y += 7) {
      const start = Math.floor(left / 8) * 8;
      for (let i = 0; start + i * 4 < right + 4; i++) {
        const [x, dy] = [start + i * 4, i % 2 === 0 ? 3.4 : 0];
        if (i === 0) context.moveTo(x, y + dy);
        else context.lineTo(x, y + dy);
      }
    }
    context.stroke();
  },
  dots: (context, _, box) => lattice(box, 8, (x, y) => dot(context, x, y, 1.2)),
  stipple: (context, _, box) => lattice(box, 5, (x, y) => dot(context, x, y, 0.6)),
  stroke: (context, _, { left, right, top, bottom }) => {
    context.beginPath();
    context.moveTo(left, bottom);
    context.lineTo(right, top);
    context.stroke();
  },
};

function lattice({ left, right, top, bottom }: Box, pitch: number, put: (x: number, y: number) => void): void {
  for (let j = Math.floor(top / pitch) * 2; j * (pitch / 2) < bottom; j++)
    for (let x = Math.floor(left / pitch) * pitch + (j % 2) * (pitch / 2); x < right; x += pitch)
      put(x, j * (pitch / 2));
}

function dot(context: CanvasRenderingContext2D, x: number, y: number, radius: number): void {
  context.beginPath();
  context.arc(x, y, radius, 0, 2 * Math.PI);
  context.fill();
}
