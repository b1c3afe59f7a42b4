import type { Vec } from '../core/vec.js';
import type { Tone } from './palette.js';

/** Line widths at 96 dpi [px]: wide to narrow is 2:1 (ISO 128-2). */
export const lineWidth = { frame: 2.6, track: 2.3, outline: 1.9, narrow: 0.95 } as const;

export interface Stroke {
  width: number;
  tone: Tone;
  cap?: 'butt' | 'round';
}
export interface Fill {
  tone: Tone;
  /** Share of the tone over the paper, 0 to 1; 1 where absent. */
  tint?: number;
}

/**
 * What a symbol is made of. Lengths are paper pixels, x to the right and y *down*; dashes and hatches are already cut
 * into plain lines, so that whatever executes the operations (WebGL, a 2D canvas, SVG) needs no pattern of its own.
 */
export type DrawOperation =
  | { kind: 'line'; points: readonly Vec[]; closed?: boolean; stroke?: Stroke; fill?: Fill }
  /** Many separate lines in one stroke: x1, y1, x2, y2, ... */
  | { kind: 'segments'; ends: readonly number[]; stroke: Stroke }
  | { kind: 'circle'; at: Vec; radius: number; stroke?: Stroke; fill?: Fill }
  | TextOperation;

export interface TextOperation {
  kind: 'text';
  at: Vec;
  text: string;
  size: number;
  tone: Tone;
  weight?: 400 | 500 | 600 | 700;
  /** Where `at` lies in the text: 0 left or top, 0.5 middle, 1 right or bottom. */
  anchor: Vec;
  /** Turned clockwise [rad]. */
  angle?: number;
  /** A ground under the text, so that lines behind it don't cross it. */
  ground?: Tone;
  face?: 'text' | 'symbol';
}

export const outline: Stroke = { width: lineWidth.outline, tone: 'ink' };
export const narrow: Stroke = { width: lineWidth.narrow, tone: 'ink' };
export const wide: Stroke = { width: lineWidth.track, tone: 'ink' };
export const paperFill: Fill = { tone: 'paper' };
export const inkFill: Fill = { tone: 'ink' };

export function line(points: readonly Vec[], stroke: Stroke = outline): DrawOperation {
  return { kind: 'line', points, stroke };
}

export function polygon(points: readonly Vec[], style: { stroke?: Stroke; fill?: Fill }): DrawOperation {
  return { kind: 'line', points, closed: true, ...style };
}

export function circle(at: Vec, radius: number, style: { stroke?: Stroke; fill?: Fill }): DrawOperation {
  return { kind: 'circle', at, radius, ...style };
}

export function segments(ends: readonly number[], stroke: Stroke = narrow): DrawOperation {
  return { kind: 'segments', ends, stroke };
}

/** Moves operations, then turns nothing: for symbols made around the origin. */
export function moved(operations: readonly DrawOperation[], by: Vec, angle = 0): DrawOperation[] {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const place = ([x, y]: Vec): Vec => [by[0] + c * x - s * y, by[1] + s * x + c * y];
  return operations.map((each) => placed(each, place, angle));
}

function placed(each: DrawOperation, place: (point: Vec) => Vec, angle: number): DrawOperation {
  switch (each.kind) {
    case 'line':
      return { ...each, points: each.points.map(place) };
    case 'segments': {
      const ends: number[] = [];
      for (let i = 0; i < each.ends.length; i += 2) ends.push(...place([each.ends[i], each.ends[i + 1]]));
      return { ...each, ends };
    }
    case 'circle':
      return { ...each, at: place(each.at) };
    case 'text':
      return { ...each, at: place(each.at), angle: (each.angle ?? 0) + angle };
  }
}
