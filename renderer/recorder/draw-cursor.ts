import type { Strip } from '../../sim/drawing/strip.js';
import type { Colours } from '../theme/apply.js';
import { xOf, type ChartLayout, type TimeAxis } from './chart-layout.js';
import { font } from './draw-chart.js';

/** The moment on the paper: a line, a wedge at each layer's edge, and the time below. */
export function drawCursor(
  context: CanvasRenderingContext2D,
  { layout, axis, strip }: { layout: ChartLayout; axis: TimeAxis; strip: Strip },
  time: number,
  text: string,
  colours: Colours,
): void {
  context.clearRect(0, 0, layout.width, layout.height);
  const x = Math.round(xOf(layout, axis, time) * 2) / 2;
  context.fillStyle = colours.ink;
  context.fillRect(x - 1.2, layout.flags - 4, 2.4, layout.speed.bottom - layout.flags + 22);
  for (const y of edges(layout, strip, time)) wedge(context, x, y);
  context.font = font(13.5, 600);
  const width = context.measureText(text).width + 16;
  const left = Math.min(Math.max(x - width / 2, 2), layout.width - width - 2);
  context.fillRect(left, layout.times - 11, width, 17);
  context.fillStyle = colours.paper;
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.fillText(text, left + width / 2, layout.times - 2);
}

/** Heights of the layers' edges at a moment. */
function edges({ energy }: ChartLayout, { times, layers, top }: Strip, time: number): number[] {
  let i = times.findIndex((each) => each > time);
  if (i <= 0) i = i === 0 ? 1 : times.length - 1;
  const [a, b] = [times[i - 1], times[i]];
  const share = b > a ? Math.min(1, Math.max(0, (time - a) / (b - a))) : 0;
  let sum = 0;
  return layers.flatMap(({ values }) => {
    const value = values[i - 1] + share * (values[i] - values[i - 1]);
    sum += value;
    return value > 0 ? [energy.bottom - ((energy.bottom - energy.top) * sum) / (top * 1.04)] : [];
  });
}

function wedge(context: CanvasRenderingContext2D, x: number, y: number): void {
  context.beginPath();
  context.moveTo(x + 1, y);
  context.lineTo(x + 9, y - 4);
  context.lineTo(x + 9, y + 4);
  context.fill();
}
