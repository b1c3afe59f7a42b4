import type { Vec } from '../core/vec.js';

/** Bounding box on the sheet [m]. */
export interface Box {
  minX: number;
  minY: number;
  maxX: number;
  maxY: number;
}

interface PieceBase {
  /** Index of the document's segment it was drawn by, and that segment's name. */
  segment: number;
  name?: string;
  /** Arc length of its start, on its run [m]. */
  from: number;
  /** Arc length [m]. */
  length: number;
  start: Vec;
  end: Vec;
  box: Box;
}

/**
 * A line (`curvature` 0) or a circular arc, by where it starts, which way, and how it bends: at arc length s it has
 * turned by φ = κ s and is at start + t sin φ / κ + n (1 − cos φ) / κ, which stays exact as κ goes to zero.
 */
export interface ArcPiece extends PieceBase {
  kind: 'line' | 'arc';
  /** Unit tangent at the start. */
  tangent: Vec;
  /** Signed, + turning left [1/m]. */
  curvature: number;
}

/**
 * One cubic span of a spline: start + b₁ v + b₂ v² + b₃ v³, v from 0 to 1.
 */
export interface CubicPiece extends PieceBase {
  kind: 'cubic';
  bx: readonly [number, number, number];
  by: readonly [number, number, number];
  /** (P − start)·P′, coefficients of v … v⁵: the part of the nearest-point equation that no query changes [m²]. */
  normal: readonly [number, number, number, number, number];
  /** Arc lengths at the ends of equal panels of v, the first 0: one Gauss–Legendre panel each is enough. */
  panels: Float64Array;
}

export type Piece = ArcPiece | CubicPiece;

/** A point of a run with its frame, and how a query point lies to it. */
export interface Foot {
  /** Arc length on the run [m]. */
  s: number;
  x: number;
  y: number;
  /** Unit tangent, along the path. */
  tx: number;
  ty: number;
  /** Signed, + turning left [1/m]. */
  curvature: number;
  /** From the foot to the query, positive on the left of the path [m]; 0 where there was no query. */
  distance: number;
  /** Index of the piece on the run, and of the document's segment. */
  piece: number;
  segment: number;
  /** The foot is held at an end of an open run: the query is not square to it, and the end's corner is nearest. */
  atStart: boolean;
  atEnd: boolean;
}

export const newFoot = (): Foot => ({
  s: 0,
  x: 0,
  y: 0,
  tx: 1,
  ty: 0,
  curvature: 0,
  distance: 0,
  piece: 0,
  segment: 0,
  atStart: false,
  atEnd: false,
});

/** Least distance from a point to a box, squared; 0 inside [m²]. */
export function boxDistanceSquared(box: Box, x: number, y: number): number {
  const dx = x < box.minX ? box.minX - x : x > box.maxX ? x - box.maxX : 0;
  const dy = y < box.minY ? box.minY - y : y > box.maxY ? y - box.maxY : 0;
  return dx * dx + dy * dy;
}

export function boxAround(points: readonly Vec[]): Box {
  const box = { minX: Infinity, minY: Infinity, maxX: -Infinity, maxY: -Infinity };
  for (const point of points) growBox(box, point);
  return box;
}

export function growBox(box: Box, [x, y]: Vec): void {
  box.minX = Math.min(box.minX, x);
  box.minY = Math.min(box.minY, y);
  box.maxX = Math.max(box.maxX, x);
  box.maxY = Math.max(box.maxY, y);
}
