import type { Vec } from '../../core/vec.js';
import type { BodySpec, Recording } from '../../recording/recording.js';
import { bodyAtRow, poseAtTime, timeOfRow } from '../../recording/reader.js';
import { line, narrow, segments, type DrawOperation } from '../operations.js';
import { niceAtLeast, toPaper } from '../paper.js';

/** Time between two marks of a trail [s]: some twenty over the run. */
export function trailInterval(duration: number): number {
  return niceAtLeast(duration / 20);
}

/** The path of a centre of mass over part of a run, with a cross stroke at equal times and a figure at every second. */
export function trail(recording: Recording, body: BodySpec, pixels: number, span: [number, number]): DrawOperation[] {
  const path = pathOf(recording, body, pixels, span);
  if (path.length < 2) return [];
  const interval = trailInterval(timeOfRow(recording, recording.rowCount - 1));
  const marks: number[] = [];
  const figures: DrawOperation[] = [];
  let figured: Vec | null = null;
  for (let k = Math.ceil(span[0] / interval - 1e-6); k * interval <= span[1] + 1e-9; k++) {
    const mark = markAt(recording, body, pixels, k * interval);
    marks.push(...mark.stroke);
    // Figures keep apart, or slow stretches would print over themselves.
    if (k === 0 || k % 2 === 1 || (figured && Math.hypot(mark.label[0] - figured[0], mark.label[1] - figured[1]) < 46))
      continue;
    figured = mark.label;
    figures.push(figure(mark.label, k * interval, interval));
  }
  return [line(path, narrow), segments(marks, { ...narrow, width: 1.3 }), ...figures];
}

/** Points at least a pixel apart. */
function pathOf(recording: Recording, body: BodySpec, pixels: number, [from, to]: [number, number]): Vec[] {
  const path: Vec[] = [];
  for (let row = 0; row < recording.rowCount; row++) {
    const time = timeOfRow(recording, row);
    if (time < from || time > to) continue;
    const { x, y } = bodyAtRow(recording, body, row);
    const point = toPaper([x, y], pixels);
    const last = path[path.length - 1];
    if (!last || Math.hypot(point[0] - last[0], point[1] - last[1]) >= 1) path.push(point);
  }
  return path;
}

function markAt(recording: Recording, body: BodySpec, pixels: number, time: number) {
  const step = 1e-4 * Math.max(timeOfRow(recording, recording.rowCount - 1), 1e-9);
  const place = (t: number) => {
    const { x, y } = poseAtTime(recording, body, t);
    return toPaper([x, y], pixels);
  };
  const [before, at, after] = [place(time - step), place(time), place(time + step)];
  const [dx, dy] = [after[0] - before[0], after[1] - before[1]];
  const length = Math.hypot(dx, dy);
  const [nx, ny] = length < 1e-9 ? [0, -1] : dx >= 0 ? [dy / length, -dx / length] : [-dy / length, dx / length];
  const stroke = [at[0] - 5 * nx, at[1] - 5 * ny, at[0] + 5 * nx, at[1] + 5 * ny];
  return { stroke, label: [at[0] + 16 * nx, at[1] + 16 * ny] as Vec };
}

function figure(at: Vec, time: number, interval: number): DrawOperation {
  const decimals = Math.max(1, Math.ceil(-Math.log10(interval) - 1e-9));
  return {
    kind: 'text',
    at,
    text: time.toFixed(decimals),
    size: 11.5,
    tone: 'second',
    anchor: [0.5, 0.5],
    ground: 'paper',
  };
}
