/** The drawing frame in the window [px]: the trimmed sheet's edge, the zones' band, and the frame itself. */
export interface FrameGeometry {
  compact: boolean;
  outer: Rect;
  inner: Rect;
  /** Width of the band with the zones' letters and figures. */
  band: number;
  columns: number;
  rows: number;
}
export interface Rect {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** Below this the Key folds, the balloons hide and the title block drops a row. */
const full = { width: 1360, height: 800 };
/** About the width of a zone [px]; ISO 5457 asks for even numbers, so that the middle of a side is between two. */
const zone = { width: 137, height: 130 };

export function frameGeometry(width: number, height: number): FrameGeometry {
  const compact = width < full.width || height < full.height;
  const [margin, top, band] = compact ? [6, 32, 14] : [8, 37, 16];
  const outer = { x: margin, y: top, width: width - 2 * margin, height: height - top - margin };
  const inner = {
    x: outer.x + band,
    y: outer.y + band,
    width: outer.width - 2 * band,
    height: outer.height - 2 * band,
  };
  return {
    compact,
    outer,
    inner,
    band,
    columns: Math.max(2, 2 * Math.round(width / zone.width / 2)),
    rows: Math.max(2, 2 * Math.round(outer.height / zone.height / 2)),
  };
}

/** Letters of the rows; ISO 5457 leaves out I and O. */
const letters = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

export function rowLetter(index: number): string {
  return letters[index] ?? '?';
}

/** Zone of a point of the window, such as "C5". */
export function zoneAt({ outer, columns, rows }: FrameGeometry, x: number, y: number): string {
  const cell = (at: number, from: number, length: number, count: number) =>
    Math.min(count - 1, Math.max(0, Math.floor(((at - from) / length) * count)));
  return `${rowLetter(cell(y, outer.y, outer.height, rows))}${cell(x, outer.x, outer.width, columns) + 1}`;
}
