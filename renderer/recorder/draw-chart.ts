import { niceAtLeast, scaleEnd } from '../../sim/drawing/paper.js';
import type { Strip } from '../../sim/drawing/strip.js';
import { figures } from '../format/quantity.js';
import { families } from '../sheet/executor.js';
import type { Colours } from '../theme/apply.js';
import { xOf, type ChartLayout, type TimeAxis } from './chart-layout.js';
import { labelLayers, type LayerLabel } from './label-layers.js';
import { fillPattern } from './pattern-tiles.js';
import type { ForceTrace, Trace } from './traces.js';

/** Everything on the recorder's paper but the cursor. */
export interface Chart {
  layout: ChartLayout;
  axis: TimeAxis;
  strip: Strip | null;
  names: readonly string[];
  speed: Trace | null;
  force: (ForceTrace & { label: string }) | null;
  /** Unit of the energy scale. */
  unit: { unit: string; joules: number };
  /** Times to be marked yellow; the open page; where the stations are [s]. */
  marked: readonly [number, number] | null;
  page: { from: number; to: number; text: string } | null;
  stations: readonly number[];
  /** The pen at the end of the paper, while a run is recorded [s]. */
  pen: number | null;
}

type Context = CanvasRenderingContext2D;

export function drawChart(context: Context, chart: Chart, colours: Colours): void {
  const { width, height } = chart.layout;
  context.fillStyle = colours.chart;
  context.fillRect(0, 0, width, height);
  drawHoles(context, chart.layout, colours);
  const ticks = energyTicks(chart);
  drawGrid(context, chart, ticks, colours);
  if (chart.marked) drawMarked(context, chart, colours);
  const labels = chart.strip ? drawEnergy(context, chart, ticks.top, colours) : [];
  if (chart.strip) drawTraces(context, chart, colours);
  drawScales(context, chart, ticks, colours);
  drawStations(context, chart, colours);
  for (const label of labels) drawLabel(context, label, colours);
  if (chart.pen !== null) drawPen(context, chart, chart.pen, colours);
}

interface EnergyTicks {
  top: number;
  step: number;
}

function energyTicks({ strip }: Chart): EnergyTicks {
  const top = strip && strip.top > 0 ? strip.top : 1;
  return { top: top * 1.04, step: niceAtLeast(top / 3.5) };
}

function drawHoles(context: Context, { width, holes }: ChartLayout, colours: Colours): void {
  context.fillStyle = colours.hair;
  const pitch = 44;
  for (const y of holes)
    for (let x = 52; x < width - 20; x += pitch) {
      context.beginPath();
      context.roundRect(x - 4, y - 3, 8, 6, 2.5);
      context.fill();
    }
  context.strokeStyle = colours.hair;
  context.lineWidth = 1;
  for (const y of [holes[0] + 6.5, holes[1] - 6.5]) strokeLine(context, [0, y], [width, y]);
}

function drawGrid(
  context: Context,
  { layout, axis, speed }: Chart,
  { top, step }: EnergyTicks,
  colours: Colours,
): void {
  context.strokeStyle = colours.hair;
  context.lineWidth = 0.95;
  for (let k = 0; k * (axis.step / 2) <= axis.end * (1 + 1e-9); k++) {
    const x = Math.round(xOf(layout, axis, k * (axis.step / 2))) + 0.5;
    context.globalAlpha = k % 2 === 0 ? 1 : 0.6;
    strokeLine(context, [x, layout.energy.top - 4], [x, layout.speed.bottom]);
  }
  context.globalAlpha = 0.6;
  const { energy } = layout;
  for (let k = 0; k * step <= top; k++) {
    const y = Math.round(energy.bottom - ((energy.bottom - energy.top) * k * step) / top) + 0.5;
    strokeLine(context, [layout.left, y], [layout.right, y]);
  }
  const rows = speed ? 4 : 0;
  for (let k = 0; k <= rows; k++) {
    const y = Math.round(layout.speed.bottom - ((layout.speed.bottom - layout.speed.top) * k) / 4) + 0.5;
    strokeLine(context, [layout.left, y], [layout.right, y]);
  }
  context.globalAlpha = 1;
}

function drawMarked(context: Context, { layout, axis, marked }: Chart, colours: Colours): void {
  if (!marked) return;
  const [from, to] = marked.map((time) => xOf(layout, axis, time));
  context.fillStyle = colours.marked;
  context.fillRect(from, layout.energy.top - 9, Math.max(3, to - from), layout.speed.bottom - layout.energy.top + 9);
}

/** The layers, each clipped to its band; returns where their names go. */
function drawEnergy(context: Context, chart: Chart, top: number, colours: Colours): LayerLabel[] {
  const { layout, axis, strip, names } = chart;
  if (!strip || strip.times.length === 0) return [];
  const { energy } = layout;
  const xs = Float64Array.from(strip.times, (time) => xOf(layout, axis, time));
  const yOf = (joules: number) => energy.bottom - ((energy.bottom - energy.top) * joules) / top;
  let floor = new Float64Array(xs.length);
  const bands = strip.layers.map(({ pattern, values }) => {
    const roof = floor.map((value, i) => value + values[i]);
    const band = { lower: floor.map(yOf), upper: roof.map(yOf) };
    context.save();
    traceBand(context, xs, band);
    context.clip();
    fillPattern(context, pattern, colours, { left: layout.left, right: xs[xs.length - 1], top: energy.top - 2, bottom: energy.bottom }); // prettier-ignore
    context.restore();
    floor = roof;
    return band;
  });
  context.strokeStyle = colours.ink;
  for (const [i, { upper }] of bands.entries()) {
    context.lineWidth = i === bands.length - 1 ? 1.9 : 0.95;
    traceLine(context, xs, upper);
    context.stroke();
  }
  context.lineWidth = 0.95;
  strokeLine(context, [xs[0], yOf(0)], [xs[xs.length - 1], yOf(0)]);
  context.font = font(13);
  return labelLayers(
    xs,
    bands,
    names,
    (text) => context.measureText(text).width,
    layout,
    chart.stations.map((time) => xOf(layout, axis, time)),
  );
}

function traceBand(
  context: Context,
  xs: Float64Array,
  { lower, upper }: { lower: Float64Array; upper: Float64Array },
): void {
  traceLine(context, xs, upper);
  for (let i = xs.length - 1; i >= 0; i--) context.lineTo(xs[i], lower[i]);
  context.closePath();
}

function traceLine(context: Context, xs: Float64Array, ys: Float64Array): void {
  context.beginPath();
  for (let i = 0; i < xs.length; i++)
    if (i === 0) context.moveTo(xs[i], ys[i]);
    else context.lineTo(xs[i], ys[i]);
}

function drawTraces(context: Context, { layout, axis, strip, speed, force }: Chart, colours: Colours): void {
  if (!strip) return;
  const xs = Float64Array.from(strip.times, (time) => xOf(layout, axis, time));
  const { top, bottom } = layout.speed;
  const scaled = ({ values }: Trace, peak: number) => values.map((value) => bottom - (value / peak) * (bottom - top));
  context.strokeStyle = colours.ink;
  context.lineWidth = 1.4;
  context.lineJoin = 'round';
  if (force) {
    context.setLineDash([6, 3.5]);
    traceLine(context, xs, scaled(force, force.peak * 1.25));
    context.stroke();
    context.setLineDash([]);
  }
  if (speed && speed.peak > 0) {
    traceLine(context, xs, scaled(speed, scaleEnd(speed.peak)));
    context.stroke();
  }
  const low = (trace: Trace | null, i: number) => !trace || trace.values[i] < 0.42 * trace.peak;
  const { left, right } = layout;
  if (speed) {
    // The name stands over a stretch where both lines are low; where there is none, at the left end.
    const clear = runOf(xs, (i) => low(speed, i) && low(force, i), 60);
    halo(context, 'speed', clear ?? left + 12, top + 9, colours);
  }
  if (force) halo(context, force.label, right - 8, bottom - 10, colours, 'right');
}

/** Where a stretch of at least `width` pixels begins over which every sample is as wanted, with a small inset. */
function runOf(xs: Float64Array, isWanted: (i: number) => boolean, width: number): number | null {
  let start = -1;
  for (let i = 0; i < xs.length; i++) {
    if (!isWanted(i)) start = -1;
    else if (start < 0) start = i;
    else if (xs[i] - xs[start] >= width) return xs[start] + 10;
  }
  return null;
}

function drawScales(
  context: Context,
  { layout, axis, unit, speed }: Chart,
  { top, step }: EnergyTicks,
  colours: Colours,
): void {
  context.fillStyle = colours.second;
  context.font = font(12);
  context.textBaseline = 'middle';
  context.textAlign = 'right';
  const { energy } = layout;
  const last = Math.floor(top / step);
  for (let k = 0; k <= last; k++) {
    const y = energy.bottom - ((energy.bottom - energy.top) * k * step) / top;
    const text = figures((k * step) / unit.joules);
    context.fillText(k === last ? `${text} ${unit.unit}` : text, layout.left - 7, y);
  }
  if (speed && speed.peak > 0) {
    context.fillText(`${figures(scaleEnd(speed.peak))} m/s`, layout.left - 7, layout.speed.top + 1);
    context.fillText('0', layout.left - 7, layout.speed.bottom);
  }
  context.textAlign = 'center';
  const count = Math.floor(axis.end / axis.step + 1e-9);
  for (let k = 0; k <= count; k++) {
    const text = (k * axis.step).toFixed(axis.decimals);
    context.fillText(k === count ? `${text} s` : text, xOf(layout, axis, k * axis.step), layout.times - 3);
  }
  context.strokeStyle = colours.ink;
  context.lineWidth = 1.3;
  strokeLine(context, [layout.left, energy.top - 4], [layout.left, energy.bottom]);
  strokeLine(context, [layout.left, layout.speed.top], [layout.left, layout.speed.bottom]);
  strokeLine(context, [layout.left, layout.speed.bottom], [layout.right, layout.speed.bottom]);
}

function drawStations(context: Context, { layout, axis, stations, page }: Chart, colours: Colours): void {
  context.strokeStyle = colours.ink;
  context.lineWidth = 1.3;
  for (const time of stations) {
    const x = xOf(layout, axis, time);
    strokeLine(context, [x, layout.flags + 14], [x, layout.speed.bottom]);
  }
  if (!page) return;
  const [from, to] = [xOf(layout, axis, page.from) + 26, xOf(layout, axis, page.to) - 26];
  context.font = font(13);
  const width = context.measureText(page.text).width;
  if (to - from < width + 60) return;
  const y = layout.flags + 8;
  const middle = (from + to) / 2;
  context.lineWidth = 0.95;
  strokeLine(context, [from, y], [middle - width / 2 - 8, y]);
  strokeLine(context, [middle + width / 2 + 8, y], [to, y]);
  context.fillStyle = colours.ink;
  for (const [x, side] of [[from, 1], [to, -1]] as const) arrowHead(context, x, y, side); // prettier-ignore
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.fillText(page.text, middle, y);
}

function arrowHead(context: Context, x: number, y: number, side: 1 | -1): void {
  context.beginPath();
  context.moveTo(x, y);
  context.lineTo(x + side * 8, y - 2.6);
  context.lineTo(x + side * 8, y + 2.6);
  context.fill();
}

function drawLabel(context: Context, { text, at, from }: LayerLabel, colours: Colours): void {
  if (from) {
    context.strokeStyle = colours.ink;
    context.fillStyle = colours.ink;
    context.lineWidth = 0.95;
    strokeLine(context, from, at);
    context.beginPath();
    context.arc(from[0], from[1], 2, 0, 2 * Math.PI);
    context.fill();
  }
  halo(context, text, at[0], at[1], colours, 'center');
}

/** A name on a ground of paper around its letters, readable over any hatch. */
function halo(
  context: Context,
  text: string,
  x: number,
  y: number,
  colours: Colours,
  align: CanvasTextAlign = 'left',
): void {
  context.font = font(13, 500);
  context.textAlign = align;
  context.textBaseline = 'middle';
  context.lineJoin = 'round';
  context.strokeStyle = colours.chart;
  context.lineWidth = 5;
  context.strokeText(text, x, y);
  context.fillStyle = colours.ink;
  context.fillText(text, x, y);
}

/** The pen's carriage, where the paper is being written on. */
function drawPen(context: Context, { layout, axis }: Chart, time: number, colours: Colours): void {
  const x = xOf(layout, axis, time);
  context.strokeStyle = colours.ink;
  context.fillStyle = colours.ink;
  context.lineWidth = 1.9;
  strokeLine(context, [x, layout.flags], [x, layout.speed.bottom]);
  context.fillRect(x - 9, layout.flags - 4, 18, 9);
  context.beginPath();
  context.moveTo(x - 4, layout.flags + 5);
  context.lineTo(x + 4, layout.flags + 5);
  context.lineTo(x, layout.flags + 13);
  context.fill();
}

function strokeLine(context: Context, [x1, y1]: readonly [number, number], [x2, y2]: readonly [number, number]): void {
  context.beginPath();
  context.moveTo(x1, y1);
  context.lineTo(x2, y2);
  context.stroke();
}

export function font(size: number, weight = 400): string {
  return `${weight} ${size}px ${families.text}`;
}
